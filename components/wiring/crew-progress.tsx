/** What the crew has done on the newest copy, as the desk reads it: ticks, readings against their bands, what was said. */
import { cx } from '@/components/ui/cx';
import { KeyFigure } from '@/components/ui/sheet';
import { message, type MessageKey } from '@/lib/messages';
import { formatDateTime, formatNumber } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { type Measured, type Progress, verdictOf } from '@/lib/wiring/schema/events';
import {
  type ExpectedReading,
  type SheetCircuit,
  stepsOfSheet,
  type WiringSheet,
} from '@/lib/wiring/schema/sheet';
import { readingName, scaleOf } from './reading-names';

interface Props {
  sheet: WiringSheet;
  progress: Progress;
  settings: ShopSettings;
}

function Row({
  reading,
  circuit,
  measured,
  settings,
}: {
  reading: ExpectedReading;
  circuit: SheetCircuit;
  measured: Measured | undefined;
  settings: ShopSettings;
}) {
  const { factor, unit, decimals } = scaleOf(reading);
  const show = (value: number) => formatNumber(value * factor, decimals);
  const verdict = verdictOf(reading, measured);
  const expected = `${show(reading.low)} to ${show(reading.high)} ${unit}`;
  return (
    <tr className="border-t border-rule">
      <th scope="row" className="py-2 pr-4 text-left font-normal">
        {readingName(reading, circuit.readings, settings)}
        {/* A phone has no width for a column of its own. */}
        <span className="block font-mono text-sm text-ink-2 sm:hidden">{expected}</span>
      </th>
      <td className="px-2 py-2 text-right font-mono whitespace-nowrap max-sm:hidden">{expected}</td>
      <td className="px-2 py-2 text-right font-mono font-bold whitespace-nowrap text-measured">
        {measured?.value === undefined || measured.value === null ? '–' : `${show(measured.value)} ${unit}`}
      </td>
      <td className={cx('py-2 pl-2', verdict === 'out' && 'font-bold text-danger')}>
        {verdict
          ? message(`wiring.verdict.${verdict}` as MessageKey)
          : measured
            ? message('wiring.reading.skipped')
            : 'not read yet'}
        {measured?.note ? <span className="block text-sm text-ink-2">{measured.note}</span> : null}
      </td>
    </tr>
  );
}

export function ReadingsTable({ sheet, progress, settings }: Props) {
  const circuits = sheet.circuits.filter((circuit) => circuit.readings.length > 0);
  if (circuits.length === 0) return <p className="text-ink-2">This sheet asks for no readings.</p>;
  return (
    <div className="flex flex-col gap-5">
      {circuits.map((circuit) => (
        <div key={circuit.id} className="overflow-x-auto">
          <table className="w-full border-collapse">
            <caption className="pb-1 text-left font-bold">{circuit.name}</caption>
            <thead>
              <tr className="text-sm text-ink-2">
                <th scope="col" className="pr-4 text-left font-normal">
                  Reading
                </th>
                <th scope="col" className="px-2 text-right font-normal max-sm:hidden">
                  Expected
                </th>
                <th scope="col" className="px-2 text-right font-normal">
                  Measured
                </th>
                <th scope="col" className="pl-2 text-left font-normal">
                  Band
                </th>
              </tr>
            </thead>
            <tbody>
              {circuit.readings.map((reading) => (
                <Row
                  key={reading.id}
                  reading={reading}
                  circuit={circuit}
                  measured={progress.readings.get(reading.id)}
                  settings={settings}
                />
              ))}
            </tbody>
          </table>
        </div>
      ))}
    </div>
  );
}

function subjectOf(sheet: WiringSheet, target: string): string {
  const circuit = sheet.circuits.find((one) => one.id === target);
  const change = sheet.changes.find((one) => one.id === target);
  return circuit?.name ?? change?.description ?? '';
}

export function CrewProgress({ sheet, progress, settings }: Props) {
  const steps = stepsOfSheet(sheet);
  const ticked = steps.filter((step) => progress.ticks.has(step.id)).length;
  const when = (at: string) => formatDateTime(at, settings);
  const { deadProved, signedOff } = progress;
  return (
    <div className="flex flex-col gap-4">
      <dl>
        <KeyFigure label="Cautions acknowledged by" value={String(progress.acknowledged.size)} />
        <KeyFigure label="Steps ticked" value={`${ticked} of ${steps.length}`} />
      </dl>
      <ul className="flex flex-col gap-1">
        {[...progress.acknowledged.values()].map((one) => (
          <li key={`${one.name}${one.at}`}>
            ✓ cautions: {one.name}, {when(one.at)}
          </li>
        ))}
        {deadProved ? (
          <li>
            ✓ {message('wiring.dead.done')}: {deadProved.note} {deadProved.name}, {when(deadProved.at)}
          </li>
        ) : null}
        {signedOff ? (
          <li>
            ✓ signed off: {signedOff.name}, {when(signedOff.at)}
          </li>
        ) : null}
      </ul>
      {progress.said.length > 0 ? (
        <ul className="flex flex-col gap-2 border-t border-rule pt-3">
          {progress.said.map((one) => (
            <li key={one.id} className="break-words whitespace-pre-line">
              <strong>{message(`wiring.say.${one.kind}`)}: </strong>
              {subjectOf(sheet, one.target) ? `${subjectOf(sheet, one.target)}. ` : ''}
              {one.text}{' '}
              <span className="text-sm text-ink-2">
                {one.by}, {when(one.at)}
              </span>
            </li>
          ))}
        </ul>
      ) : null}
    </div>
  );
}
