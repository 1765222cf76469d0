/** Parts by kind with the datasheet figures that the engine needs. zod/mini: phones load it. */
import * as z from 'zod/mini';

export const PART_KINDS = [
  'luminaire',
  'lamp',
  'kit',
  'tape',
  'driver',
  'cable',
  'resistor',
  'led',
  'channel',
  'connector',
  'label',
  'other',
] as const;
export type PartKind = (typeof PART_KINDS)[number];

const positive = z.number().check(z.positive('must be greater than zero'));
const notNegative = z.number().check(z.nonnegative('must not be negative'));

export const tapeDatasheet = z.strictObject({
  ratedVolts: positive,
  wattsPerMetre: positive,
  cutMetres: positive,
  railOhmsPerMetre: z.strictObject({ positive: notNegative, negative: notNegative }),
  /** Current of one cut at rated volts; the tape regulates it down to dropoutVolts, or follows its resistors. */
  load: z.discriminatedUnion('model', [
    z.strictObject({
      model: z.literal('constant-current'),
      amps: positive,
      dropoutVolts: z.optional(notNegative),
    }),
    z.strictObject({ model: z.literal('resistive'), ohms: positive }),
    z.strictObject({
      model: z.literal('led-string'),
      leds: z.number().check(z.int(), z.positive()),
      ballastOhms: notNegative,
      saturationAmps: positive,
      emissionCoefficient: positive,
      seriesOhms: notNegative,
    }),
  ]),
  longestRunMetres: z.nullable(positive),
  lumensPerMetre: z.nullable(positive),
});
export type TapeDatasheet = z.infer<typeof tapeDatasheet>;

export const driverDatasheet = z.strictObject({
  outputVolts: positive,
  outputWatts: positive,
  classTwo: z.boolean(),
  inputVoltsMin: positive,
  inputVoltsMax: positive,
  inrushAmps: z.nullable(positive),
});
export type DriverDatasheet = z.infer<typeof driverDatasheet>;

export const luminaireDatasheet = z.strictObject({
  watts: positive,
  voltAmps: positive,
  lumens: z.nullable(positive),
  inputVoltsMin: positive,
  inputVoltsMax: positive,
  inrushAmps: z.nullable(positive),
  unitsPerB16: z.nullable(positive),
  unitsPerBreaker: z.nullable(positive),
  tubeType: z.nullable(z.enum(['A', 'B', 'A-B', 'C'])),
  fedEnd: z.nullable(z.enum(['single', 'double'])),
  dimming: z.nullable(z.enum(['0-10v', 'dali', 'phase', 'none'])),
});
export type LuminaireDatasheet = z.infer<typeof luminaireDatasheet>;

export const ledDatasheet = z.strictObject({
  forwardVolts: positive,
  forwardVoltsMin: positive,
  forwardVoltsMax: positive,
  amps: positive,
  maxAmps: positive,
});

export const cableDatasheet = z.strictObject({
  size: z.string(),
  stranding: z.enum(['solid', 'stranded', 'flexible']),
  cores: z.number().check(z.int(), z.positive()),
});
export type CableDatasheet = z.infer<typeof cableDatasheet>;

const plain = z.record(z.string(), z.unknown());

/** The datasheet's shape per kind; kinds without figures for the engine hold what was typed. */
export const DATASHEETS: Readonly<Record<PartKind, z.ZodMiniType>> = {
  luminaire: luminaireDatasheet,
  lamp: luminaireDatasheet,
  kit: luminaireDatasheet,
  tape: tapeDatasheet,
  driver: driverDatasheet,
  cable: cableDatasheet,
  led: ledDatasheet,
  resistor: plain,
  channel: plain,
  connector: plain,
  label: plain,
  other: plain,
};

/** A part as survey and circuit screens keep it on the device: no cost. */
export interface PartFigures {
  id: string;
  sku: string;
  kind: PartKind;
  name: string;
  unit: 'each' | 'metre';
  labourHours: number;
  listed: boolean;
  datasheet: Record<string, unknown>;
}

export const partForm = z.object({
  id: z.optional(z.uuid()),
  baseVersion: z.optional(z.number().check(z.int())),
  sku: z
    .string()
    .check(z.trim(), z.minLength(1, 'Give the part number.'), z.maxLength(80, 'At most 80 characters.')),
  kind: z.enum(PART_KINDS),
  name: z
    .string()
    .check(z.trim(), z.minLength(1, 'Name the part.'), z.maxLength(200, 'At most 200 characters.')),
  unit: z.enum(['each', 'metre']),
  listed: z.boolean(),
  packSize: z.string().check(z.regex(/^\d{1,8}(\.\d{1,4})?$/, 'Type a quantity such as 1 or 5.')),
  labourHours: z.string().check(z.regex(/^\d{1,4}(\.\d{1,4})?$/, 'Type hours such as 0.5.')),
  unitCost: z.string().check(z.regex(/^\d{1,10}(\.\d{1,6})?$/, 'Type an amount such as 12.50.')),
  datasheet: z.string().check(z.maxLength(10_000, 'At most 10,000 characters.')),
});
export type PartForm = z.infer<typeof partForm>;
