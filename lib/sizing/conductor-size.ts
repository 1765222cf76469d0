/** 3. The smallest conductor for a load: what it carries, its overcurrent device, its drop and its fault loop. */
import { defineCalculation, type Outcome, type WorkingStep } from '@/lib/engine/contract';
import { choose, type Choice, type GovernedBy, type Ladder, type Rung } from './conductor-ladder';
import { iecLadder } from './conductor-ladder-iec';
import { usLadder } from './conductor-ladder-us';
import { findingsOf } from './conductor-size-findings';
import { conductorSizeSchema, type SizeRequest } from './conductor-size-input';

export interface ConductorSize {
  size: string | null;
  ampacity: number | null;
  dropPct: number | null;
  /** null behind a Class 2 source, which limits itself. */
  overcurrentAmps: number | null;
  governedBy: GovernedBy | null;
  zsOhms: number | null;
  zsMaxOhms: number | null;
}

function resultOf({ rung, governedBy }: Choice, ladder: Ladder): ConductorSize {
  return {
    size: rung?.size ?? null,
    ampacity: rung?.ampacity ?? null,
    dropPct: rung?.drop.dropPct ?? null,
    overcurrentAmps: rung && ladder.overcurrentAmps,
    governedBy,
    zsOhms: rung?.zsOhms ?? null,
    zsMaxOhms: rung && ladder.zsMaxOhms,
  };
}

/** How one rung's figures came about. */
export function rungSteps(request: SizeRequest, ladder: Ladder, rung: Rung): WorkingStep[] {
  return [...ladder.steps(rung), dropStep(request, rung, ladder)];
}

function dropStep(request: SizeRequest, rung: Rung, { celsius }: Ladder): WorkingStep {
  return {
    key: 'voltage-drop-percent',
    name: 'Voltage drop of the supply',
    formula: 'dU / U * 100',
    inputs: [
      { name: 'size', value: rung.size, unit: '' },
      { name: 'stranding', value: rung.stranding, unit: '' },
      { name: 'T', value: celsius, unit: 'C' },
      { name: 'L', value: request.metres, unit: 'm' },
      { name: 'dU', value: rung.drop.dropVolts, unit: 'V' },
      { name: 'U', value: request.volts, unit: 'V' },
    ],
    value: rung.drop.dropPct,
    unit: '%',
    basis: 'IEC 60364-5-52 Annex G (formula, read in an extract); NEC Ch. 9 Table 9 note 2 has the same form',
  };
}

export interface SizedConductor extends Outcome<ConductorSize> {
  choice: Choice;
  ladder: Ladder;
}

/**
 * The smallest listed copper conductor for a load over a run.
 * US: A1 = Table 310.16 at the terminals >= 1.25 * continuous load, A2 = 310.16 at the insulation * ambient factor *
 * count factor >= load, overcurrent device by 240.4 and 240.6(A), AWG 14 at least (none behind a Class 2 source).
 * IEC: Ib <= In <= Iz = table * Ca * Cg, 1.5 mm2 at least, Zs <= 0.95 * U0 / (m * In) where zeOhms is given.
 * @param request volts V (line to line for three-phase), amps A, metres one way, temperatures C
 * @returns ampacity and overcurrentAmps A, dropPct % of the source, zs ohm; all null where nothing fits, with a stop
 * @throws {EngineError} `invalid-input` with the field
 * Source: NEC 2023 and IEC 60364 as named in the tables beside this file, read in extracts; the licensed standard
 * prevails.
 */
export function conductorSize(request: SizeRequest): SizedConductor {
  const ladder = request.basis === 'us' ? usLadder(request) : iecLadder(request);
  const choice = choose(ladder);
  // Where nothing fits, the largest size shows how far it is from fitting.
  const shown = choice.rung ?? ladder.rungs.at(-1);
  return {
    result: resultOf(choice, ladder),
    findings: findingsOf(request, ladder, choice),
    working: shown ? rungSteps(request, ladder, shown) : [],
    choice,
    ladder,
  };
}

export const conductorSizeCalculation = defineCalculation({
  name: 'conductor-size',
  summary: 'Smallest conductor for a load: ampacity, overcurrent device, voltage drop, fault loop',
  bench: false,
  schema: conductorSizeSchema,
  calculate: (input): Outcome<ConductorSize> => {
    const { result, findings, working } = conductorSize(input);
    return { result, findings, working };
  },
});
