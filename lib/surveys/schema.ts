/** What a survey holds, as phones send it. zod/mini: the survey screen loads it. */
import * as z from 'zod/mini';
import { circuitChoices } from '@/lib/circuits/schema/electrical';
import { areaDetails, HOURS_IN_YEAR, luminaireDetails, yesNo } from './schema/details';
import { ownType, reading, utilityAccount } from './schema/site';

const name = z
  .string()
  .check(z.trim(), z.minLength(1, 'Give it a name.'), z.maxLength(120, 'At most 120 characters.'));
const text = (most: number) => z.string().check(z.maxLength(most, `At most ${most} characters.`));
const length = z.nullable(
  z.number().check(z.positive('must be greater than zero'), z.maximum(10_000, 'is too long')),
);
const quantity = z.number().check(z.nonnegative('must not be negative'), z.maximum(1_000_000, 'is too many'));
const position = z.number().check(z.int(), z.minimum(0), z.maximum(100_000));

export const HAZARDS = [
  'suspectBallasts',
  'suspectCeiling',
  'sharedNeutral',
  'aluminiumConductors',
  'noEquipmentGround',
  'oldWireAboveLuminaires',
  'noIsolationPoint',
] as const;

/** Hours a week times weeks a year, where both are given: no more than a year has. */
const withinYear = z.refine<{ weeklyHours: number | null; details: { weeksPerYear: number | null } }>(
  ({ weeklyHours, details }) => (weeklyHours ?? 0) * (details.weeksPerYear ?? 0) <= HOURS_IN_YEAR,
  {
    path: ['details', 'weeksPerYear'],
    error: 'With these hours a week, a year would have more than 8,760 hours.',
  },
);

export const area = z
  .strictObject({
    position,
    name,
    use: text(120),
    lengthMetres: length,
    widthMetres: length,
    heightMetres: length,
    weeklyHours: z.nullable(
      z.number().check(z.minimum(0, 'must not be negative'), z.maximum(168, 'a week has 168 hours')),
    ),
    ambientCelsius: z.nullable(z.number().check(z.minimum(-60), z.maximum(80, 'is hotter than any area'))),
    environment: z.enum(['dry', 'damp', 'wet']),
    hazards: z.partialRecord(z.enum(HAZARDS), yesNo),
    details: z.prefault(areaDetails, {}),
    notes: text(4_000),
  })
  .check(withinYear);
export type Area = z.infer<typeof area>;

/** How the existing luminaire is wired: what the retrofit check asks. Unknown is an answer. */
export const existingElectrical = z.strictObject({
  lampType: text(60),
  ballast: z.enum(['magnetic', 'instant-start', 'programmed-start', 'rapid-start', 'none', 'unknown']),
  lampholder: z.enum(['shunted', 'non-shunted', 'unknown']),
  dimmer: z.enum(['none', 'phase-forward', 'phase-reverse', '0-10v', 'dali', 'unknown']),
  emergency: z.enum(['none', 'unswitched', 'battery-pack', 'unknown']),
  breakerAmps: z.nullable(z.number().check(z.positive())),
});
export type ExistingElectrical = z.infer<typeof existingElectrical>;

export const luminaire = z.strictObject({
  areaId: z.uuid(),
  luminaireType: name,
  quantity,
  countConfidence: z.enum(['counted', 'estimated']),
  watts: z.number().check(z.nonnegative('must not be negative'), z.maximum(100_000, 'is too much')),
  wattsSource: z.enum(['nameplate', 'measured', 'datasheet', 'typical']),
  supplyVolts: z.nullable(z.number().check(z.positive(), z.maximum(1_000, 'is above low voltage'))),
  electrical: existingElectrical,
  details: z.prefault(luminaireDetails, {}),
  notes: text(4_000),
});
export type Luminaire = z.infer<typeof luminaire>;

export const cove = z.strictObject({
  areaId: z.uuid(),
  name,
  tapeMetres: z.number().check(z.positive('must be greater than zero'), z.maximum(1_000, 'is too long')),
  driverMetres: z.number().check(z.nonnegative('must not be negative'), z.maximum(1_000, 'is too far')),
  notes: text(4_000),
});
export type Cove = z.infer<typeof cove>;

export const ACTIONS = [
  'leave',
  'relamp',
  'bypass',
  'external-driver',
  'listed-kit',
  'new-luminaire',
  'add',
  'remove',
  'relocate',
] as const;

/** What the change itself settles about the wiring. */
export const changeElectrical = z.strictObject({
  lampholdersReplaced: z.boolean(),
  disconnectAdded: z.boolean(),
  emergencyFeedAfter: z.enum(['unswitched', 'switched', 'unknown']),
  emergencyDriverAfter: z.enum(['listed-led', 'existing', 'unknown']),
});
export type ChangeElectrical = z.infer<typeof changeElectrical>;

export const changeLine = z.strictObject({
  areaId: z.uuid(),
  existingLuminaireId: z.nullable(z.uuid()),
  circuitId: z.nullable(z.uuid()),
  position,
  action: z.enum(ACTIONS),
  oldQuantity: quantity,
  newPartId: z.nullable(z.uuid()),
  newType: text(200),
  newQuantity: quantity,
  newWatts: z.nullable(z.number().check(z.nonnegative('must not be negative'))),
  electrical: changeElectrical,
  notes: text(4_000),
});
export type ChangeLine = z.infer<typeof changeLine>;

export const circuit = z.strictObject({
  areaId: z.uuid(),
  coveId: z.nullable(z.uuid()),
  kind: z.enum(['branch-circuit', 'tape-run', 'resistor-array']),
  name,
  electrical: z.record(z.string(), z.unknown()),
  choices: circuitChoices,
});
export type CircuitBody = z.infer<typeof circuit>;

export const COLLECTIONS = {
  areas: area,
  luminaires: luminaire,
  coves: cove,
  circuits: circuit,
  'change-lines': changeLine,
  readings: reading,
  'utility-accounts': utilityAccount,
  'luminaire-types': ownType,
} as const;
export type Collection = keyof typeof COLLECTIONS;

export const overrideForm = z.object({
  jobId: z.uuid(),
  subjectType: z.enum(['change-line', 'circuit']),
  subjectId: z.uuid(),
  code: z.string().check(z.minLength(1), z.maxLength(80)),
  reason: z
    .string()
    .check(
      z.trim(),
      z.minLength(3, 'Say why this may stand.'),
      z.maxLength(2_000, 'At most 2,000 characters.'),
    ),
});
export type OverrideInput = z.infer<typeof overrideForm>;
