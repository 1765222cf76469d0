/** 10. Branch circuits for loads behind breakers of one rating: how many, with what on each, on which conductor. */
import { atMost, defineCalculation, type Finding, type Outcome } from '@/lib/engine/contract';
import { existingFindings, existingRung } from './branch-circuit-existing';
import { conductorFindings, loadFindings, unitTooLarge } from './branch-circuit-findings';
import { type BranchCircuitInput, branchCircuitSchema } from './branch-circuit-input';
import { type BranchCase, branchCase, fraction, wholeLoad } from './branch-circuit-limits';
import { pack } from './branch-circuit-pack';
import { settle, type SizedBin, sizer } from './branch-circuit-sizing';
import { workingOf } from './branch-circuit-working';
import type { GovernedBy, Rung } from './conductor-ladder';

export interface PlannedCircuit {
  units: { name: string; quantity: number }[];
  /** With what stays on an existing circuit. */
  voltAmps: number;
  amps: number;
  breakerAmps: number;
  /** null where no conductor serves it; on an existing circuit where it is not known. */
  size: string | null;
  dropPct: number | null;
  zsOhms: number | null;
  zsMaxOhms: number | null;
}

export interface BranchCircuit {
  circuits: PlannedCircuit[];
  /** Most on one circuit; null for mixed loads, and for a load that takes nothing. */
  unitsByLoad: number | null;
  /** Most on one circuit; null for mixed loads, and where no maker's figure tells. */
  unitsByInrush: number | null;
  governedBy: 'load' | 'inrush' | 'voltage-drop' | 'fault-loop';
}

function planned(c: BranchCase, circuit: SizedBin, rung: Rung | null): PlannedCircuit {
  return {
    units: c.input.loads.flatMap(({ name }, place) => {
      const quantity = circuit.bin[place] ?? 0;
      return quantity > 0 ? [{ name, quantity }] : [];
    }),
    voltAmps: circuit.voltAmps,
    amps: circuit.amps,
    breakerAmps: c.input.breakerAmps,
    size: rung?.size ?? null,
    dropPct: rung?.drop.dropPct ?? null,
    zsOhms: rung?.zsOhms ?? null,
    zsMaxOhms: rung && circuit.sized.ladder.zsMaxOhms,
  };
}

/**
 * What decides most: a run that split circuits, inrush that did, a run that asked for a larger conductor; else the
 * lower of both counts.
 */
function governedBy(
  c: BranchCase,
  circuits: SizedBin[],
  splitBy: GovernedBy | null,
): BranchCircuit['governedBy'] {
  if (splitBy === 'voltage-drop' || splitBy === 'fault-loop') return splitBy;
  const [byLoad, byInrush] = [fraction(c, wholeLoad(c), 'byLoad'), fraction(c, wholeLoad(c), 'byInrush')];
  const tighter = byInrush > byLoad ? 'inrush' : 'load';
  if (tighter === 'inrush' && !atMost(byInrush, 1)) return 'inrush';
  const failed = circuits.flatMap(({ sized }) => sized.choice.failed);
  const asked = circuits.map(({ sized }) => sized.choice.governedBy);
  for (const reason of ['voltage-drop', 'fault-loop'] as const)
    if (failed.includes(reason) || asked.includes(reason)) return reason;
  return tighter;
}

interface Plan {
  circuits: SizedBin[];
  governedBy: BranchCircuit['governedBy'];
  rung: (circuit: SizedBin) => Rung | null;
  findings: Finding[];
}

function plan(c: BranchCase): Plan {
  const tooLarge = c.limits.filter(({ most }) => most < 1);
  if (tooLarge.length > 0)
    return {
      circuits: [],
      governedBy: tooLarge[0]?.byLoad === 0 ? 'load' : 'inrush',
      rung: () => null,
      findings: tooLarge.map((limit) => unitTooLarge(c, limit)),
    };
  const { circuits, splitBy } = settle(c, pack(c));
  return {
    circuits,
    governedBy: governedBy(c, circuits, splitBy),
    rung: ({ sized }) => sized.choice.rung,
    findings: conductorFindings(circuits),
  };
}

function check(c: BranchCase): Plan {
  const circuit = sizer(c).size(wholeLoad(c));
  return {
    circuits: [circuit],
    governedBy: fraction(c, circuit.bin, 'byInrush') > fraction(c, circuit.bin, 'byLoad') ? 'inrush' : 'load',
    rung: (one) => existingRung(c, one),
    findings: existingFindings(c, circuit),
  };
}

/**
 * The least number of circuits that load and inrush allow, each on the smallest conductor that suits its breaker, the
 * drop along its row and its fault loop; or the check of an existing circuit, which is not resized.
 * @param input volts V (line to line for three-phase), volt-amps VA per unit, metres one way to the first unit
 * @returns A, VA, % of the source, ohm; nulls and a stop where nothing fits
 * @throws {EngineError} `invalid-input` with the field, `too-large` over 10,000 units
 * Source: NEC 2023 210.19, 210.20, 240; IEC 60364-4-43, IEC 60898-1 trip bands, makers' figures for inrush: read in
 * extracts, the licensed standards prevail.
 */
export function branchCircuit(input: BranchCircuitInput): Outcome<BranchCircuit> {
  const c = branchCase(input);
  const { circuits, rung, findings, ...chosen } = input.existing ? check(c) : plan(c);
  const [only] = c.limits.length === 1 ? c.limits : [];
  return {
    result: {
      circuits: circuits.map((circuit) => planned(c, circuit, rung(circuit))),
      unitsByLoad: only?.byLoad ?? null,
      unitsByInrush: only?.byInrush ?? null,
      governedBy: chosen.governedBy,
    },
    findings: [...findings, ...loadFindings(c)],
    working: workingOf(c, circuits, rung),
  };
}

export const branchCircuitCalculation = defineCalculation({
  name: 'branch-circuit',
  summary:
    'Luminaires over branch circuits: units by load and inrush, conductor, drop, fault loop; or an old circuit',
  bench: false,
  schema: branchCircuitSchema,
  calculate: (input) => branchCircuit(input),
});
