/** What a phone needs to work on a survey with no signal, and what a quote takes from it. Inside `withShop`. */
import { Area, Circuit, ChangeLine, Cove, ExistingLuminaire, Part } from '@/models';
import { partFigures } from '@/lib/parts/queries';
import type { Entity } from '@/lib/offline/protocol';
import { withShop } from '@/lib/platform/db';
import { canonical, sha256 } from '@/lib/platform/http/hash';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { getJob } from '@/lib/jobs/queries';
import { SHOP_WIDE, TABLES, toEntity } from './collections';
import { type Collection, COLLECTIONS } from './schema';
import { describeChange } from './describe';

export async function surveySnapshot(shopId: string, jobId: string) {
  const job = await getJob(jobId);
  const shop = await getShop(shopId);
  const entities: Entity[] = [];
  for (const collection of Object.keys(COLLECTIONS) as Collection[]) {
    const where = SHOP_WIDE.has(collection) ? { archivedAt: null } : { jobId, archivedAt: null };
    const rows = await TABLES[collection].findAll({ where });
    entities.push(...rows.map((row) => toEntity(collection, row.get({ plain: true }) as never)));
  }
  return {
    entities,
    settings: settingsOf(shop),
    benchWork: shop.benchWork,
    parts: await partFigures(),
    job: {
      id: job.id,
      number: job.number,
      title: job.title,
      siteName: job.siteName,
      surveyDone: job.facts.surveyDone,
    },
    takenAt: new Date().toISOString(),
  };
}

export interface QuoteSource {
  id: string;
  areaName: string;
  /** Plain words for the customer. */
  description: string;
  openStops: number;
  parts: { partId: string; quantity: string }[];
  labourHours: string;
  /** Changes when anything that the quote line was made from changes. */
  sourceSha256: string;
}

async function areaNames(jobId: string): Promise<Map<string, { name: string; position: number }>> {
  const areas = await Area.findAll({ where: { jobId } });
  return new Map(areas.map((area) => [area.id, { name: area.name, position: area.position }]));
}

/** Change lines that are not part of a circuit of their own: those are quoted with the circuit. */
export async function changeLinesForQuote(jobId: string): Promise<QuoteSource[]> {
  const areas = await areaNames(jobId);
  const lines = await ChangeLine.findAll({ where: { jobId, archivedAt: null, circuitId: null } });
  const existing = new Map(
    (await ExistingLuminaire.findAll({ where: { jobId } })).map((one) => [one.id, one]),
  );
  const partIds = [...new Set(lines.flatMap((line) => (line.newPartId ? [line.newPartId] : [])))];
  const parts = new Map((await Part.findAll({ where: { id: partIds } })).map((part) => [part.id, part]));
  return lines
    .filter((line) => line.action !== 'leave')
    .sort(
      (a, b) =>
        (areas.get(a.areaId)?.position ?? 0) - (areas.get(b.areaId)?.position ?? 0) ||
        a.position - b.position,
    )
    .map((line) => {
      const part = line.newPartId ? parts.get(line.newPartId) : undefined;
      const old = line.existingLuminaireId ? existing.get(line.existingLuminaireId) : undefined;
      const source = {
        id: line.id,
        areaName: areas.get(line.areaId)?.name ?? '',
        description: describeChange(line, old?.luminaireType ?? null, part?.name ?? null),
        openStops: line.openStops,
        parts: part && Number(line.newQuantity) > 0 ? [{ partId: part.id, quantity: line.newQuantity }] : [],
        labourHours: (Number(line.newQuantity) * Number(part?.labourHours ?? 0)).toFixed(4),
      };
      return { ...source, sourceSha256: sha256(canonical({ ...source, openStops: 0 })) };
    });
}

/** Counts that were estimated and not counted: a quote states which. */
export async function assumedCounts(
  jobId: string,
): Promise<{ area: string; type: string; quantity: string }[]> {
  const areas = await areaNames(jobId);
  const rows = await ExistingLuminaire.findAll({
    where: { jobId, archivedAt: null, countConfidence: 'estimated' },
  });
  return rows.map((row) => ({
    area: areas.get(row.areaId)?.name ?? '',
    type: row.luminaireType,
    quantity: String(Number(row.quantity)),
  }));
}

export async function coveNames(jobId: string): Promise<Map<string, string>> {
  return new Map((await Cove.findAll({ where: { jobId } })).map((one) => [one.id, one.name]));
}

export const circuitCount = (jobId: string): Promise<number> =>
  Circuit.count({ where: { jobId, archivedAt: null } });

/** For the phone's route: opens the shop itself. */
export const loadSurvey = (shopId: string, jobId: string) =>
  withShop(shopId, () => surveySnapshot(shopId, jobId));
