/** A job's one draft, as the desk sees it. All must run inside `withShop`. */
import { select } from '@/lib/platform/db';
import { getShop, settingsOf } from '@/lib/shops/queries';
import type { ShopSettings } from '@/lib/units/settings';
import { blockersOf, checkLines, type LineCheck } from '../blockers';
import { livePorts } from '../ports';
import { type DraftFigures, priceDraft } from '../pricing';
import type { Blocker, DraftLine, DraftTerms, PricedSource } from '../schema/lines';
import { pricedSources, type SourcePorts } from '../sources';
import { changesOf } from '../stale';
import { acceptedRevision } from './sent';

const TERMS = `
  id, job_id as "jobId", deposit_pct as "depositPct", discount_pct as "discountPct", overhead_pct as "overheadPct",
  contingency_pct as "contingencyPct", tax_name as "taxName", tax_rate_pct as "taxRatePct",
  valid_days as "validDays", scope_note as "scopeNote", exclusions, prices_at as "pricesAt", version`;
const LINE = `
  id, position, source, source_id as "sourceId", source_sha256 as "sourceSha256",
  source_description as "sourceDescription", area_name as "areaName", description, quantity,
  unit_cost as "unitCost", unit_labour_hours as "unitLabourHours", labour_rate as "labourRate",
  markup_pct as "markupPct", taxable, optional, chosen, version`;

export async function findDraft(jobId: string): Promise<DraftTerms | null> {
  const rows = await select<DraftTerms>(`select ${TERMS} from quote_drafts where job_id = $1`, [jobId]);
  return rows[0] ?? null;
}

export async function linesOfDraft(draftId: string): Promise<DraftLine[]> {
  return select<DraftLine>(`select ${LINE} from quote_lines where draft_id = $1 order by position, id`, [
    draftId,
  ]);
}

async function depositApplies(jobId: string): Promise<boolean> {
  const rows = await select<{ rule: string }>('select deposit_rule as rule from jobs where id = $1', [jobId]);
  return rows[0]?.rule === 'percent';
}

export interface DraftState {
  terms: DraftTerms;
  /** As asked for: 0 where the job has no deposit or runs on terms. */
  depositPct: string;
  lines: DraftLine[];
  checks: LineCheck[];
  /** Change lines and circuits that the draft leaves out. */
  unused: PricedSource[];
  figures: DraftFigures;
  blockers: Blocker[];
  settings: ShopSettings;
}

/** Everything about a draft, cost included: pages for those who may not see cost take `forReader`. */
export async function draftState(
  shopId: string,
  jobId: string,
  ports: SourcePorts = livePorts,
): Promise<DraftState | null> {
  const terms = await findDraft(jobId);
  if (!terms) return null;
  const settings = settingsOf(await getShop(shopId));
  const lines = await linesOfDraft(terms.id);
  const sources = await pricedSources(ports, jobId, new Date());
  const checks = checkLines(lines, sources, changesOf);
  const depositPct = (await depositApplies(jobId)) ? terms.depositPct : '0';
  const figures = priceDraft({ ...terms, depositPct }, lines, settings);
  const used = new Set(lines.map((line) => line.sourceId));
  return {
    terms,
    depositPct,
    lines,
    checks,
    unused: sources.filter((source) => !used.has(source.id)),
    figures,
    blockers: blockersOf(checks, await acceptedRevision(jobId), figures.totals.totalMinor),
    settings,
  };
}
