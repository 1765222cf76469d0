/** 1. Resistance of a copper conductor at its temperature. */
import * as z from 'zod/mini';
import {
  defineCalculation,
  type Finding,
  type Outcome,
  refuse,
  type WorkingStep,
} from '@/lib/engine/contract';
import { celsius, conductorSize, stranding } from './inputs';
import {
  B258_BASIS,
  IEC_60228,
  IEC_60228_BASIS,
  NEC_TABLE_8,
  SMALL_AWG,
  type Stranding,
  TABLE_8_BASIS,
} from './tables/conductors';

/** NEC Ch. 9 Table 8 note 2: per kelvin, about 75 C. */
const ALPHA_75 = 0.00323;
/** IEC 60028 / IEC 60228 Annex B: per kelvin, about 20 C. */
const ALPHA_20 = 0.00393;
/** Standard annealed copper, ohm mm2/m at 20 C. */
const RHO_20 = 0.017241;
/** A stranded conductor's wires are longer than the conductor: 2 % (common practice). */
const STRANDING_FACTOR = 1.02;

const schema = z.strictObject({ size: conductorSize, stranding, celsius });

export interface ConductorResistance {
  ohmsPerMetre: number;
  squareMillimetres: number;
}

interface Reference extends ConductorResistance {
  atCelsius: number;
  alpha: number;
  basis: string;
  findings: Finding[];
}

const note = (code: string, message: string, values: Finding['values'], basis: string): Finding => ({
  code,
  severity: 'note',
  hard: false,
  message,
  values,
  basis,
});

/** ASTM B258: diameter in mm of AWG n = 0.127 * 92^((36 - n)/39). */
export function awgDiameterMillimetres(awg: number): number {
  return 0.127 * 92 ** ((36 - awg) / 39);
}

/** Said wherever a flexible conductor of an AWG size is figured. */
export function flexibleNote(size: string): Finding {
  return note(
    'flexible-as-stranded',
    `${size}: the US tables list no flexible conductor; the stranded row is used.`,
    { size },
    TABLE_8_BASIS,
  );
}

function smallAwg(size: string, awg: number, laid: Stranding): Reference {
  const squareMillimetres = (Math.PI / 4) * awgDiameterMillimetres(awg) ** 2;
  const factor = laid === 'solid' ? 1 : STRANDING_FACTOR;
  return {
    ohmsPerMetre: (RHO_20 / squareMillimetres) * factor,
    squareMillimetres,
    atCelsius: 20,
    alpha: ALPHA_20,
    basis: laid === 'solid' ? B258_BASIS : `${B258_BASIS}; stranded 2 % more (common practice)`,
    findings: laid === 'flexible' ? [flexibleNote(size)] : [],
  };
}

function fromTable8(size: string, laid: Stranding): Reference | null {
  const row = NEC_TABLE_8[size];
  if (!row) return null;
  const ohmsPerKilometre = laid === 'solid' ? row.solid : row.stranded;
  if (ohmsPerKilometre === null)
    return refuse('stranding', `${size} is not made solid: Table 8 lists it stranded`);
  return {
    ohmsPerMetre: ohmsPerKilometre / 1000,
    squareMillimetres: row.squareMillimetres,
    atCelsius: 75,
    alpha: ALPHA_75,
    basis: TABLE_8_BASIS,
    findings: laid === 'flexible' ? [flexibleNote(size)] : [],
  };
}

function fromIec60228(size: string, laid: Stranding): Reference | null {
  const row = IEC_60228[size];
  if (!row) return null;
  const ohmsPerKilometre = { solid: row.class1, stranded: row.class2, flexible: row.class5 }[laid];
  return {
    ohmsPerMetre: ohmsPerKilometre / 1000,
    squareMillimetres: row.squareMillimetres,
    atCelsius: 20,
    alpha: ALPHA_20,
    basis: IEC_60228_BASIS,
    findings: [],
  };
}

function referenceOf(size: string, laid: Stranding): Reference {
  const awg = SMALL_AWG[size];
  const found =
    awg === undefined ? (fromTable8(size, laid) ?? fromIec60228(size, laid)) : smallAwg(size, awg, laid);
  return found ?? refuse('size', 'is not a known size');
}

/**
 * Resistance per metre of one copper conductor, R = R0 * (1 + alpha * (T - T0)).
 * @param size "AWG 24" to "AWG 4/0" or "0.5 mm2" to "35 mm2"
 * @param atCelsius the conductor's temperature, C
 * @returns ohm/m and mm2
 * @throws {EngineError} `invalid-input` on `size`, `stranding` (solid above AWG 8) or `celsius`.
 * Source: NEC Ch. 9 Table 8 with its note 2 (0.00323 per kelvin about 75 C); IEC 60228 (0.00393 about 20 C);
 * ASTM B258 diameter at 0.017241 ohm mm2/m for AWG 24 to 20.
 */
export function conductorResistance(size: string, laid: Stranding, atCelsius: number): ConductorResistance {
  const reference = referenceOf(size, laid);
  const factor = 1 + reference.alpha * (atCelsius - reference.atCelsius);
  return { ohmsPerMetre: reference.ohmsPerMetre * factor, squareMillimetres: reference.squareMillimetres };
}

function working(
  input: z.infer<typeof schema>,
  reference: Reference,
  answer: ConductorResistance,
): WorkingStep[] {
  return [
    {
      key: 'reference-resistance',
      name: 'Resistance as listed',
      formula: 'R0',
      inputs: [
        { name: 'size', value: input.size, unit: '' },
        { name: 'stranding', value: input.stranding, unit: '' },
        { name: 'T0', value: reference.atCelsius, unit: 'C' },
      ],
      value: reference.ohmsPerMetre,
      unit: 'ohm/m',
      basis: reference.basis,
    },
    {
      key: 'resistance-at-temperature',
      name: 'Resistance at its temperature',
      formula: 'R = R0 * (1 + alpha * (T - T0))',
      inputs: [
        { name: 'R0', value: reference.ohmsPerMetre, unit: 'ohm/m' },
        { name: 'alpha', value: reference.alpha, unit: '1/K' },
        { name: 'T', value: input.celsius, unit: 'C' },
        { name: 'T0', value: reference.atCelsius, unit: 'C' },
      ],
      value: answer.ohmsPerMetre,
      unit: 'ohm/m',
      basis: reference.basis,
    },
  ];
}

export const conductorResistanceCalculation = defineCalculation({
  name: 'conductor-resistance',
  summary: 'Resistance per metre of a copper conductor at its temperature',
  bench: false,
  schema,
  calculate: (input): Outcome<ConductorResistance> => {
    const reference = referenceOf(input.size, input.stranding);
    const result = conductorResistance(input.size, input.stranding, input.celsius);
    return { result, findings: reference.findings, working: working(input, reference, result) };
  },
});
