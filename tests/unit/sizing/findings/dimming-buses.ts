/** Findings of `dimming-bus`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

/** Ten drivers of 2 mA at the end of a pair of 1 mm2, which has 18.1 ohm/km at 20 C. */
const analogueCase = {
  ...{ bus: '0-10v', basis: 'iec', devices: [{ name: 'driver', count: 10, amps: 0.002 }] },
  ...{ control: { ratedAmps: 0.05 }, legs: [{ metres: 30 }], size: '1 mm2', stranding: 'solid', celsius: 20 },
};
const daliCase = { ...analogueCase, bus: 'dali', control: { ratedAmps: 0.2 } };
const phaseCase = {
  ...{ bus: 'phase-cut', basis: 'us', devices: [{ name: 'downlight', count: 10, watts: 10 }] },
  dimmer: { minWatts: 40, ledMaxWatts: 150 },
};
const analogue = rowsOf('dimming-bus', analogueCase);
const dali = rowsOf('dimming-bus', daliCase);
const phase = rowsOf('dimming-bus', phaseCase);

/** 0.1 V of the 10 V on the pair's two conductors with 20 mA, and the 2 V of a DALI bus with 250 mA. */
const ANALOGUE_METRES = 0.1 / (2 * 0.02 * 0.0181);
const DALI_METRES = 2 / (2 * 0.25 * 0.0181);
/** What 100 m of it leave of a supply: 9.5 V are needed. */
const DALI_VOLTS = 9.5 + 2 * 0.25 * 100 * 0.0181;

const metres = (own: number) => ({ 'legs.0.metres': own });
/** So thick that only the length counts. */
const long = (own: number) => ({ ...metres(own), size: undefined, ohmsPerMetre: 0 });
const us = (wiring?: string) => ({ basis: 'us', wiring });
const count = (own: number) => ({ 'devices.0.count': own, 'devices.0.amps': 0 });
const inputs = (own: number) => ({ ...count(own), 'devices.0.kind': 'input' });

export const dimmingBusRows: FindingRow[] = [
  analogue.note('bus-current-assumed', /60929/, { 'devices.0.amps': undefined }, { 'devices.0.amps': 0.002 }),
  dali.note('bus-current-assumed', /62386-101/, { 'devices.0.amps': undefined }, { 'devices.0.amps': 0.002 }),
  analogue.note(
    'bus-unit-over-standard',
    /60929/,
    { 'devices.0.amps': 0.002 * OVER },
    { 'devices.0.amps': 0.002 * AT_MOST },
  ),
  analogue.softStop(
    'bus-drop-over-limit',
    /common practice/,
    metres(ANALOGUE_METRES * OVER),
    metres(ANALOGUE_METRES * AT_MOST),
  ),
  dali.softStop(
    'bus-drop-over-limit',
    /technical note/,
    metres(DALI_METRES * OVER),
    metres(DALI_METRES * AT_MOST),
  ),
  analogue.caution('bus-not-selv', /datasheet/, {}, { basis: 'us' }),
  dali.caution('bus-not-selv', /62386-101/, { basis: 'us' }, { basis: 'us', bus: '0-10v' }),
  analogue.softStop(
    'bus-over-current',
    /datasheet/,
    { 'control.ratedAmps': 0.02 * UNDER },
    { 'control.ratedAmps': 0.02 * AT_LEAST },
  ),
  analogue.softStop(
    'bus-unit-too-much',
    /datasheet/,
    { 'control.ratedAmps': 0.002 * UNDER },
    { 'control.ratedAmps': 0.002 * AT_LEAST },
  ),
  analogue.softStop(
    'control-current-direction',
    /60929/,
    { 'control.current': 'source' },
    { 'control.current': 'sink' },
  ),
  analogue.softStop(
    'control-under-min-current',
    /datasheet/,
    { 'control.minAmps': 0.02 * OVER },
    { 'control.minAmps': 0.02 * AT_MOST },
  ),
  analogue.caution('control-run-long', /common practice/, long(50 * OVER), long(50 * AT_MOST)),
  analogue.note('no-off-at-minimum', /common practice/, { bus: '1-10v' }, { bus: '0-10v' }),
  analogue.caution('control-pair-colours', /410\.69/, { basis: 'us' }, { basis: 'iec' }),
  analogue.caution('control-separation', /Article 725/, us(), us('class-2-separate')),
  analogue.hardStop('control-with-power', /Article 725/, us('class-2-with-power'), us('class-2-separate')),
  analogue.note('control-as-class-1', /Article 725/, us('class-1'), us('class-2-separate')),
  analogue.note('inputs-not-used', /common practice/, { groups: 2 }, {}),

  dali.softStop('dali-over-addresses', /62386-101/, count(65), count(64)),
  dali.softStop('dali-over-input-addresses', /62386-101/, inputs(65), inputs(64)),
  // Input devices have addresses of their own.
  dali.softStop('dali-over-addresses', /62386-101/, count(65), inputs(65)),
  dali.softStop('dali-over-groups', /62386-101/, { groups: 17 }, { groups: 16 }),
  dali.softStop('dali-over-groups', /62386-101/, { scenes: 17 }, { scenes: 16 }),
  dali.softStop(
    'dali-supply-over-limit',
    /62386-101/,
    { 'control.maxAmps': 0.25 * OVER },
    { 'control.maxAmps': 0.25 * AT_MOST },
  ),
  dali.softStop('dali-too-long', /300 m/, long(300 * OVER), long(300 * AT_MOST)),
  // Between the two that lie farthest apart: two legs of a star together.
  dali.softStop(
    'dali-too-long',
    /300 m/,
    { ...long(150), 'legs.1': { metres: 150 * OVER } },
    { ...long(150), 'legs.1': { metres: 150 } },
  ),
  dali.softStop(
    'dali-low-volts',
    /62386-101/,
    { ...metres(100), 'control.volts': DALI_VOLTS * UNDER },
    { ...metres(100), 'control.volts': DALI_VOLTS * AT_LEAST },
  ),

  phase.caution('dimmer-least-not-given', /common practice/, { 'dimmer.minWatts': undefined }, {}),
  phase.caution(
    'dimmer-led-rating-not-given',
    /common practice/,
    { dimmer: { minWatts: 40, maxWatts: 400 } },
    { dimmer: { minWatts: 40, maxWatts: 400, ledFraction: 0.5 } },
  ),
  phase.caution(
    'dimmer-led-rating-not-given',
    /common practice/,
    { dimmer: { minWatts: 40 } },
    { dimmer: { minWatts: 40, ledMaxWatts: 150 } },
  ),
  phase.softStop(
    'dimmer-over-most-load',
    /datasheet/,
    { 'dimmer.ledMaxWatts': 100 * UNDER },
    { 'dimmer.ledMaxWatts': 100 * AT_LEAST },
  ),
  phase.softStop(
    'dimmer-under-least-load',
    /datasheet/,
    { 'dimmer.minWatts': 100 * OVER },
    { 'dimmer.minWatts': 100 * AT_MOST },
  ),
];
