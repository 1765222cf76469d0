/** Jobs for the planner's tests: everyday figures, made from a seed. */
import type { TapePlanInput } from '@/lib/sizing/tape-plan-input';

/** Mulberry32: whole numbers only, the same everywhere. */
export function randomOf(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const VOLTS = 24;

/** One cut's load, the same watts at the full volts in three laws. */
function loadOf(model: string, amps: number): TapePlanInput['tape']['load'] {
  if (model === 'constant-current') return { model, amps };
  if (model === 'resistive') return { model, ohms: VOLTS / amps };
  // Six LEDs of about 3 V leave 5.7 V to their resistors.
  const ohms = 5.7 / amps;
  return {
    model: 'led-string',
    leds: 6,
    ballastOhms: ohms,
    saturationAmps: 1e-17,
    emissionCoefficient: 3.4,
    seriesOhms: 0.01 * ohms,
  };
}

export interface JobShape {
  runs: number;
  model?: 'constant-current' | 'resistive' | 'led-string';
  places?: number;
  /** Lengths of a segment to choose from. */
  cutMetres?: readonly number[];
  maxSections?: number;
}

/** A job of that many runs. Prices, lengths and distances vary; drivers of 60 to 200 W, limited and not. */
export function randomJob(seed: number, shape: JobShape): TapePlanInput {
  const { runs, model = 'constant-current', places = 2, cutMetres: cuts = [0.05, 0.0625, 0.1] } = shape;
  const random = randomOf(seed);
  const whole = (from: number, to: number) => from + Math.floor(random() * (to - from + 1));
  const pick = <T>(of: readonly T[]): T => of[whole(0, of.length - 1)] as T;
  const tenths = (from: number, to: number) => whole(from * 10, to * 10) / 10;
  const names = ['closet', 'ceiling', 'cellar'].slice(0, whole(1, places));
  const cutMetres = pick(cuts);
  const amps = (pick([4.8, 9.6, 14.4, 19.2]) * cutMetres) / VOLTS;
  return {
    basis: 'us',
    celsius: whole(30, 60),
    tape: {
      volts: VOLTS,
      cutMetres,
      railOhmsPerMetre: { positive: 0.03, negative: 0.03 },
      load: loadOf(model, amps),
      maxRunMetres: pick([5, 7, 10]),
    },
    runs: Array.from({ length: runs }, (_, r) => ({
      id: `run ${r + 1}`,
      metres: whole(16, 280) / 20,
      places: names
        .filter((_name, i) => i === 0 || random() < 0.7)
        .map((place) => ({
          place,
          startMetres: tenths(1, 15),
          ...(random() < 0.5 ? { endMetres: tenths(1, 15) } : {}),
        })),
    })),
    drivers: [
      { sku: 'L60', volts: VOLTS, channels: 1, channelWatts: 60, classLimited: true, cost: whole(30, 45) },
      { sku: 'L96', volts: VOLTS, channels: 1, channelWatts: 96, classLimited: true, cost: whole(42, 62) },
      {
        sku: 'L96-n',
        volts: VOLTS,
        channels: whole(2, 4),
        channelWatts: 96,
        classLimited: true,
        cost: whole(100, 160),
      },
      ...(random() < 0.5
        ? [
            {
              sku: 'N200',
              volts: VOLTS,
              channels: 1,
              channelWatts: 200,
              classLimited: false,
              cost: whole(70, 100),
            },
          ]
        : []),
    ],
    conductors: [
      { size: 'AWG 18', stranding: 'stranded', costPerMetre: 0.6 },
      { size: 'AWG 16', stranding: 'stranded', costPerMetre: 0.9 },
      { size: 'AWG 14', stranding: 'stranded', costPerMetre: 1.3 },
      { size: 'AWG 12', stranding: 'stranded', costPerMetre: 2 },
    ],
    labour: {
      ratePerHour: pick([20, 60, 85]),
      hoursPerFeed: pick([0.05, 0.2, 0.3]),
      hoursPerDriver: 0.5,
      hoursPerMetre: pick([0, 0.02, 0.04]),
    },
    limits: {
      maxDropPct: pick([3, 5]),
      minDimmestPct: 85,
      loadFraction: 0.8,
      ...(shape.maxSections === undefined ? {} : { maxSections: shape.maxSections }),
    },
  };
}
