/** Puts a wiring sheet together from the job as it stands. Inside `withShop`. */
import * as z from 'zod/mini';
import { Area, ChangeLine, ExistingLuminaire, FindingOverride } from '@/models';
import { type SolvedCircuit, solvedCircuits } from '@/lib/circuits/queries';
import { ELECTRICAL } from '@/lib/circuits/schema/electrical';
import type { Answer } from '@/lib/engine/contract';
import type { JobWithSteps } from '@/lib/jobs/queries';
import { AppError, conflict } from '@/lib/platform/http/errors';
import { getShop, settingsOf } from '@/lib/shops/queries';
import { changeLinesForQuote } from '@/lib/surveys/queries';
import type { ShopSettings } from '@/lib/units/settings';
import { expectedReadings } from './schema/bands';
import { cautionsFor } from './schema/cautions';
import { RESULT, type SheetChange, type SheetCircuit, type WiringSheet, wiringSheet } from './schema/sheet';
import { type RetrofitWiring, stepsOfChange, stepsOfCircuit } from './schema/steps';

function circuitOf(circuit: SolvedCircuit, settings: ShopSettings): SheetCircuit {
  const { id, kind, name, areaName, answer } = circuit;
  const electrical = z.safeParse(ELECTRICAL[kind] as z.ZodMiniType, circuit.electrical);
  const result = z.safeParse(RESULT[kind] as z.ZodMiniType, answer?.result);
  if (!answer || !electrical.success || !result.success)
    throw conflict(`The circuit “${name}” is not figured yet: open it once more and save it.`);
  const readings = expectedReadings(kind, electrical.data, result.data, settings).map((reading) => ({
    id: `${id}.${reading.kind}.${reading.index}`,
    ...reading,
  }));
  return {
    id,
    kind,
    name,
    areaName,
    engine: answer.engine,
    electrical: electrical.data,
    result: result.data,
    steps: stepsOfCircuit(id, kind, electrical.data, result.data, settings),
    readings,
  } as SheetCircuit;
}

async function changesOf(jobId: string): Promise<SheetChange[]> {
  const answers = new Map(
    (await ChangeLine.findAll({ where: { jobId, archivedAt: null } })).map((line) => [
      line.id,
      line.answer as unknown as Answer<RetrofitWiring> | null,
    ]),
  );
  return (await changeLinesForQuote(jobId)).map(({ id, areaName, description }) => ({
    id,
    areaName,
    description,
    steps: stepsOfChange(id, answers.get(id)?.result ?? null),
  }));
}

interface Subject {
  name: string;
  answer: Answer | null;
}

/** Soft stops that stand on a licensed person's word: the crew reads whose, and why. */
async function overriddenOf(
  jobId: string,
  subjects: Map<string, Subject>,
): Promise<WiringSheet['overridden']> {
  const rows = await FindingOverride.findAll({ where: { jobId }, order: [['at', 'ASC']] });
  return rows.flatMap((row) => {
    const subject = subjects.get(row.subjectId);
    const finding = subject?.answer?.findings.find((one) => one.code === row.code && one.severity === 'stop');
    if (!subject || !finding) return [];
    const { code, message, values, basis } = finding;
    const { reason, personName, licenceNumber } = row;
    return [{ subject: subject.name, code, message, values, basis, reason, personName, licenceNumber }];
  });
}

async function subjectsOf(jobId: string, circuits: SolvedCircuit[], changes: SheetChange[]) {
  const subjects = new Map<string, Subject>(circuits.map(({ id, name, answer }) => [id, { name, answer }]));
  for (const line of await ChangeLine.findAll({ where: { jobId, archivedAt: null } }))
    subjects.set(line.id, {
      name: changes.find((one) => one.id === line.id)?.description ?? '',
      answer: line.answer as unknown as Answer | null,
    });
  return subjects;
}

async function siteFacts(jobId: string) {
  const areas = await Area.findAll({ where: { jobId, archivedAt: null }, order: [['position', 'ASC']] });
  const existing = await ExistingLuminaire.findAll({ where: { jobId, archivedAt: null } });
  const lines = await ChangeLine.findAll({ where: { jobId, archivedAt: null } });
  const shown = areas.map(({ name, environment, hazards, notes }) => ({
    name,
    environment,
    hazards: Object.entries(hazards)
      .flatMap(([hazard, said]) => (said === 'no' ? [] : [hazard]))
      .sort(),
    notes,
  }));
  const facts = {
    hazards: new Set(shown.flatMap((area) => area.hazards)),
    actions: new Set(lines.map((line) => line.action)),
    existing: existing.map((one) => one.electrical),
  };
  return { areas: shown, cautions: cautionsFor(facts) };
}

/**
 * @throws {AppError} `conflict` in words while the job is not ready: quote not accepted, a stop open, nothing to wire.
 */
export function checkReady({ facts }: JobWithSteps): void {
  if (facts.closed) throw conflict('This job is closed.');
  if (!facts.accepted)
    throw conflict('The customer has not accepted the quote yet: nothing is wired before.');
  if (facts.openStops > 0)
    throw conflict(
      facts.openStops === 1
        ? 'There is an open stop: clear it before the crew gets the sheet.'
        : `There are ${facts.openStops} open stops: clear them before the crew gets the sheet.`,
    );
}

export async function composeSheet(
  job: JobWithSteps,
  head: { shopId: string; revision: number; releasedBy: string; releasedAt: Date },
): Promise<WiringSheet> {
  const shop = await getShop(head.shopId);
  const settings = settingsOf(shop);
  const solved = await solvedCircuits(job.id);
  const circuits = solved
    .sort((a, b) => a.areaName.localeCompare(b.areaName) || a.name.localeCompare(b.name))
    .map((circuit) => circuitOf(circuit, settings));
  const changes = await changesOf(job.id);
  if (circuits.length + changes.length === 0)
    throw conflict('There is nothing to wire yet: no circuit and no change line.');
  const { basis, basisEdition, units, locale, timeZone } = settings;
  const sheet = {
    schema: 1,
    number: job.number,
    revision: head.revision,
    releasedAt: head.releasedAt.toISOString(),
    releasedBy: head.releasedBy,
    shopName: shop.name,
    job: { id: job.id, number: job.number, title: job.title },
    site: { name: job.siteName, address: job.siteAddress },
    settings: { basis, basisEdition, units, locale, timeZone },
    ...(await siteFacts(job.id)),
    circuits,
    changes,
    overridden: await overriddenOf(job.id, await subjectsOf(job.id, solved, changes)),
  };
  const parsed = z.safeParse(wiringSheet, sheet);
  if (!parsed.success)
    throw new AppError(
      'unexpected',
      `The sheet is not as it should be: ${JSON.stringify(parsed.error.issues)}`,
    );
  return parsed.data;
}
