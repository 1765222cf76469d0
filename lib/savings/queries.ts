/** What a job would save, and with what it is figured. Opens the shop itself. */
import { Area, ChangeLine, ExistingLuminaire, Part, UtilityAccount } from '@/models';
import { latestDocument } from '@/lib/documents/queries';
import { getJob } from '@/lib/jobs/queries';
import { select, withShop } from '@/lib/platform/db';
import { contentOf } from '@/lib/quotes/queries';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { hoursPerYear } from '@/lib/surveys/schema/details';
import { CARBON_FACTORS } from '@/lib/lighting/tables/carbon';
import { minorDigits } from '@/lib/pricing/currencies';
import { figureSaving, type SavingLine } from './figure';
import type { Assumption, Assumptions } from './schema';

const OURS = 'common practice: change it to what holds here';

interface PlanRow {
  assumptions: Assumptions;
  version: number;
}

/** Inside `withShop`. */
export async function planOf(jobId: string): Promise<PlanRow | null> {
  const rows = await select<PlanRow>('select assumptions, version from saving_plans where job_id = $1', [
    jobId,
  ]);
  return rows[0] ?? null;
}

const unknown: Assumption = { value: null, source: '' };

/** What stands until somebody types something else: rates from the utility's account, the rest marked as ours. */
async function startingPoint(jobId: string, basis: 'us' | 'iec'): Promise<Assumptions> {
  const account = await UtilityAccount.findOne({ where: { jobId, archivedAt: null } });
  const said = account ? `${account.utility}${account.rateSchedule ? `, ${account.rateSchedule}` : ''}` : '';
  const rate = (value: string | null | undefined): Assumption =>
    value === null || value === undefined ? unknown : { value: Number(value), source: said };
  const carbon = CARBON_FACTORS.find(({ area }) => area === (basis === 'us' ? 'US average' : 'UK'));
  return {
    energyRate: rate(account?.energyRate),
    rateIsBlended: account?.blended ?? false,
    demandRate: rate(account?.demandRate),
    demandMonths: { value: 12, source: OURS },
    coincidencePct: unknown,
    existingControlPct: { value: 100, source: 'switched by hand' },
    newControlPct: { value: 100, source: 'no new controls' },
    interactionPct: { value: 100, source: 'heating and cooling not counted' },
    fuelPenalty: unknown,
    kgCo2: carbon
      ? { value: Number(carbon.kgCo2PerKilowattHour.toFixed(4)), source: carbon.source }
      : unknown,
    maintenance: unknown,
    incentive: unknown,
    cost: unknown,
    escalationPct: { value: 0, source: OURS },
    discountPct: { value: 5, source: OURS },
    years: { value: 10, source: OURS },
  };
}

async function linesOf(jobId: string): Promise<SavingLine[]> {
  const areas = new Map(
    (await Area.findAll({ where: { jobId, archivedAt: null } })).map((one) => [one.id, one]),
  );
  const old = new Map((await ExistingLuminaire.findAll({ where: { jobId } })).map((one) => [one.id, one]));
  const changes = await ChangeLine.findAll({ where: { jobId, archivedAt: null } });
  const partIds = [...new Set(changes.flatMap((line) => (line.newPartId ? [line.newPartId] : [])))];
  const parts = new Map((await Part.findAll({ where: { id: partIds } })).map((one) => [one.id, one]));
  return changes
    .filter((line) => line.action !== 'leave' && areas.has(line.areaId))
    .map((line) => {
      const area = areas.get(line.areaId);
      const weeks = area?.details['weeksPerYear'];
      const sheetWatts = line.newPartId ? parts.get(line.newPartId)?.datasheet['watts'] : null;
      return {
        area: area?.name ?? '',
        hoursPerYear: hoursPerYear(
          area?.weeklyHours === null || area?.weeklyHours === undefined ? null : Number(area.weeklyHours),
          typeof weeks === 'number' ? weeks : null,
        ),
        oldQuantity: Number(line.oldQuantity),
        oldWatts: Number((line.existingLuminaireId && old.get(line.existingLuminaireId)?.watts) || 0),
        newQuantity: Number(line.newQuantity),
        newWatts: Number(line.newWatts ?? (typeof sheetWatts === 'number' ? sheetWatts : 0)),
      };
    });
}

/** Before tax, in currency units, of the newest quote that was sent. */
async function quotedCost(jobId: string): Promise<{ value: number; source: string } | null> {
  const sent = await latestDocument(jobId, 'quote');
  if (!sent) return null;
  const { totals, number, revision, settings } = await contentOf(sent.id);
  return {
    value: totals.netMinor / 10 ** (minorDigits(settings.currency) ?? 2),
    source: `quote ${number}, revision ${revision}, before tax`,
  };
}

export async function loadSaving(shopId: string, jobId: string) {
  return withShop(shopId, async () => {
    const job = await getJob(jobId);
    const settings = settingsOf(await getShop(shopId));
    const plan = await planOf(jobId);
    const assumptions = plan?.assumptions ?? (await startingPoint(jobId, settings.basis));
    const lines = await linesOf(jobId);
    const quoted = await quotedCost(jobId);
    return {
      job,
      settings,
      assumptions,
      version: plan?.version ?? null,
      changes: lines.length,
      quoted,
      figured: figureSaving(lines, assumptions, quoted?.value ?? null),
    };
  });
}
