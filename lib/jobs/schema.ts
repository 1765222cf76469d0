import { z } from 'zod';

export const STAGES = ['survey', 'quote', 'install', 'closeout', 'closed'] as const;

export const newJobForm = z.object({
  customerId: z.uuid('Choose the customer.'),
  siteName: z.string().trim().min(1, 'Name the site.').max(200, 'At most 200 characters.'),
  siteAddress: z.string().trim().max(400, 'At most 400 characters.'),
  title: z.string().trim().min(1, 'Say in a few words what the job is.').max(200, 'At most 200 characters.'),
});
export type NewJobForm = z.input<typeof newJobForm>;
export type NewJobInput = z.output<typeof newJobForm>;

export const surveyDoneForm = z.object({ jobId: z.uuid(), done: z.boolean() });
export type SurveyDoneInput = z.output<typeof surveyDoneForm>;

export const depositRuleForm = z.object({ jobId: z.uuid(), rule: z.enum(['percent', 'none', 'terms']) });
export type DepositRuleInput = z.output<typeof depositRuleForm>;

export const closeJobForm = z.object({
  jobId: z.uuid(),
  note: z.string().trim().max(2000, 'At most 2,000 characters.'),
});
export type CloseJobInput = z.output<typeof closeJobForm>;

/** The jobs list's address: filter, sort and page live in the URL. */
export const jobsQuery = z.object({
  stage: z.enum(STAGES).optional().catch(undefined),
  find: z.string().trim().max(100).optional().catch(undefined),
  sort: z.enum(['number', 'customer', 'stage']).catch('number'),
  dir: z.enum(['asc', 'desc']).catch('desc'),
  page: z.coerce.number().int().min(1).max(100_000).catch(1),
});
export type JobsQuery = z.output<typeof jobsQuery>;
