/** What keeps a draft from being sent: pure. */
import type { Blocker, BlockerCode, DraftLine, LineChange, PricedSource } from './schema/lines';

export interface LineCheck {
  line: DraftLine;
  source: PricedSource | null;
  changes: LineChange[];
}

export function checkLines(
  lines: readonly DraftLine[],
  sources: readonly PricedSource[],
  changesOf: (line: DraftLine, source: PricedSource) => LineChange[],
): LineCheck[] {
  const bySource = new Map(sources.map((source) => [source.id, source]));
  return lines.map((line) => {
    const source = line.sourceId === null ? null : (bySource.get(line.sourceId) ?? null);
    return { line, source, changes: source ? changesOf(line, source) : [] };
  });
}

const block = (code: BlockerCode, line: DraftLine, values: Blocker['values'] = {}): Blocker => ({
  code,
  lineId: line.id,
  line: line.areaName ? `${line.areaName}: ${line.description}` : line.description,
  values,
});

function ofLine({ line, source, changes }: LineCheck): Blocker[] {
  if (line.source === 'typed') return [];
  if (!source) return [block('source-gone', line)];
  const found: Blocker[] = [];
  if (source.openStops > 0) found.push(block('open-stop', line, { count: source.openStops }));
  if (source.unpriced.length > 0) found.push(block('no-price', line, { count: source.unpriced.length }));
  if (changes.length > 0) found.push(block('out-of-date', line, { count: changes.length }));
  return found;
}

/**
 * @param acceptedRevision the revision that the customer has accepted: changes to it go another way.
 * @param totalMinor of the draft as it stands.
 */
export function blockersOf(
  checks: readonly LineCheck[],
  acceptedRevision: number | null,
  totalMinor: number,
): Blocker[] {
  const whole = (code: BlockerCode, values: Blocker['values'] = {}): Blocker => ({
    code,
    lineId: null,
    line: '',
    values,
  });
  const blockers: Blocker[] = [];
  if (acceptedRevision !== null) blockers.push(whole('accepted', { revision: acceptedRevision }));
  if (!checks.some((check) => !check.line.optional)) blockers.push(whole('no-lines'));
  else if (totalMinor <= 0) blockers.push(whole('nothing-to-charge'));
  return [...blockers, ...checks.flatMap(ofLine)];
}
