/**
 * retrofit-check against what was read (tests/reference/data/retrofit.json names each source): driver counts per
 * breaker from a printed table, trip bands of IEC 60898-1 from a summary, tube types and lampholders from guides,
 * listing from UL 1598C's scope. inrush-method is from memory and only shows the arithmetic.
 */
import { describe, expect, it } from 'vitest';
import { runCalculation } from '@/lib/engine/run';
import { type RetrofitCheck, retrofitCheckCalculation } from '@/lib/sizing/retrofit-check';
import { INSTANT_TRIP } from '@/lib/sizing/tables/breakers';
import entries from './data/retrofit.json';

type Entry = { id: string; inputs: Record<string, unknown>; expected: Record<string, unknown> };
const all = entries as unknown as Entry[];
const expected = (id: string) => {
  const found = all.find((one) => one.id === id);
  if (!found) throw new Error(id);
  return found;
};

const product = {
  listed: true,
  ratedVoltsMin: 100,
  ratedVoltsMax: 277,
  tubeType: null as string | null,
  fedEnd: null as string | null,
};
const existing = { ballast: 'instant-start', lampholder: 'non-shunted' };
const check = (input: Record<string, unknown>) => {
  const answer = runCalculation(retrofitCheckCalculation, {
    basis: 'us',
    action: 'new-luminaire',
    quantity: 1,
    supplyVolts: 120,
    existing,
    product,
    ...input,
  });
  return { ...answer, result: answer.result as RetrofitCheck };
};
const hard = (input: Record<string, unknown>) =>
  check(input)
    .findings.filter((finding) => finding.hard)
    .map((finding) => finding.code);

describe('inrush on a breaker', () => {
  it.each(['B', 'C', 'D'] as const)('%s holds to the lower end of its trip band', (curve) => {
    expect(INSTANT_TRIP[curve]).toBe(expected(`mcb-band-${curve}`).expected['no_trip_xIn']);
  });

  // The table prints percents of C16 = 100, so that B16 = 60: cut to whole units as counts are.
  it.each(all.filter((one) => /^mcb-rel-[BC]\d/.test(one.id)))('$id', ({ inputs, expected: printed }) => {
    const mcb = String(inputs['mcb']);
    const { result } = check({
      basis: 'iec',
      supplyVolts: 230,
      product: { ...product, unitsPerB16: 60 },
      breaker: { curve: mcb[0], amps: Number(mcb.slice(1)) },
    });
    expect(result.unitsByInrush).toBe(printed['percent']);
  });

  it.each(Object.entries(expected('inrush-method').expected))(
    'from peak and pulse factor: %s',
    (_, example) => {
      const { mcb, Ipk, k, N } = example as { mcb: string; Ipk: number; k: number; N: number };
      const { result } = check({
        basis: 'iec',
        supplyVolts: 230,
        product: { ...product, inrushAmps: Ipk, pulseFactor: k },
        breaker: { curve: mcb[0], amps: Number(mcb.slice(1)) },
      });
      expect(result.unitsByInrush).toBe(N);
    },
  );

  it('cont-fixtures: a 20 A breaker carries eight luminaires of 2 A, not nine', () => {
    const most = expected('cont-fixtures').expected['max_count'] as number;
    const codes = (quantity: number) =>
      check({ quantity, product: { ...product, voltAmps: 240 }, breaker: { amps: 20 } }).findings.map(
        (finding) => finding.code,
      );
    expect(codes(most)).not.toContain('breaker-overloaded');
    expect(codes(most + 1)).toContain('breaker-overloaded');
  });
});

describe('tubes and lampholders (SA-09, CP-05, CP-06)', () => {
  const tube = (tubeType: string, fedEnd: string | null = null) => ({ ...product, tubeType, fedEnd });

  it('A runs on a compatible ballast, B on the supply, A-B on either, C on an external driver', () => {
    const fits = (action: string, type: string) =>
      !hard({ action, product: { ...tube(type, 'double'), ballastListed: 'yes' } }).includes(
        'tube-type-against-ballast',
      );
    const types = ['A', 'B', 'A-B', 'C'];
    expect(types.filter((type) => fits('relamp', type))).toEqual(['A', 'A-B']);
    expect(types.filter((type) => fits('bypass', type))).toEqual(['B', 'A-B']);
    expect(types.filter((type) => fits('external-driver', type))).toEqual(['C']);
  });

  it('single-ended in a shunted lampholder is a dead short; double-ended takes either', () => {
    const shunted = { ...existing, lampholder: 'shunted' };
    expect(hard({ action: 'bypass', existing: shunted, product: tube('B', 'single') })).toEqual([
      'lampholder-shunted',
    ]);
    expect(hard({ action: 'bypass', existing: shunted, product: tube('B', 'double') })).toEqual([]);
    expect(hard({ action: 'bypass', product: tube('B', 'single') })).toEqual([]);
  });

  it('a ballast that the maker does not list is refused; a magnetic one unless it is listed', () => {
    const on = (ballast: string, ballastListed?: string) =>
      hard({
        action: 'relamp',
        existing: { ...existing, ballast },
        product: { ...tube('A'), ...(ballastListed ? { ballastListed } : {}) },
      });
    expect(on('instant-start', 'no')).toEqual(['ballast-not-listed']);
    expect(on('magnetic')).toEqual(['ballast-not-listed']);
    expect(on('magnetic', 'yes')).toEqual([]);
    expect(on('instant-start')).toEqual([]);
  });

  it('a rewired luminaire gets a label that keeps fluorescent lamps out (CP-07)', () => {
    const { result } = check({ action: 'bypass', product: tube('B', 'double') });
    expect(result.label.required).toBe(true);
    expect(result.label.lines.map((one) => one.key)).toEqual([
      'label.no-fluorescent',
      'label.line-volts',
      'label.fed-double',
      'label.replace-with',
      'label.modified-by',
    ]);
  });
});

describe('listing, emergency feed, control pair', () => {
  it('SA-10, CP-08: an unlisted kit is not sold as building lighting', () => {
    const unlisted = { action: 'listed-kit', product: { ...product, listed: false } };
    expect(hard(unlisted)).toEqual(['unlisted-kit']);
    expect(hard({ ...unlisted, buildingLighting: false })).toEqual([]);
  });

  it('CP-09: an emergency unit never goes on a switched feed', () => {
    const fed = (kind: string, feedAfter: string) => hard({ emergency: { kind, feedAfter } });
    for (const kind of ['unswitched', 'battery-pack', 'generator']) {
      expect(fed(kind, 'switched')).toEqual(['emergency-on-switched-feed']);
      expect(fed(kind, 'unswitched')).toEqual([]);
    }
  });

  it('CP-03, CP-26: an old dimmer and a gray control wire are said', () => {
    const codes = (kind: string, dimming: string) =>
      check({ control: { kind }, product: { ...product, dimming } }).findings.map((finding) => finding.code);
    expect(codes('phase-forward', 'none')).toContain('dimmer-not-matched');
    expect(codes('phase-forward', 'phase')).toContain('dimmer-list-not-checked');
    expect(codes('0-10v', '0-10v')).toContain('control-pair-colours');
  });

  it('SA-04: a ballast without its "No PCBs" mark is said where ballasts come out', () => {
    const codes = (action: string) =>
      check({ action, hazards: { suspectBallasts: 'yes' } }).findings.map((finding) => finding.code);
    expect(codes('new-luminaire')).toContain('suspect-ballast');
    expect(codes('relocate')).not.toContain('suspect-ballast');
  });
});
