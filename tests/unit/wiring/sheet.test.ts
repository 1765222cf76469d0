/** What follows from a sheet's events, which colours and cautions it shows, and that its texts are all there. */
import { describe, expect, it } from 'vitest';
import { type BranchCircuit, startingPoint, type TapeRun } from '@/lib/circuits/schema/electrical';
import { hasMessage, message, type MessageKey } from '@/lib/messages';
import { DEFAULT_SETTINGS } from '@/lib/units/settings';
import { cautionsFor } from '@/lib/wiring/schema/cautions';
import { mainsConductors } from '@/lib/wiring/schema/colours';
import { type Happening, progressOf } from '@/lib/wiring/schema/events';
import { stepsOfChange, stepsOfCircuit } from '@/lib/wiring/schema/steps';

const happened = (second: number, kind: Happening['kind'], body: object, by = 'L. Brandt'): Happening => ({
  id: `00000000-0000-4000-8000-00000000000${second}`,
  kind,
  body: { ...body },
  at: `2026-12-01T13:12:0${second}.000Z`,
  membershipId: by,
  personName: by,
});

describe('progress', () => {
  it('a tick taken back is no tick, ticked again it is; a second reading replaces the first', () => {
    const events = [
      happened(1, 'tick', { target: 'a' }),
      happened(2, 'untick', { target: 'a' }),
      happened(3, 'tick', { target: 'b' }),
      happened(4, 'reading', { target: 'r', value: 21.6, note: '' }),
      happened(5, 'reading', { target: 'r', value: 23.1, note: 'joint made again' }),
    ];
    const { ticks, readings } = progressOf(events);
    expect([...ticks.keys()]).toEqual(['b']);
    expect(readings.get('r')).toMatchObject({ value: 23.1, note: 'joint made again', by: 'L. Brandt' });
  });

  it('follows the clock of what happened, not the order in which it came', () => {
    const late = [happened(2, 'untick', { target: 'a' }), happened(1, 'tick', { target: 'a' })];
    expect(progressOf(late).ticks.size).toBe(0);
  });

  it('everybody acknowledges for themselves, by name', () => {
    const { acknowledged } = progressOf([happened(1, 'acknowledge', { name: 'Lena Brandt' })]);
    expect(acknowledged.get('L. Brandt')?.name).toBe('Lena Brandt');
    expect(acknowledged.has('T. Okafor')).toBe(false);
  });
});

describe('conductor colours', () => {
  const colours = (
    volts: number,
    basis: 'us' | 'iec',
    system: 'single-phase' | 'three-phase' = 'single-phase',
  ) => mainsConductors({ volts, system }, { basis }).map(({ role, colour }) => `${role} ${colour}`);

  // NEC 200.6, 250.119 for white, gray and green (read in a summary); hots: common practice. IEC 60445:2010.
  it.each([
    [120, 'us', ['line black', 'neutral white', 'ground green']],
    [240, 'us', ['line black', 'line-2 red', 'ground green']],
    [277, 'us', ['line brown', 'neutral gray', 'ground green']],
    [480, 'us', ['line brown', 'line-2 orange', 'ground green']],
    [230, 'iec', ['line brown', 'neutral blue', 'ground green-yellow']],
  ] as const)('%i V on the %s basis', (volts, basis, expected) => {
    expect(colours(volts, basis)).toEqual(expected);
  });

  it('of three phases', () => {
    expect(colours(400, 'iec', 'three-phase')).toEqual([
      'line brown',
      'line-2 black',
      'line-3 gray',
      'neutral blue',
      'ground green-yellow',
    ]);
  });
});

describe('cautions', () => {
  it('dead work and live readings always; more where the site gives reason', () => {
    const bare = cautionsFor({ hazards: new Set(), actions: new Set(['add']), existing: [] });
    expect(bare).toContain('crew.caution.dead.prove');
    expect(bare).not.toContain('crew.caution.ceiling');
    const full = cautionsFor({
      hazards: new Set(['suspectCeiling']),
      actions: new Set(['bypass']),
      existing: [{ ballast: 'magnetic', emergency: 'unswitched', dimmer: '0-10v' }],
    });
    for (const name of ['lampholder', 'ballast', 'lamps', 'ceiling', 'emergency', 'control-pair'])
      expect(full).toContain(`crew.caution.${name}`);
    expect(full.every(hasMessage)).toBe(true);
  });
});

describe('steps', () => {
  const branch = { ...startingPoint('branch-circuit', 'us'), luminaire: 'panel' } as BranchCircuit;
  const one = {
    units: [{ name: 'panel', quantity: 6 }],
    voltAmps: 1,
    amps: 1,
    breakerAmps: 20,
    size: 'AWG 12',
    dropPct: 1,
  };
  const tape = {
    ...startingPoint('tape-run', 'us'),
    feed: 'both',
    driver: { volts: 24, watts: 96, classTwo: true },
  } as TapeRun;
  const string = {
    leds: 3,
    ballastOhms: 130,
    ballastWatts: 0.05,
    ballastRatedWatts: 0.25,
    amps: 0.02,
    ampsMax: 0.03,
  };
  const all = [
    ...stepsOfCircuit('b', 'branch-circuit', branch, { circuits: [one, one] }, DEFAULT_SETTINGS),
    ...stepsOfCircuit('t', 'tape-run', tape, null, DEFAULT_SETTINGS),
    ...stepsOfCircuit(
      'a',
      'resistor-array',
      startingPoint('resistor-array', 'us'),
      { strings: [string, string] },
      DEFAULT_SETTINGS,
    ),
    ...stepsOfChange('c', {
      wiring: 'line-both-ends',
      lampholders: 'non-shunted',
      ballast: 'out',
      label: { lines: [{ key: 'label.no-fluorescent', values: {} }] },
    }),
    ...stepsOfChange('d', { wiring: 'line-one-end', lampholders: null, ballast: null, label: { lines: [] } }),
    ...stepsOfChange('e', {
      wiring: 'external-driver',
      lampholders: null,
      ballast: null,
      label: { lines: [] },
    }),
  ];

  it('each has an id of its own', () => {
    expect(new Set(all.map((step) => step.id)).size).toBe(all.length);
  });

  it('each has its text, with every value filled', () => {
    for (const step of all) {
      expect(hasMessage(step.key), step.key).toBe(true);
      const said = message(step.key as MessageKey, step.values, DEFAULT_SETTINGS);
      expect(said).not.toMatch(/[{}–]/);
      for (const line of step.lines) expect(hasMessage(line.key), line.key).toBe(true);
    }
    const said = all.map((step) => message(step.key as MessageKey, step.values, DEFAULT_SETTINGS));
    expect(said).toContain('Driver: set switch to 24.00 V.');
    expect(said).toContain('Feed at the far end: 16 AWG, colours as below.');
  });
});
