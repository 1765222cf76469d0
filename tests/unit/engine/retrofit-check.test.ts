/** retrofit-check: each finding with the change that raises it, and what it answers while little is known. */
import { describe, expect, it } from 'vitest';
import { EngineError } from '@/lib/engine/contract';
import { runCalculation } from '@/lib/engine/run';
import { retrofitFindings } from '@/lib/messages/en/findings-retrofit';
import { type RetrofitCheck, retrofitCheckCalculation } from '@/lib/sizing/retrofit-check';

type Input = Record<string, unknown>;

/** A bypass line with nothing against it but what a bypass always carries. */
const existing = {
  ballast: 'instant-start',
  lampholder: 'non-shunted',
  fedEnd: 'double',
  quantity: 10,
  voltAmps: 62,
};
const product = {
  listed: true,
  ratedVoltsMin: 120,
  ratedVoltsMax: 277,
  tubeType: 'B',
  fedEnd: 'double',
  voltAmps: 30,
  watts: 28,
  dimming: 'none',
  unitsPerBreaker: 20,
  inrushAmps: 5,
};
const line = {
  basis: 'us',
  action: 'bypass',
  quantity: 10,
  supplyVolts: 277,
  existing,
  product,
  control: { kind: 'switch', ratedInrushAmps: 60 },
  emergency: { kind: 'none' },
  breaker: { amps: 20 },
  hazards: { sharedNeutral: 'no', noIsolationPoint: 'no' },
};
const relampA = {
  action: 'relamp',
  product: {
    ...product,
    tubeType: 'A',
    fedEnd: null,
    ratedVoltsMin: null,
    ratedVoltsMax: null,
    ballastListed: 'yes',
  },
};
const newLuminaire = { action: 'new-luminaire', product: { ...product, tubeType: null, fedEnd: null } };

const check = (change: Input = {}) => {
  const answer = runCalculation(retrofitCheckCalculation, { ...line, ...change });
  return { ...answer, result: answer.result as RetrofitCheck };
};
const codes = (change: Input) => check(change).findings.map((finding) => finding.code);
const of = (part: Input, whole: Input = product) => ({ ...whole, ...part });

/** [code, severity: h(ard), s(oft), c(aution) or n(ote), the change that raises it] */
const RAISED: [string, 'h' | 's' | 'c' | 'n', Input][] = [
  ['product-missing', 's', { product: null }],
  ['supply-outside-rating', 'h', { supplyVolts: 480 }],
  ['supply-outside-rating', 'h', { supplyVolts: 24 }],
  ['supply-unknown', 'c', { supplyVolts: null }],
  ['rated-volts-missing', 's', { product: of({ ratedVoltsMin: null, ratedVoltsMax: null }) }],
  ['tube-type-against-ballast', 'h', { product: of({ tubeType: 'A' }) }],
  ['tube-type-against-ballast', 'h', { product: of({ tubeType: 'C' }) }],
  ['tube-type-against-ballast', 'h', { action: 'relamp' }],
  ['tube-type-against-ballast', 'h', { action: 'relamp', existing: { ...existing, ballast: 'unknown' } }],
  ['tube-type-against-ballast', 'h', { ...relampA, existing: { ...existing, ballast: 'none' } }],
  ['tube-type-against-ballast', 'h', { action: 'external-driver' }],
  ['tube-type-missing', 's', { product: of({ tubeType: null }) }],
  ['ballast-unknown', 's', { ...relampA, existing: { ...existing, ballast: 'unknown' } }],
  ['ballast-not-listed', 'h', { ...relampA, product: of({ ballastListed: 'no' }, relampA.product) }],
  [
    'ballast-not-listed',
    'h',
    { ...relampA, product: of({ ballastKinds: ['programmed-start'] }, relampA.product) },
  ],
  [
    'ballast-list-not-checked',
    'c',
    { ...relampA, product: of({ ballastListed: 'unknown' }, relampA.product) },
  ],
  ['starter-to-replace', 'n', { ...relampA, existing: { ...existing, ballast: 'magnetic' } }],
  [
    'lampholder-shunted',
    'h',
    { existing: { ...existing, lampholder: 'shunted' }, product: of({ fedEnd: 'single' }) },
  ],
  [
    'lampholder-shunted',
    'h',
    { existing: { ...existing, lampholder: 'shunted' }, product: of({ lampholders: 'non-shunted' }) },
  ],
  [
    'lampholder-unknown',
    's',
    { existing: { ...existing, lampholder: 'unknown' }, product: of({ fedEnd: 'single' }) },
  ],
  ['fed-end-missing', 's', { product: of({ fedEnd: null }) }],
  [
    'fed-end-mismatch',
    'h',
    { action: 'relamp', existing: { ...existing, ballast: 'none', fedEnd: 'single' } },
  ],
  [
    'fed-end-unknown',
    's',
    { action: 'relamp', existing: { ...existing, ballast: 'none', fedEnd: 'unknown' } },
  ],
  ['line-volts-at-lampholders', 'c', {}],
  ['one-mode-at-a-time', 'n', { product: of({ tubeType: 'A-B' }) }],
  ['unlisted-kit', 'h', { product: of({ listed: false }) }],
  ['unlisted-kit', 'h', { ...newLuminaire, product: of({ listed: false }, newLuminaire.product) }],
  ['field-built', 'n', { product: of({ listed: false }), buildingLighting: false }],
  ['kit-instructions', 'c', {}],
  ['emergency-unknown', 'c', { emergency: { kind: 'unknown' } }],
  ['emergency-on-switched-feed', 'h', { emergency: { kind: 'unswitched', feedAfter: 'switched' } }],
  [
    'emergency-on-switched-feed',
    'h',
    { action: 'relocate', emergency: { kind: 'generator', feedAfter: 'switched' } },
  ],
  ['emergency-feed-unknown', 's', { emergency: { kind: 'unswitched' } }],
  ['emergency-removed', 's', { action: 'remove', emergency: { kind: 'battery-pack' } }],
  [
    'emergency-ballast-stays',
    's',
    { emergency: { kind: 'battery-pack', feedAfter: 'unswitched', driverAfter: 'existing' } },
  ],
  ['emergency-driver-unknown', 'c', { emergency: { kind: 'battery-pack', feedAfter: 'unswitched' } }],
  ['egress-light', 'c', { quantity: 9 }],
  ['control-unknown', 'c', { control: { kind: 'unknown' } }],
  ['dimming-unknown', 's', { control: { kind: 'dali' }, product: of({ dimming: null }) }],
  [
    'dimmer-not-matched',
    's',
    { control: { kind: 'phase-forward' }, product: of({ dimming: 'phase-reverse' }) },
  ],
  ['dimmer-not-matched', 's', { control: { kind: 'phase-reverse' }, product: of({ dimming: '0-10v' }) }],
  ['dimming-lost', 'c', { control: { kind: '0-10v' } }],
  ['dimmer-list-not-checked', 'c', { control: { kind: 'phase-forward' }, product: of({ dimming: 'phase' }) }],
  ['dimmer-minimum-load', 'c', { control: { kind: 'sensor', minimumLoadWatts: 281 } }],
  ['control-pair-colours', 'c', { control: { kind: '0-10v' }, product: of({ dimming: '0-10v' }) }],
  ['step-switching', 'c', { control: { kind: 'step' } }],
  ['breaker-overloaded', 's', { breaker: { amps: 20, otherVoltAmps: 4133 } }],
  ['inrush-over-breaker', 's', { quantity: 21 }],
  ['inrush-not-checked', 'c', { product: of({ unitsPerBreaker: undefined }) }],
  ['inrush-over-control', 's', { control: { kind: 'sensor', ratedInrushAmps: 49 } }],
  ['control-inrush-not-checked', 'c', { control: { kind: 'sensor' } }],
  ['disconnect-missing', 'c', { hazards: { noIsolationPoint: 'yes' } }],
  ['disconnect-unknown', 'c', { hazards: {} }],
  ['shared-neutral', 'c', { hazards: { sharedNeutral: 'yes' } }],
  ['shared-neutral-unknown', 'c', { hazards: {} }],
  ['suspect-ballast', 'c', { hazards: { suspectBallasts: 'yes' } }],
  ['suspect-ceiling', 'c', { hazards: { suspectCeiling: 'yes' } }],
  ['no-equipment-ground', 'c', { hazards: { noEquipmentGround: 'yes' } }],
  ['aluminium-conductors', 'c', { hazards: { aluminiumConductors: 'yes' } }],
  ['old-wire', 'c', { hazards: { oldWireAboveLuminaires: 'yes' } }],
];

describe('findings', () => {
  it.each(RAISED)('%s (%s)', (code, weight, change) => {
    const finding = check(JSON.parse(JSON.stringify(change)) as Input).findings.find(
      (one) => one.code === code,
    );
    expect(finding && `${finding.hard ? 'hard ' : ''}${finding.severity}`).toBe(
      { h: 'hard stop', s: 'stop', c: 'caution', n: 'note' }[weight],
    );
  });

  it('are raised by the table above, all of them', () => {
    const texts = Object.keys(retrofitFindings).map((key) => key.split('.')[1] ?? '');
    const tried = new Set(RAISED.map(([code]) => code));
    expect(texts.filter((code) => !tried.has(code))).toEqual([]);
  });

  it('are but these on a line with nothing against it', () => {
    expect(codes({})).toEqual(['line-volts-at-lampholders', 'kit-instructions']);
    expect(codes(relampA)).toEqual([]);
    expect(codes(newLuminaire)).toEqual([]);
    expect(codes({ action: 'leave', product: null })).toEqual([]);
    expect(check().result.ok).toBe(true);
  });

  it('let both ends of the rated window and of every limit pass', () => {
    expect(codes({ supplyVolts: 120 })).not.toContain('supply-outside-rating');
    expect(codes({ quantity: 20, breaker: { amps: 20 } })).not.toContain('inrush-over-breaker');
    expect(codes({ control: { kind: 'sensor', ratedInrushAmps: 50 } })).not.toContain('inrush-over-control');
    expect(codes({ breaker: { amps: 20, otherVoltAmps: 277 * 16 - 300 } })).not.toContain(
      'breaker-overloaded',
    );
  });

  it('take new lampholders as the answer to shunted ones', () => {
    const shunted = { existing: { ...existing, lampholder: 'shunted' }, product: of({ fedEnd: 'single' }) };
    expect(codes({ ...shunted, lampholdersReplaced: true })).not.toContain('lampholder-shunted');
  });

  it('count only the units that stand on the breaker', () => {
    const { result, findings } = check({
      quantity: 40,
      breaker: { amps: 20, units: 20, otherVoltAmps: 100 },
    });
    expect(findings.map((finding) => finding.code)).not.toContain('inrush-over-breaker');
    expect(result.voltAmpsAfter).toBe(1200);
    expect(result.ampsAfter).toBeCloseTo((600 + 100) / 277, 12);
  });

  it('name no count for a D curve out of a figure for B16', () => {
    const iec = { basis: 'iec', supplyVolts: 230, breaker: { amps: 10, curve: 'D' } };
    const ofB16 = of({ unitsPerBreaker: undefined, unitsPerB16: 30, ratedVoltsMin: 220, ratedVoltsMax: 240 });
    expect(
      check(JSON.parse(JSON.stringify({ ...iec, product: ofB16 })) as Input).result.unitsByInrush,
    ).toBeNull();
  });
});

describe('result', () => {
  const result = (change: Input) => check(change).result;

  it.each([
    [{}, 'line-both-ends', 'either', 'out'],
    [{ product: of({ fedEnd: 'single' }) }, 'line-one-end', 'non-shunted', 'out'],
    [{ product: of({ fedEnd: null }) }, null, null, 'out'],
    [relampA, 'on-ballast', 'keep', 'stays'],
    [{ action: 'relamp', existing: { ...existing, ballast: 'none' } }, 'line-both-ends', 'either', 'none'],
    [
      { action: 'external-driver', product: of({ tubeType: 'C', fedEnd: null }) },
      'external-driver',
      null,
      'out',
    ],
    [{ action: 'listed-kit', product: newLuminaire.product }, 'kit', null, 'out'],
    [newLuminaire, 'luminaire', null, 'out'],
    [{ action: 'add', product: newLuminaire.product, existing: null }, 'luminaire', null, null],
    [{ action: 'remove', product: null }, 'removed', null, 'out'],
    [{ action: 'relocate', product: null }, 'unchanged', null, 'stays'],
    [{ action: 'leave', product: null }, 'unchanged', null, 'stays'],
  ])('%j', (change, wiring, lampholders, ballast) => {
    expect(result(change as Input)).toMatchObject({ wiring, lampholders, ballast });
  });

  it('says what the label must say, and when none is needed', () => {
    const keys = (change: Input) => result(change).label.lines.map((one) => one.key);
    expect(keys(relampA)).toEqual(['label.ballast-fed', 'label.modified-by']);
    expect(keys({ action: 'external-driver', product: of({ tubeType: 'C' }) })).toContain('label.driver-fed');
    expect(keys({ action: 'listed-kit' })).toContain('label.kit');
    expect(keys({ emergency: { kind: 'unswitched', feedAfter: 'unswitched' } })).toContain(
      'label.second-supply',
    );
    expect(result(newLuminaire).label).toEqual({ required: false, lines: [] });
    expect(result({ action: 'remove' }).label.required).toBe(false);
    expect(result({}).label.lines.find((one) => one.key === 'label.line-volts')?.text).toBe(
      'The lampholders carry 277 V.',
    );
  });

  it('says no wiring and no label for a tube that can not run there', () => {
    for (const change of [
      { action: 'relamp' },
      { product: of({ tubeType: 'A' }) },
      { action: 'external-driver' },
    ])
      expect(result(change)).toMatchObject({
        ok: false,
        wiring: null,
        lampholders: null,
        ballast: null,
        label: { required: false, lines: [] },
      });
  });

  it('keeps every key, with null where there is no figure', () => {
    const bare = runCalculation(retrofitCheckCalculation, {
      basis: 'iec',
      action: 'bypass',
      quantity: 0,
      supplyVolts: null,
    }).result as RetrofitCheck;
    expect(bare).toEqual({
      ok: false,
      wiring: null,
      lampholders: null,
      ballast: 'out',
      label: { required: false, lines: [] },
      voltAmpsBefore: null,
      voltAmpsAfter: null,
      ampsAfter: null,
      unitsByInrush: null,
      inrushAmps: null,
    });
  });
});

describe('refusals', () => {
  it.each([
    [{ product: of({ ratedVoltsMin: 300 }) }, 'product.ratedVoltsMin'],
    [{ product: of({ ratedVoltsMax: null }) }, 'product.ratedVoltsMax'],
    [{ quantity: 1.5 }, 'quantity'],
    [{ supplyVolts: -1 }, 'supplyVolts'],
    [{ action: 'repaint' }, 'action'],
    [{ existing: { ballast: 'magnetic' } }, 'existing.lampholder'],
    [{ hazards: { ghosts: 'yes' } }, 'hazards.ghosts'],
  ])('%j names %s', (change, path) => {
    try {
      check(change as Input);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(EngineError);
      expect((error as EngineError).issues.map((issue) => issue.path)).toEqual([path]);
    }
  });
});
