/** What `conductor-size` takes. Keys that only one basis knows are optional, and said to be unused on the other. */
import * as z from 'zod/mini';
import { celsius, conductorSize, count, notNegative, percent, positive, stranding, system } from './inputs';
import { CURVES } from './tables/breakers';
import { REFERENCE_METHODS } from './tables/iec-ampacity';

export const basis = z.enum(['us', 'iec']);
export const curve = z.enum(CURVES);
export const powerFactor = z
  .number()
  .check(z.minimum(0, 'must be at least 0'), z.maximum(1, 'must be at most 1'));

/** How a conductor is laid and what its surroundings leave of it: shared with `branch-circuit`. */
export const layingShape = {
  groupedCircuits: z.optional(count),
  insulationCelsius: z.optional(celsius),
  insulation: z.optional(z.enum(['PVC70', 'XLPE90'])),
  /** US: "raceway" (unless given) or "NM"; IEC: a reference method, B2 unless given. */
  installMethod: z.optional(z.enum(['raceway', 'NM', ...REFERENCE_METHODS])),
  /** Stranded unless given. */
  stranding: z.optional(stranding),
  /** Of the conductor, for its drop; 75 (US), 70 or 90 (IEC) unless given. */
  celsius: z.optional(celsius),
  powerFactor: z.optional(powerFactor),
  minimumSize: z.optional(conductorSize),
  /** Loop impedance outside this circuit, ohm. */
  zeOhms: z.optional(notNegative),
  protectiveSize: z.optional(conductorSize),
  curve: z.optional(curve),
};

export const conductorSizeSchema = z.strictObject({
  basis,
  system,
  /** Source; line to line for three-phase. */
  volts: positive,
  amps: notNegative,
  /** One way. */
  metres: notNegative,
  maxDropPct: percent,
  continuous: z.boolean(),
  ambientCelsius: celsius,
  /** US: current-carrying conductors in the raceway or cable. IEC: loaded conductors of the circuit, 2 or 3. */
  loadedConductors: count,
  /** US: 60, 75 or 90. IEC: what the terminals take, where it is known. */
  terminalCelsius: z.optional(celsius),
  ...layingShape,
});

export type ConductorSizeInput = z.infer<typeof conductorSizeSchema>;

/** A circuit whose breaker is given is sized for it; a row of loads has its far end beyond its load's centre. */
export interface SizeRequest extends ConductorSizeInput {
  breakerAmps?: number;
  /** One way to the farthest point, for the fault loop; `metres` unless given. */
  faultMetres?: number;
}
