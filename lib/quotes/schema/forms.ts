/** What people type about quotes. The same schemas serve the forms, the actions and the routes. */
import { z } from 'zod';
import { pointed } from '@/lib/units/parsed';

const DECIMAL = /^\d+(\.\d+)?$/;

/** A figure kept as text: money and rates never pass through floating point on their way to a column. */
function decimal(options: { whole: number; places: number; most?: number; what: string }) {
  const { whole, places, most, what } = options;
  return z
    .string()
    .trim()
    .transform((text) => (pointed(text) ?? text).replace(/^\./, '0.'))
    .refine((text) => DECIMAL.test(text), `Type ${what} as a number, for example 12.50.`)
    .refine((text) => (text.split('.')[1] ?? '').length <= places, `At most ${places} decimals.`)
    .refine((text) => (text.split('.')[0] ?? '').replace(/^0+/, '').length <= whole, 'This is too large.')
    .refine((text) => most === undefined || Number(text) <= most, `At most ${most}.`);
}

const percent = (most: number) => decimal({ whole: 3, places: 6, most, what: 'the percentage' });
const words = (most: number) => z.string().trim().max(most, `At most ${most} characters.`);

const jobId = z.uuid();
const baseVersion = z.number().int().min(1);

export const openDraftForm = z.object({ jobId });
export type OpenDraftInput = z.output<typeof openDraftForm>;

export const lineForm = z.object({
  jobId,
  /** A line that is there already. */
  id: z.uuid().optional(),
  baseVersion: baseVersion.optional(),
  areaName: words(120),
  description: words(500).min(1, 'Say what this line is, in the customer’s words.'),
  quantity: decimal({ whole: 8, places: 4, what: 'the quantity' }),
  unitCost: decimal({ whole: 9, places: 6, what: 'the cost' }),
  unitLabourHours: decimal({ whole: 8, places: 4, what: 'the hours' }),
  labourRate: decimal({ whole: 6, places: 6, what: 'the rate' }),
  markupPct: percent(1000),
  taxable: z.boolean(),
  optional: z.boolean(),
  chosen: z.boolean(),
});
export type LineForm = z.input<typeof lineForm>;
export type LineInput = z.output<typeof lineForm>;

export const lineRefForm = z.object({ jobId, id: z.uuid(), baseVersion });
export type LineRefInput = z.output<typeof lineRefForm>;

export const moveLineForm = z.object({ jobId, id: z.uuid(), direction: z.enum(['up', 'down']) });
export type MoveLineInput = z.output<typeof moveLineForm>;

export const addSourceForm = z.object({ jobId, sourceId: z.uuid() });
export type AddSourceInput = z.output<typeof addSourceForm>;

export const termsForm = z.object({
  jobId,
  baseVersion,
  depositPct: percent(100),
  discountPct: percent(100),
  overheadPct: percent(1000),
  contingencyPct: percent(1000),
  taxName: words(40).min(1, 'Name the tax.'),
  taxRatePct: percent(100),
  validDays: z
    .string()
    .trim()
    .regex(/^\d{1,3}$/, 'Whole days, for example 30.')
    .refine((text) => Number(text) >= 1 && Number(text) <= 365, 'From 1 to 365 days.'),
  scopeNote: words(2000),
  exclusions: words(4000),
});
export type TermsForm = z.input<typeof termsForm>;
export type TermsInput = z.output<typeof termsForm>;

const recipient = z.email('This is not an e-mail address.').max(200, 'At most 200 characters.');

export const sendForm = z.object({
  jobId,
  /** The hash of what the sender looked at: another draft than that is not sent. */
  bodySha256: z.string().regex(/^[0-9a-f]{64}$/, 'is not a draft’s hash'),
  email: recipient,
  note: words(2000),
});
export type SendForm = z.input<typeof sendForm>;
export type SendInput = z.output<typeof sendForm>;

export const resendForm = z.object({ jobId, documentId: z.uuid(), email: recipient });
export type ResendForm = z.input<typeof resendForm>;
export type ResendInput = z.output<typeof resendForm>;

export const withdrawForm = z.object({
  jobId,
  documentId: z.uuid(),
  reason: words(1000).min(3, 'Say why, in a few words.'),
});
export type WithdrawForm = z.input<typeof withdrawForm>;
export type WithdrawInput = z.output<typeof withdrawForm>;

/** What the office records of an answer that came on paper or by telephone. */
export const officeAcceptanceForm = z.object({
  jobId,
  documentId: z.uuid(),
  name: words(200).min(2, 'Who accepted? Type their name.'),
  reference: words(120).min(1, 'Give the purchase order number, or say how they answered.'),
  choices: z.array(z.uuid()).max(200),
});
export type OfficeAcceptanceForm = z.input<typeof officeAcceptanceForm>;
export type OfficeAcceptanceInput = z.output<typeof officeAcceptanceForm>;

/** What the customer's page sends: everything the reader saw goes along, and the server figures it again. */
export const acceptForm = z.object({
  documentId: z.uuid(),
  sha256: z.string().regex(/^[0-9a-f]{64}$/, 'is not a revision’s hash'),
  choices: z.array(z.uuid()).max(200),
  totalMinor: z.number().int(),
  shownText: z.string().min(1).max(8000),
  name: words(200).min(2, 'Type your name to sign.'),
  agreed: z.literal(true, 'Tick the box to say that you accept.'),
});
export type AcceptInput = z.output<typeof acceptForm>;

export const declineForm = z.object({
  documentId: z.uuid(),
  reason: words(2000).min(1, 'Say in a few words why, so that the shop can do better.'),
});
export type DeclineInput = z.output<typeof declineForm>;

export const openedForm = z.object({ documentId: z.uuid() });
