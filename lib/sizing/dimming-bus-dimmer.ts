/** Whether a phase-cut dimmer, an old one before all, stands the LEDs that hang on it. */
import { atLeast, atMost, type Finding } from '@/lib/engine/contract';
import { caution, softStop } from '@/lib/engine/finding';
import type { DimmingBusInput } from './dimming-bus-input';
import type { Dimmed } from './dimming-bus-result';

const DATASHEET = 'datasheet';
const PRACTICE = 'common practice';

function leastLoad({ watts, packed }: Dimmed, minWatts: number | undefined): Finding[] {
  if (minWatts === undefined)
    return [
      caution(
        'dimmer-least-not-given',
        'Whether the LEDs are load enough for this dimmer is not checked: an old dimmer on LED is the leading call-back.',
        { watts },
        PRACTICE,
      ),
    ];
  // Split over several dimmers, the one with the least is what flickers.
  const least = packed.segments === null ? watts : (packed.emptiest[0] ?? watts);
  if (atLeast(least, minWatts)) return [];
  return [
    softStop(
      'dimmer-under-least-load',
      `${least} W hang on a dimmer that needs ${minWatts} W: flicker, and a glow when it is off.`,
      { watts: least, minWatts },
      DATASHEET,
    ),
  ];
}

export function dimmerFindings(dimmed: Dimmed, { dimmer = {} }: DimmingBusInput): Finding[] {
  const { watts, mostWatts, packed } = dimmed;
  const findings = leastLoad(dimmed, dimmer.minWatts);
  if (mostWatts !== null && !atMost(watts, mostWatts))
    findings.push(
      softStop(
        'dimmer-over-most-load',
        `${watts} W are connected; the dimmer carries ${mostWatts} W of LEDs.`,
        { watts, mostWatts, segments: packed.segments },
        DATASHEET,
      ),
    );
  if (dimmer.ledMaxWatts === undefined && dimmer.ledFraction === undefined)
    findings.push(
      caution(
        'dimmer-led-rating-not-given',
        mostWatts === null
          ? 'What the dimmer carries is not given, and not checked.'
          : `${mostWatts} W is taken as it stands; of LEDs most dimmers carry far less than of lamps of the old kind.`,
        { mostWatts },
        PRACTICE,
      ),
    );
  return findings;
}
