/** How a sourced line differs from its source now: pure. */
import Decimal from 'decimal.js';
import type { DraftLine, LineChange, PricedSource } from './schema/lines';

const differs = (a: string, b: string) => !new Decimal(a).equals(b);

/**
 * An edited description stays the line's own: only when the source's words changed since is it out of date.
 * @returns [] when the line is up to date. `figures` stands for a change that shows in no field of the line.
 */
export function changesOf(line: DraftLine, source: PricedSource): LineChange[] {
  const changes: LineChange[] = [];
  if (line.sourceDescription !== source.description)
    changes.push({ what: 'description', before: line.description, after: source.description });
  if (line.areaName !== source.areaName)
    changes.push({ what: 'area', before: line.areaName, after: source.areaName });
  if (differs(line.unitCost, source.unitCost))
    changes.push({ what: 'parts-cost', before: line.unitCost, after: source.unitCost });
  if (differs(line.unitLabourHours, source.labourHours))
    changes.push({ what: 'hours', before: line.unitLabourHours, after: source.labourHours });
  if (changes.length === 0 && line.sourceSha256 !== source.sourceSha256)
    changes.push({ what: 'figures', before: '', after: '' });
  return changes;
}

/** What a line takes over from its source. */
export function fieldsFrom(source: PricedSource) {
  return {
    source: source.kind,
    sourceId: source.id,
    sourceSha256: source.sourceSha256,
    sourceDescription: source.description,
    areaName: source.areaName,
    description: source.description.slice(0, 500),
    quantity: '1',
    unitCost: source.unitCost,
    unitLabourHours: source.labourHours,
  };
}
