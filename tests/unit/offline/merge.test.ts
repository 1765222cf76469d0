/** Two people on one entry: what each changed, what both did, and what stands after a choice. */
import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { clashesOf, merged, nothingLeft } from '@/lib/offline/merge';
import type { Entity } from '@/lib/offline/protocol';
import type { QueuedEvent } from '@/lib/offline/store';

type Data = Record<string, unknown>;

const event = (base: Data | null, body: Data, more: Partial<QueuedEvent> = {}): QueuedEvent => ({
  id: 'e',
  scope: 's',
  collection: 'areas',
  kind: 'areas.put',
  entityId: 'a',
  baseVersion: null,
  at: '2026-12-01T10:00:00Z',
  state: 'sending',
  base,
  body,
  ...more,
});
const theirs = (data: Data, more: Partial<Entity> = {}): Entity => ({
  collection: 'areas',
  id: 'a',
  version: 3,
  archived: false,
  data,
  ...more,
});

const base = { name: 'Bay', use: '', width: 4, details: { ceiling: 'tiles', paint: 'white' } };

describe('two people changed one entry', () => {
  it('different fields: both stand, also inside of one group, and there is nothing to choose', () => {
    const mine = event(base, { ...base, use: 'Storage', details: { ...base.details, paint: 'grey' } });
    const other = theirs({ ...base, width: 5, details: { ...base.details, ceiling: 'open' } });
    expect(clashesOf(mine, other)).toEqual([]);
    const both = {
      name: 'Bay',
      use: 'Storage',
      width: 5,
      details: { ceiling: 'open', paint: 'grey' },
    };
    expect(merged(mine, other, 'mine')).toEqual(both);
    expect(merged(mine, other, 'theirs')).toEqual(both);
  });

  it('one field: named with both values; the rest of either stands whatever is chosen', () => {
    const mine = event(base, { ...base, use: 'Storage', name: 'Bay 1' });
    const other = theirs({ ...base, use: 'Parking', width: 5 });
    expect(clashesOf(mine, other)).toEqual([{ path: 'use', mine: 'Storage', theirs: 'Parking' }]);
    expect(merged(mine, other, 'mine')).toEqual({ ...base, name: 'Bay 1', use: 'Storage', width: 5 });
    expect(merged(mine, other, 'theirs')).toEqual({ ...base, name: 'Bay 1', use: 'Parking', width: 5 });
  });

  it('the same change twice is no clash, and nothing is left to send', () => {
    const mine = event(base, { ...base, use: 'Storage' });
    const other = theirs({ ...base, use: 'Storage', figured: 7 });
    expect(clashesOf(mine, other)).toEqual([]);
    expect(nothingLeft(mine, other)).toBe(true);
    expect(nothingLeft(mine, theirs({ ...base, use: 'Parking' }))).toBe(false);
  });

  it('a group that one emptied and the other filled in is a clash', () => {
    const mine = event(base, { ...base, details: null });
    const other = theirs({ ...base, details: { ...base.details, paint: 'grey' } });
    expect(clashesOf(mine, other).map(({ path }) => path)).toEqual(['details']);
    expect(merged(mine, other, 'mine')['details']).toBeNull();
    expect(merged(mine, other, 'theirs')['details']).toEqual({ ceiling: 'tiles', paint: 'grey' });
  });

  it('a circuit is never made of half of each: every field that differs is shown, and one of them stands whole', () => {
    const begun = { volts: 24, gauge: 18 };
    const mine = event(begun, { volts: 12, gauge: 18 }, { collection: 'circuits', kind: 'circuits.put' });
    const other = theirs({ volts: 24, gauge: 14 });
    expect(clashesOf(mine, other).map(({ path }) => path)).toEqual(['volts', 'gauge']);
    expect(merged(mine, other, 'mine')).toEqual({ volts: 12, gauge: 18 });
    expect(merged(mine, other, 'theirs')).toEqual({ volts: 24, gauge: 14 });
  });

  it('no field that either changed alone is lost, and a choice settles each that both did (any entries)', () => {
    const values = fc.constantFrom('a', 'b', 'c', null);
    const entry = fc.record({
      one: values,
      two: values,
      group: fc.record({ three: values, four: values }),
    });
    fc.assert(
      fc.property(entry, entry, entry, (begun, my, their) => {
        const mine = event(begun, my);
        const other = theirs(their);
        const flat = (data: typeof begun) => ({ one: data.one, two: data.two, ...data.group });
        const [b, m, t] = [flat(begun), flat(my), flat(their)];
        for (const winner of ['mine', 'theirs'] as const) {
          const result = flat(merged(mine, other, winner) as typeof begun);
          for (const key of Object.keys(b) as (keyof typeof b)[]) {
            const wanted =
              m[key] === b[key] ? t[key] : t[key] === b[key] || winner === 'mine' ? m[key] : t[key];
            expect(result[key]).toBe(wanted);
          }
        }
        const clashing = (Object.keys(b) as (keyof typeof b)[]).filter(
          (key) => m[key] !== b[key] && t[key] !== b[key] && m[key] !== t[key],
        );
        expect(
          clashesOf(mine, other)
            .map(({ path }) => path.split('.').at(-1))
            .sort(),
        ).toEqual(clashing.sort());
      }),
      { seed: 20261201, numRuns: 500 },
    );
  });
});
