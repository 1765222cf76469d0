/** Strings of LEDs, each with its ballast resistor. */
import type { ResistorArray } from '@/lib/circuits/schema/electrical';
import { formatFigure, formatNumber } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { Label, Led, Resistor, Wire } from './symbols';

export interface ArrayString {
  leds: number;
  ballastOhms: number | null;
  amps: number | null;
  ballastRatedWatts: number | null;
}

const STRINGS = 4;
const LEDS = 5;

const ohms = (value: number | null, settings: ShopSettings) => {
  if (value === null) return '–';
  const figure = formatFigure(value, 'ohm', settings);
  return `${figure.value} ${figure.unit}`;
};

export function describeArray(array: ResistorArray, strings: ArrayString[], settings: ShopSettings): string {
  const lines = strings.map(
    (one, index) =>
      `string ${index + 1}: ${one.leds} LEDs with ${ohms(one.ballastOhms, settings)}, ${formatNumber((one.amps ?? 0) * 1000, 1)} milliamperes`,
  );
  return `Supply of ${formatNumber(array.supplyVolts)} volts across ${strings.length} strings in parallel. ${lines.join('; ')}.`;
}

export function ArrayDiagram({
  array,
  strings,
  settings,
}: {
  array: ResistorArray;
  strings: ArrayString[];
  settings: ShopSettings;
}) {
  const drawn = strings.slice(0, STRINGS);
  const rows = drawn.length;
  const height = 56 + rows * 46;
  const y = (index: number) => 48 + index * 46;
  return (
    <svg
      viewBox={`0 0 360 ${height}`}
      role="img"
      aria-label={describeArray(array, strings, settings)}
      className="block w-full max-w-3xl"
    >
      <Label x={10} y={18} anchor="start" bold>{`${formatNumber(array.supplyVolts)} V`}</Label>
      <Label x={350} y={18} anchor="end">
        {strings.length > rows
          ? `${strings.length} strings, ${rows} drawn`
          : `${strings.length} ${strings.length === 1 ? 'string' : 'strings'}`}
      </Label>
      <Wire
        points={[
          [16, 28],
          [16, y(rows - 1)],
        ]}
        heavy
      />
      <Wire
        points={[
          [344, y(0)],
          [344, y(rows - 1) + 10],
        ]}
        heavy
      />
      <Label x={24} y={32} anchor="start">
        +
      </Label>
      <Label x={336} y={y(rows - 1) + 18} anchor="end">
        −
      </Label>
      {drawn.map((one, index) => {
        const leds = Math.min(one.leds, LEDS);
        return (
          <g key={index}>
            <Wire
              points={[
                [16, y(index)],
                [344, y(index)],
              ]}
            />
            <Resistor x={70} y={y(index)} basis={settings.basis} />
            <Label x={70} y={y(index) + 20}>
              {ohms(one.ballastOhms, settings)}
            </Label>
            {Array.from({ length: leds }, (_, led) => (
              <Led key={led} x={126 + led * 34} y={y(index)} />
            ))}
            {one.leds > leds ? (
              <Label x={306} y={y(index) + 20} anchor="end">{`${one.leds} in series`}</Label>
            ) : null}
          </g>
        );
      })}
    </svg>
  );
}
