/** Opening a job, and what moves it along that belongs to no other domain. */
import { Customer, Job, JobClosing, Site } from '@/models';
import { type AnyActor, command } from '@/lib/access/command';
import type { Actor } from '@/lib/access/policy';
import { expireLinksOfJob } from '@/lib/links/commands';
import { nextNumber } from '@/lib/platform/db/counter';
import { AppError, invalid, notFound } from '@/lib/platform/http/errors';
import { factsOfJobs } from './facts';
import { getJob } from './queries';
import type { CloseJobInput, DepositRuleInput, NewJobInput, SurveyDoneInput } from './schema';
import { stageOf } from './stage';

/** Rewrites the stored stage from the facts. Every command that changes a fact calls it before it ends. */
export async function refreshStage(jobId: string): Promise<void> {
  const facts = (await factsOfJobs([jobId])).get(jobId);
  if (!facts) throw notFound('This job');
  await Job.update({ stage: stageOf(facts) }, { where: { id: jobId } });
}

export async function createJob(
  actor: AnyActor,
  input: NewJobInput,
): Promise<{ id: string; number: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const customer = await Customer.findOne({ where: { id: input.customerId, archivedAt: null } });
    if (!customer) throw invalid('customerId', 'This customer is not in the shop.');
    const site =
      (await Site.findOne({ where: { customerId: customer.id, name: input.siteName, archivedAt: null } })) ??
      (await Site.create({
        shopId,
        customerId: customer.id,
        name: input.siteName,
        address: input.siteAddress,
      }));
    const number = await nextNumber('job', 2040);
    const job = await Job.create({
      shopId,
      number,
      customerId: customer.id,
      siteId: site.id,
      title: input.title,
    });
    await audit('job.created', { type: 'job', id: job.id }, { after: { number, title: input.title } });
    return { id: job.id, number };
  });
}

export async function markSurveyDone(actor: AnyActor, input: SurveyDoneInput): Promise<{ done: boolean }> {
  return command(actor, async ({ audit }) => {
    const [changed] = await Job.update(
      { surveyDoneAt: input.done ? new Date() : null },
      { where: { id: input.jobId, archivedAt: null } },
    );
    if (changed !== 1) throw notFound('This job');
    await audit(input.done ? 'survey.finished' : 'survey.reopened', { type: 'job', id: input.jobId });
    await refreshStage(input.jobId);
    return { done: input.done };
  });
}

export async function setDepositRule(actor: AnyActor, input: DepositRuleInput): Promise<{ rule: string }> {
  return command(actor, async ({ audit }) => {
    const before = await getJob(input.jobId);
    if (before.facts.depositInvoiced)
      throw new AppError('conflict', 'The deposit invoice is out already; void it before the rule changes.');
    await Job.update({ depositRule: input.rule }, { where: { id: input.jobId } });
    await audit(
      'job.deposit-rule',
      { type: 'job', id: input.jobId },
      { before: { rule: before.depositRule }, after: { rule: input.rule } },
    );
    await refreshStage(input.jobId);
    return { rule: input.rule };
  });
}

/** A job closes when its work is signed off and its invoices are paid. */
export async function closeJob(actor: Actor, input: CloseJobInput): Promise<{ id: string }> {
  return command(actor, async ({ audit, shopId }) => {
    const { facts } = await getJob(input.jobId);
    if (!facts.sheetsSignedOff) throw new AppError('conflict', 'The wiring sheet is not signed off yet.');
    if (!facts.finalInvoiced) throw new AppError('conflict', 'The final invoice has not been sent yet.');
    if (!facts.finalPaid) throw new AppError('conflict', 'There is still a balance to be paid.');
    await JobClosing.create({
      shopId,
      jobId: input.jobId,
      membershipId: actor.membershipId,
      note: input.note,
    });
    await expireLinksOfJob(input.jobId);
    await audit('job.closed', { type: 'job', id: input.jobId });
    await refreshStage(input.jobId);
    return { id: input.jobId };
  });
}
