/** A retrofit on an existing circuit: checked, not resized. */
import { atMost, type Finding, refuse } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import { LOAD_BASIS } from './branch-circuit-findings';
import { type BranchCase, fraction, unitsIn, wholeLoad } from './branch-circuit-limits';
import type { SizedBin } from './branch-circuit-sizing';
import type { Ladder, Rung } from './conductor-ladder';
import { conductorSize } from './conductor-size';
import { dropTooLarge, faultTooSlow } from './conductor-size-findings';
import { INRUSH_BASIS } from './inrush';
import { NEC_AMPACITY_BASIS } from './tables/nec-ampacity';

const PRACTICE = 'common practice';

/** The rung of the conductor that is there; null while it is not known. */
export function existingRung({ input }: BranchCase, { sized }: SizedBin): Rung | null {
  const size = input.existing?.size;
  if (size === undefined) return null;
  const rung = sized.ladder.rungs.find((one) => one.size === size);
  return rung ?? refuse('existing.size', 'is not in the tables of this basis');
}

function breakerFindings(c: BranchCase, { amps }: SizedBin): Finding[] {
  const { basis, breakerAmps } = c.input;
  const whole = wholeLoad(c);
  const units = unitsIn(whole);
  const [onBreaker, onControl] = [
    fraction(c, whole, 'byBreakerInrush'),
    fraction(c, whole, 'byControlInrush'),
  ];
  const findings: Finding[] = [];
  if (!atMost(amps * c.continuousFactor, breakerAmps))
    findings.push(
      softStop(
        'breaker-overloaded',
        `The circuit would draw ${amps} A through a ${breakerAmps} A breaker.`,
        { ampsAfter: amps, breakerAmps, factor: c.continuousFactor },
        LOAD_BASIS[basis],
      ),
    );
  if (!atMost(onBreaker, 1)) {
    const most = Math.floor(units / onBreaker);
    findings.push(
      softStop(
        'inrush-over-breaker',
        `${units} units start at once on a breaker that holds ${most}: it trips at switch-on.`,
        { units, unitsByInrush: most, breakerAmps },
        INRUSH_BASIS[basis],
      ),
    );
  }
  if (!atMost(onControl, 1)) {
    const most = Math.floor(units / onControl);
    findings.push(
      softStop(
        'units-over-control',
        `${units} units start at once through a control that holds ${most}: its contacts weld.`,
        { units, unitsByControl: most, control: c.input.control?.kind ?? 'switch' },
        'datasheet (control)',
      ),
    );
  }
  return findings;
}

function conductorFindings(c: BranchCase, circuit: SizedBin, ladder: Ladder): Finding[] {
  const rung = existingRung(c, circuit);
  if (!rung) return [];
  const { basis, breakerAmps } = c.input;
  const findings: Finding[] = [];
  // Too much load for the breaker is said of the breaker: the conductor is held against what the breaker lets pass.
  const amps = Math.min(circuit.amps, breakerAmps / c.continuousFactor);
  const behindBreaker = conductorSize({ ...circuit.request, amps }).ladder.rungs;
  if (!behindBreaker.some(({ size, carries }) => size === rung.size && carries))
    findings.push(
      hardStop(
        'conductor-under-breaker',
        `${rung.size} carries ${rung.ampacity} A here: too little for this load behind ${breakerAmps} A.`,
        { size: rung.size, ampacity: rung.ampacity, amps: circuit.amps, breakerAmps },
        basis === 'us' ? NEC_AMPACITY_BASIS : LOAD_BASIS.iec,
      ),
    );
  if (!rung.dropFits) findings.push(dropTooLarge(circuit.request, rung));
  if (!rung.faultFits) findings.push(faultTooSlow(circuit.request, ladder, rung));
  return findings;
}

function loadBeforeAndAfter({ input }: BranchCase, after: number): Finding {
  const before = (input.existing?.voltAmps ?? 0) + (input.existing?.otherVoltAmps ?? 0);
  const values = { voltAmpsBefore: before, voltAmpsAfter: after };
  if (atMost(after, before))
    return note('load-before-and-after', `The load goes from ${before} VA to ${after} VA.`, values, PRACTICE);
  return caution(
    'load-grows',
    `The load grows from ${before} VA to ${after} VA: look at the whole circuit.`,
    values,
    PRACTICE,
  );
}

/** Load before and after, load and inrush on the old breaker and control, drop on the old conductor. */
export function existingFindings(c: BranchCase, circuit: SizedBin): Finding[] {
  return [
    ...breakerFindings(c, circuit),
    ...conductorFindings(c, circuit, circuit.sized.ladder),
    loadBeforeAndAfter(c, circuit.voltAmps),
  ];
}
