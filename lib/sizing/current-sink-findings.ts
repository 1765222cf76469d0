/** What is wrong with a multi-channel sink, or worth knowing before it is built. */
import { atMost, type Finding } from '@/lib/engine/contract';
import { caution, hardStop, note, softStop } from '@/lib/engine/finding';
import { fieldBuilt } from './bench-work';
import { DATASHEET, junctionFindings, ledFindings, noHeadroom } from './constant-current';
import type { Case, CurrentSink } from './current-sink';
import { nextPreferred } from './e-series';

/** Limits of one channel. */
function channelFindings({ input, supply }: Case, { ampsPerChannel }: CurrentSink): Finding[] {
  const { maxChannelAmps, maxChannelVolts, channelTolerancePct } = input;
  const findings: Finding[] = [];
  if (maxChannelVolts !== undefined && !atMost(supply.maxVolts, maxChannelVolts))
    findings.push(
      hardStop(
        'channel-over-volts',
        `A channel that is off sees up to ${supply.maxVolts} V, above its ${maxChannelVolts} V.`,
        { supplyVolts: supply.maxVolts, maxChannelVolts },
        DATASHEET,
      ),
    );
  if (maxChannelAmps !== undefined && ampsPerChannel !== null && !atMost(ampsPerChannel, maxChannelAmps))
    findings.push(
      softStop(
        'channel-over-amps',
        `A channel is set to ${ampsPerChannel} A, above its ${maxChannelAmps} A.`,
        { amps: ampsPerChannel, maxChannelAmps },
        DATASHEET,
      ),
    );
  if (channelTolerancePct === undefined)
    findings.push(
      note(
        'channel-tolerance-not-given',
        'All channels are taken to give just what is set: how far they stray is not given.',
        {},
        DATASHEET,
      ),
    );
  return findings;
}

/** What heat allows: not one string, fewer than there are channels, or nobody knows. */
function heatFindings(c: Case, result: CurrentSink): Finding[] {
  const { input, junctionWatts } = c;
  const { channelWatts, boards, stringsPerBoard, governedBy, junctionCelsius } = result;
  const findings: Finding[] = [];
  if (channelWatts !== null && boards === null)
    findings.push(
      softStop(
        'one-string-too-hot',
        `One string alone leaves ${channelWatts} W in the package, which takes ${Math.min(input.maxPackageWatts, junctionWatts ?? Infinity)} W.`,
        { watts: channelWatts, limitWatts: Math.min(input.maxPackageWatts, junctionWatts ?? Infinity) },
        DATASHEET,
      ),
    );
  if (boards !== null && governedBy !== 'channels')
    findings.push(
      note(
        'boards-by-heat',
        `Heat leaves room for fewer strings on a board than it has channels: ${stringsPerBoard} of ${input.channels}, on ${boards} boards.`,
        { stringsPerBoard, channels: input.channels, boards },
        DATASHEET,
      ),
    );
  if (input.maxJunctionCelsius === undefined)
    findings.push(
      caution(
        'junction-not-checked',
        `Whether the chip takes ${junctionCelsius ?? 'its'} C at its junction is not checked: its limit is not given.`,
        { junctionCelsius },
        DATASHEET,
      ),
    );
  else if (result.packageWatts !== null)
    // Boards are chosen by it: only air that is hotter than the junction may be is left to say.
    findings.push(
      ...junctionFindings({ ...input, maxJunctionCelsius: input.maxJunctionCelsius }, result.packageWatts),
    );
  return findings;
}

export function findingsOf(c: Case, result: CurrentSink): Finding[] {
  const { input, supply, tolerance } = c;
  const safer = (maxAmps: number) =>
    nextPreferred((input.referenceVolts * input.currentRatio * (1 + tolerance)) / maxAmps, input.series);
  return [
    fieldBuilt(),
    ...(result.headroomVolts >= 0
      ? []
      : [noHeadroom(input.perString, result.headroomVolts, supply.minVolts)]),
    ...ledFindings(input.led, input.ampsPerChannel, result.ampsPerChannelMax, safer),
    ...channelFindings(c, result),
    ...heatFindings(c, result),
  ];
}
