/** Findings of `linear-current-source` and `current-sink`. */
import { AT_LEAST, AT_MOST, type FindingRow, OVER, rowsOf, UNDER } from './row';

const led = { forwardVolts: 3.2, forwardVoltsMin: 3, forwardVoltsMax: 3.4, amps: 0.1, maxAmps: 0.15 };
const linear = rowsOf('linear-current-source', {
  ...{ supply: { volts: 12 }, led, perString: 2, amps: 0.1, referenceVolts: 1.25, referenceMaxVolts: 1.25 },
  ...{ dropoutVolts: 2.5, thermalCelsiusPerWatt: 50, maxJunctionCelsius: 125, ambientCelsius: 40 },
  ...{ series: 'E24', switchingEfficiencyPct: 88 },
});
/** 12.5 ohm, so 13 ohm of E24. */
const SET_AMPS = 1.25 / 13;
/** Two LEDs at their highest, the reference and the regulator's own volts. */
const LINEAR_VOLTS = 2 * 3.4 + 1.25 + 2.5;
/** 12 V less two LEDs at their lowest and the reference. */
const DIFFERENCE_VOLTS = 12 - 2 * 3 - 1.25;
const JUNCTION = 40 + 50 * DIFFERENCE_VOLTS * SET_AMPS;
/** 56 ohm instead of a regulator: 6 V across it with the LEDs at their lowest. */
const RESISTOR_MOST_AMPS = 6 / 56;

const sinkLed = { forwardVolts: 3.2, forwardVoltsMin: 3, forwardVoltsMax: 3.4, maxAmps: 0.03 };
const sink = rowsOf('current-sink', {
  ...{ referenceVolts: 1.2, currentRatio: 40, ampsPerChannel: 0.03, channels: 16, strings: 40 },
  ...{ supply: { volts: 12 }, led: sinkLed, perString: 3, dropoutVolts: 0.7, maxPackageWatts: 2 },
  ...{ thermalCelsiusPerWatt: 35, ambientCelsius: 40, series: 'E24', maxJunctionCelsius: 125 },
  ...{ channelTolerancePct: 0 },
});
/** 48 V / 0.03 A is 1.6 kilohm, a value of E24. */
const SINK_AMPS = 0.03;
const SINK_VOLTS = 3 * 3.4 + 0.7;
/** 12 V less three LEDs at their lowest, at 0.03 A. */
const CHANNEL_WATTS = (12 - 3 * 3) * 0.03;
/** No heat at all in the chip: only the air around it counts. */
const coldChip = { supply: { volts: 9 } };

const minVolts = (volts: number) => ({ supply: { minVolts: volts, volts: 12, maxVolts: 12 } });

export const currentSourceRows: FindingRow[] = [
  linear.note('field-built', /common practice/, {}, null),
  linear.softStop(
    'no-headroom',
    /datasheet/,
    minVolts(LINEAR_VOLTS * UNDER),
    minVolts(LINEAR_VOLTS * AT_LEAST),
  ),
  linear.softStop(
    'junction-too-hot',
    /datasheet/,
    { maxJunctionCelsius: JUNCTION * UNDER },
    { maxJunctionCelsius: JUNCTION * AT_LEAST },
  ),
  linear.caution('led-max-amps-not-given', /datasheet/, { 'led.maxAmps': undefined }, {}),
  linear.softStop(
    'source-over-led-amps',
    /datasheet.*60063/,
    { 'led.maxAmps': SET_AMPS * UNDER },
    { 'led.maxAmps': SET_AMPS * AT_LEAST },
  ),
  // A tenth off either way is still near.
  linear.note(
    'forward-volts-at-other-amps',
    /datasheet/,
    { 'led.amps': 0.1 + 0.01 * OVER },
    { 'led.amps': 0.1 + 0.01 * AT_MOST },
  ),
  linear.hardStop(
    'regulator-over-volts',
    /datasheet/,
    { maxDifferenceVolts: DIFFERENCE_VOLTS * UNDER },
    { maxDifferenceVolts: DIFFERENCE_VOLTS * AT_LEAST },
  ),
  linear.softStop(
    'under-min-load',
    /datasheet/,
    { minLoadAmps: SET_AMPS * OVER },
    { minLoadAmps: SET_AMPS * AT_MOST },
  ),
  linear.note('reference-spread-not-given', /datasheet/, { referenceMaxVolts: undefined }, {}),
  // Of 12 V the two LEDs use 6.4 V.
  linear.note(
    'switching-wastes-less',
    /datasheet/,
    { switchingEfficiencyPct: (640 / 12) * OVER },
    { switchingEfficiencyPct: (640 / 12) * AT_MOST },
  ),
  linear.note(
    'switching-efficiency-assumed',
    /common practice/,
    { switchingEfficiencyPct: undefined },
    { switchingEfficiencyPct: 85 },
  ),
  linear.note(
    'resistor-would-do',
    /common practice/,
    { 'led.maxAmps': RESISTOR_MOST_AMPS * AT_LEAST },
    { 'led.maxAmps': RESISTOR_MOST_AMPS * UNDER },
  ),

  sink.note('field-built', /common practice/, {}, null),
  sink.softStop('no-headroom', /datasheet/, minVolts(SINK_VOLTS * UNDER), minVolts(SINK_VOLTS * AT_LEAST)),
  sink.caution('led-max-amps-not-given', /datasheet/, { 'led.maxAmps': undefined }, {}),
  sink.softStop(
    'source-over-led-amps',
    /datasheet.*60063/,
    { 'led.maxAmps': SINK_AMPS * UNDER },
    { 'led.maxAmps': SINK_AMPS * AT_LEAST },
  ),
  sink.note(
    'forward-volts-at-other-amps',
    /datasheet/,
    { 'led.amps': 0.03 - 0.003 * OVER },
    { 'led.amps': 0.03 - 0.003 * AT_MOST },
  ),
  sink.hardStop(
    'channel-over-volts',
    /datasheet/,
    { maxChannelVolts: 12 * UNDER },
    { maxChannelVolts: 12 * AT_LEAST },
  ),
  sink.softStop(
    'channel-over-amps',
    /datasheet/,
    { maxChannelAmps: SINK_AMPS * UNDER },
    { maxChannelAmps: SINK_AMPS * AT_LEAST },
  ),
  sink.note('channel-tolerance-not-given', /datasheet/, { channelTolerancePct: undefined }, {}),
  sink.softStop(
    'one-string-too-hot',
    /datasheet/,
    { maxPackageWatts: CHANNEL_WATTS * UNDER },
    { maxPackageWatts: CHANNEL_WATTS * AT_LEAST },
  ),
  sink.note(
    'boards-by-heat',
    /datasheet/,
    { maxPackageWatts: 16 * CHANNEL_WATTS * UNDER },
    { maxPackageWatts: 16 * CHANNEL_WATTS * AT_LEAST },
  ),
  sink.caution('junction-not-checked', /datasheet/, { maxJunctionCelsius: undefined }, {}),
  sink.softStop(
    'junction-too-hot',
    /datasheet/,
    { ...coldChip, ambientCelsius: 125 * OVER },
    { ...coldChip, ambientCelsius: 125 * AT_MOST },
  ),
];
