/**
 * The wiring sheet as it is frozen: an explicit list of fields, of which none is money. Phones load it (zod/mini).
 */
import * as z from 'zod/mini';
import { branchCircuit, resistorArray, tapeRun } from '@/lib/circuits/schema/electrical';
import { conductor } from './colours';

const figure = z.number();
const figureOrNone = z.nullable(z.number());
const text = z.string();

/** Something to do and to tick. The text is the catalogue's, with these values. */
export const step = z.strictObject({
  id: text,
  key: text,
  values: z.record(z.string(), z.union([z.string(), z.number()])),
  conductors: z.array(conductor),
  conductorSource: text,
  /** Lines to be written or shown as they are, such as the label that stays in the fixture. */
  lines: z.array(
    z.strictObject({
      key: text,
      values: z.record(z.string(), z.nullable(z.union([z.string(), z.number()]))),
    }),
  ),
});
export type Step = z.infer<typeof step>;

export const expectedReading = z.strictObject({
  id: text,
  kind: z.enum(['volts-start', 'volts-middle', 'volts-end', 'driver-amps', 'breaker-amps', 'string-amps']),
  index: figure,
  unit: z.enum(['V', 'A']),
  mains: z.boolean(),
  nominal: figure,
  low: figure,
  high: figure,
});
export type ExpectedReading = z.infer<typeof expectedReading>;

const tapeResult = z.object({
  feeds: z.array(z.object({ amps: figure, watts: figure })),
  loadVolts: z.array(figure),
  loadAmps: z.array(figure),
  minVolts: figure,
  maxVolts: figure,
  worstDropPct: figure,
  dimmestPct: figureOrNone,
  totalWatts: figure,
});
const branchResult = z.object({
  circuits: z.array(
    z.object({
      units: z.array(z.object({ name: text, quantity: figure })),
      voltAmps: figure,
      amps: figure,
      breakerAmps: figureOrNone,
      size: z.nullable(text),
      dropPct: figureOrNone,
    }),
  ),
});
const arrayResult = z.object({
  perString: figureOrNone,
  strings: z.nullable(
    z.array(
      z.object({
        leds: figure,
        ballastOhms: figureOrNone,
        ballastWatts: figureOrNone,
        ballastRatedWatts: figureOrNone,
        amps: figureOrNone,
        ampsMax: figureOrNone,
      }),
    ),
  ),
  supplyAmps: figureOrNone,
  efficiency: figureOrNone,
});

/** Only what the drawing and the steps need of an engine's answer: the rest of it is dropped here. */
export const RESULT = {
  'tape-run': tapeResult,
  'branch-circuit': branchResult,
  'resistor-array': arrayResult,
} as const;

const circuitParts = {
  id: text,
  areaName: text,
  name: text,
  engine: text,
  steps: z.array(step),
  readings: z.array(expectedReading),
};

export const sheetCircuit = z.discriminatedUnion('kind', [
  z.strictObject({ ...circuitParts, kind: z.literal('tape-run'), electrical: tapeRun, result: tapeResult }),
  z.strictObject({
    ...circuitParts,
    kind: z.literal('branch-circuit'),
    electrical: branchCircuit,
    result: branchResult,
  }),
  z.strictObject({
    ...circuitParts,
    kind: z.literal('resistor-array'),
    electrical: resistorArray,
    result: arrayResult,
  }),
]);
export type SheetCircuit = z.infer<typeof sheetCircuit>;

export const sheetChange = z.strictObject({
  id: text,
  areaName: text,
  description: text,
  steps: z.array(step),
});
export type SheetChange = z.infer<typeof sheetChange>;

export const overridden = z.strictObject({
  /** The circuit's or line's name, as the sheet shows it. */
  subject: text,
  code: text,
  message: text,
  values: z.record(z.string(), z.nullable(z.union([z.string(), z.number()]))),
  basis: text,
  reason: text,
  personName: text,
  licenceNumber: text,
});

export const wiringSheet = z.strictObject({
  schema: z.literal(1),
  number: text,
  revision: figure,
  releasedAt: text,
  releasedBy: text,
  shopName: text,
  job: z.strictObject({ id: text, number: text, title: text }),
  site: z.strictObject({ name: text, address: text }),
  settings: z.strictObject({
    basis: z.enum(['us', 'iec']),
    basisEdition: text,
    units: z.enum(['us', 'metric']),
    locale: z.enum(['en-US', 'en-GB']),
    timeZone: text,
  }),
  areas: z.array(z.strictObject({ name: text, environment: text, hazards: z.array(text), notes: text })),
  /** Keys of the catalogue, in the order in which they are read. */
  cautions: z.array(text),
  circuits: z.array(sheetCircuit),
  changes: z.array(sheetChange),
  overridden: z.array(overridden),
});
export type WiringSheet = z.infer<typeof wiringSheet>;

export const stepsOfSheet = (sheet: WiringSheet): Step[] => [
  ...sheet.circuits.flatMap((circuit) => circuit.steps),
  ...sheet.changes.flatMap((change) => change.steps),
];
export const readingsOfSheet = (sheet: WiringSheet): ExpectedReading[] =>
  sheet.circuits.flatMap((circuit) => circuit.readings);
