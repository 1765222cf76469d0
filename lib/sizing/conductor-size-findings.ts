/** What is wrong with a choice of conductor, or worth knowing about it, on either basis. */
import type { Finding } from '@/lib/engine/contract';
import { hardStop, note, softStop } from '@/lib/engine/finding';
import type { Choice, Ladder, Rung } from './conductor-ladder';
import { flexibleNote } from './conductor-resistance';
import type { SizeRequest } from './conductor-size-input';
import { IEC_FAULT_BASIS, IEC_OVERLOAD_BASIS } from './tables/iec-ampacity';
import { NEC_AMPACITY_BASIS, NEC_OVERCURRENT_BASIS } from './tables/nec-ampacity';

const DROP_BASIS = {
  us: 'NEC 2023 210.19 informational note (3 % and 5 %, read in an extract); the limit is set by hand',
  iec: 'IEC 60364-5-52:2009 Table G.52.1 (read in an extract); the limit is set by hand',
} as const;
const CARRY_BASIS = { us: NEC_AMPACITY_BASIS, iec: IEC_OVERLOAD_BASIS } as const;

/** No conductor of the tables carries the load with its breaker. */
function nothingCarries(request: SizeRequest, { overcurrentAmps }: Ladder, largest: Rung): Finding {
  const { basis, amps, ambientCelsius } = request;
  if (largest.ampacity === 0)
    return hardStop(
      'ambient-too-hot',
      `At ${ambientCelsius} C around it this insulation carries nothing: choose a hotter one, or another way for the cable.`,
      { ambientCelsius },
      CARRY_BASIS[basis],
    );
  if (overcurrentAmps === null)
    return hardStop(
      'no-standard-rating',
      `No standard rating is large enough for ${amps} A: split the load.`,
      { amps },
      basis === 'us' ? NEC_OVERCURRENT_BASIS : IEC_OVERLOAD_BASIS,
    );
  return hardStop(
    'load-over-conductors',
    `${largest.size} carries ${largest.ampacity} A here: too little for ${amps} A behind ${overcurrentAmps} A. Split the load.`,
    { amps, overcurrentAmps, size: largest.size, ampacity: largest.ampacity },
    CARRY_BASIS[basis],
  );
}

/** One size loses too much over the run. */
export function dropTooLarge({ basis, maxDropPct }: SizeRequest, { size, drop }: Rung): Finding {
  return softStop(
    'drop-over-limit',
    `${size} loses ${drop.dropPct} % over this run, above the ${maxDropPct} % that is set.`,
    { size, dropPct: drop.dropPct, dropVolts: drop.dropVolts, limitPct: maxDropPct },
    DROP_BASIS[basis],
  );
}

/** In a fault on one size the breaker does not trip at once. */
export function faultTooSlow({ curve }: SizeRequest, ladder: Ladder, { size, zsOhms }: Rung): Finding {
  return hardStop(
    'disconnection-time',
    `The fault loop has ${zsOhms} ohm with ${size}; the breaker trips at once up to ${ladder.zsMaxOhms} ohm.`,
    {
      size,
      zsOhms,
      zsMaxOhms: ladder.zsMaxOhms,
      overcurrentAmps: ladder.overcurrentAmps,
      curve: curve ?? null,
    },
    IEC_FAULT_BASIS,
  );
}

function unused({ basis, ...request }: SizeRequest): Finding[] {
  const dead =
    basis === 'us'
      ? (['insulation', 'zeOhms', 'protectiveSize', 'curve'] as const)
      : request.zeOhms === undefined
        ? (['insulationCelsius', 'protectiveSize'] as const)
        : (['insulationCelsius'] as const);
  const keys = dead.filter((key) => request[key] !== undefined);
  if (keys.length === 0) return [];
  return [
    note(
      'inputs-not-used',
      `Not used in this answer: ${keys.join(', ')}.`,
      { keys: keys.join(', '), basis },
      'common practice',
    ),
  ];
}

function strandingNotes({ stranding }: SizeRequest, { size, stranding: taken }: Rung): Finding[] {
  if (stranding === 'flexible' && size.startsWith('AWG')) return [flexibleNote(size)];
  if (stranding !== 'solid' || taken === 'solid') return [];
  return [
    note(
      'solid-as-stranded',
      `${size} is not made solid: the stranded row is used.`,
      { size },
      'NEC 2023 Chapter 9 Table 8 (read in a transcription)',
    ),
  ];
}

/** @returns stops first, then what the basis and the conductor itself have to say */
export function findingsOf(request: SizeRequest, ladder: Ladder, { rung, failed }: Choice): Finding[] {
  const largest = ladder.rungs.at(-1);
  const stops = !largest
    ? []
    : failed.map((what) => {
        if (what === 'ampacity') return nothingCarries(request, ladder, largest);
        return what === 'voltage-drop'
          ? dropTooLarge(request, largest)
          : faultTooSlow(request, ladder, largest);
      });
  return [
    ...stops,
    ...ladder.findings(rung),
    ...(rung ? strandingNotes(request, rung) : []),
    ...unused(request),
  ];
}
