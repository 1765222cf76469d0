/** How a multi-channel sink was figured. */
import type { WorkingInput, WorkingStep } from '@/lib/engine/contract';
import { DATASHEET, junctionStep } from './constant-current';
import type { Case, CurrentSink } from './current-sink';
import { E_SERIES_BASIS } from './tables/e-series';

const OHMS_LAW = "Ohm's law";
const given = (name: string, value: WorkingInput['value'], unit: string): WorkingInput => ({
  name,
  value,
  unit,
});

function current({ input, tolerance }: Case, r: CurrentSink): WorkingStep[] {
  const reference = given('Vref', input.referenceVolts, 'V');
  const ratio = given('ratio', input.currentRatio, '');
  return [
    {
      key: 'set-ohms-exact',
      name: 'Exact set resistor',
      formula: 'R = Vref * ratio / I',
      inputs: [reference, ratio, given('I', input.ampsPerChannel, 'A')],
      value: r.setOhmsExact,
      unit: 'ohm',
      basis: DATASHEET,
    },
    {
      key: 'set-ohms',
      name: 'Next standard value',
      formula: 'smallest preferred value not below R',
      inputs: [given('R', r.setOhmsExact, 'ohm'), given('series', input.series, '')],
      value: r.setOhms,
      unit: 'ohm',
      basis: E_SERIES_BASIS,
    },
    {
      key: 'channel-amps',
      name: 'Current of a channel with the chosen resistor',
      formula: 'I = Vref * ratio / R',
      inputs: [reference, ratio, given('R', r.setOhms, 'ohm')],
      value: r.ampsPerChannel,
      unit: 'A',
      basis: DATASHEET,
    },
    {
      key: 'channel-amps-max',
      name: 'Highest current of a channel',
      formula: 'Imax = Vref * ratio / R * (1 + tolerance)',
      inputs: [reference, ratio, given('R', r.setOhms, 'ohm'), given('tolerance', tolerance, '')],
      value: r.ampsPerChannelMax,
      unit: 'A',
      basis: DATASHEET,
    },
  ];
}

function heat({ input, supply, junctionWatts }: Case, r: CurrentSink): WorkingStep[] {
  const leds = given('n', input.perString, '');
  return [
    {
      key: 'headroom-volts',
      name: 'Volts to spare at the lowest supply',
      formula: 'Vmin - n * VfMax - dropout',
      inputs: [
        given('Vmin', supply.minVolts, 'V'),
        leds,
        given('VfMax', input.led.forwardVoltsMax, 'V'),
        given('dropout', input.dropoutVolts, 'V'),
      ],
      value: r.headroomVolts,
      unit: 'V',
      basis: DATASHEET,
    },
    {
      key: 'channel-watts-max',
      name: 'Worst watts of one channel',
      formula: 'P = (Vmax - n * VfMin) * Imax',
      inputs: [
        given('Vmax', supply.maxVolts, 'V'),
        leds,
        given('VfMin', input.led.forwardVoltsMin, 'V'),
        given('Imax', r.ampsPerChannelMax, 'A'),
      ],
      value: r.channelWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    {
      key: 'sink-boards',
      name: 'Boards',
      formula: 'strings / min(channels, package watts / P, junction watts / P rounded down), rounded up',
      inputs: [
        given('strings', input.strings, ''),
        given('channels', input.channels, ''),
        given('package watts', input.maxPackageWatts, 'W'),
        given('junction watts', junctionWatts, 'W'),
        given('P', r.channelWatts, 'W'),
      ],
      value: r.boards,
      unit: '',
      basis: DATASHEET,
    },
    {
      key: 'package-watts',
      name: 'Worst watts of the fullest board',
      formula: 'strings on it * P',
      inputs: [given('strings on it', r.stringsPerBoard, ''), given('P', r.channelWatts, 'W')],
      value: r.packageWatts,
      unit: 'W',
      basis: OHMS_LAW,
    },
    junctionStep(input, r.packageWatts),
  ];
}

export const workingOf = (c: Case, result: CurrentSink): WorkingStep[] => [
  ...current(c, result),
  ...heat(c, result),
];
