/** Keeps the assumptions of a job's saving, against the version that was looked at. */
import { type AnyActor, command } from '@/lib/access/command';
import { getJob } from '@/lib/jobs/queries';
import { run } from '@/lib/platform/db';
import { conflict } from '@/lib/platform/http/errors';
import { planOf } from './queries';
import type { SavingInput } from './schema';

export async function saveSaving(actor: AnyActor, input: SavingInput): Promise<{ version: number }> {
  return command(actor, async ({ audit, shopId }) => {
    const { jobId, baseVersion, ...assumptions } = input;
    await getJob(jobId);
    const before = await planOf(jobId);
    const rows = await run<{ version: number }>(
      `insert into saving_plans (shop_id, job_id, assumptions) values ($1, $2, $3)
       on conflict (shop_id, job_id) do update set assumptions = $3, version = saving_plans.version + 1, updated_at = now()
       where saving_plans.version = $4 returning version`,
      [shopId, jobId, JSON.stringify(assumptions), baseVersion ?? 0],
    );
    const version = rows[0]?.version;
    if (version === undefined)
      throw conflict('Somebody else changed these assumptions meanwhile. Both are shown.', before);
    await audit(
      'saving.assumptions',
      { type: 'job', id: jobId },
      { before: before ? { ...before.assumptions } : undefined, after: assumptions },
    );
    return { version };
  });
}
