/** A saving in two pictures, in ink: energy by area before and after, and the money over the years. Print as they stand. */
import { formatNumber } from '@/lib/units';

/** Narrow, so that its letters are read on a phone. */
const WIDTH = 420;
const LEFT = 120;
const ROW = 46;

interface Bar {
  area: string;
  kilowattHoursBefore: number;
  kilowattHoursAfter: number;
}

const short = (name: string) => (name.length > 14 ? `${name.slice(0, 13)}…` : name);

/** Before drawn open, after drawn full: told apart without colour. */
export function EnergyBars({ areas }: { areas: readonly Bar[] }) {
  const most = Math.max(
    1e-9,
    ...areas.map((one) => Math.max(one.kilowattHoursBefore, one.kilowattHoursAfter)),
  );
  const scale = (value: number) => (value / most) * (WIDTH - LEFT - 70);
  const words = areas
    .map(
      (one) =>
        `${one.area}: ${formatNumber(one.kilowattHoursBefore, 0)} kWh a year before, ${formatNumber(one.kilowattHoursAfter, 0)} after.`,
    )
    .join(' ');
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${areas.length * ROW + 6}`}
        role="img"
        aria-label={`Energy by area. ${words}`}
        className="w-full max-w-2xl text-ink"
      >
        {areas.map((one, index) => {
          const y = index * ROW + 6;
          const [before, after] = [scale(one.kilowattHoursBefore), scale(one.kilowattHoursAfter)];
          return (
            <g key={one.area} fontSize={15} fill="currentColor">
              <text x={LEFT - 10} y={y + 22} textAnchor="end">
                {short(one.area)}
              </text>
              <rect
                x={LEFT}
                y={y}
                width={Math.max(1, before)}
                height={14}
                fill="none"
                stroke="currentColor"
                strokeWidth={1.5}
              />
              <text x={LEFT + before + 8} y={y + 13} fontSize={13} className="font-mono">
                {formatNumber(one.kilowattHoursBefore, 0)}
              </text>
              <rect
                x={LEFT}
                y={y + 18}
                width={Math.max(1, after)}
                height={14}
                stroke="currentColor"
                strokeWidth={1.5}
              />
              <text x={LEFT + after + 8} y={y + 31} fontSize={13} className="font-mono">
                {formatNumber(one.kilowattHoursAfter, 0)}
              </text>
            </g>
          );
        })}
      </svg>
      <figcaption className="mt-1 text-sm text-ink-2">
        kWh a year by area: open bars today, full bars after the work.
      </figcaption>
    </figure>
  );
}

const HEIGHT = 230;
const PAD = 16;

/** What the work has cost or brought by the end of each year, not discounted. */
export function MoneyOverTime({
  flows,
  money,
  paybackYears,
}: {
  flows: readonly number[];
  money: (units: number) => string;
  paybackYears: number | null;
}) {
  const sums = flows.map((_, year) => flows.slice(0, year + 1).reduce((sum, own) => sum + own, 0));
  const [low, high] = [Math.min(0, ...sums), Math.max(0, ...sums)];
  const span = Math.max(1e-9, high - low);
  const x = (year: number) => PAD + (year / Math.max(1, flows.length - 1)) * (WIDTH - 2 * PAD);
  const y = (value: number) => 20 + ((high - value) / span) * (HEIGHT - 60);
  const last = flows.length - 1;
  return (
    <figure>
      <svg
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        role="img"
        aria-label={`Money over ${last} years: ${money(sums[0] ?? 0)} at the start, ${money(sums[last] ?? 0)} at the end.${paybackYears === null ? '' : ` Paid back after ${formatNumber(paybackYears, 1)} years.`}`}
        className="w-full max-w-2xl text-ink"
      >
        <g fontSize={14} fill="currentColor" stroke="none">
          <line x1={PAD} x2={WIDTH - PAD} y1={y(0)} y2={y(0)} stroke="currentColor" strokeDasharray="5 4" />
          <polyline
            points={sums.map((sum, year) => `${x(year)},${y(sum)}`).join(' ')}
            fill="none"
            stroke="currentColor"
            strokeWidth={3}
          />
          {sums.map((sum, year) => (
            <circle key={year} cx={x(year)} cy={y(sum)} r={3.5} />
          ))}
          {paybackYears !== null && paybackYears > 0 && paybackYears <= last ? (
            <g>
              <line
                x1={x(paybackYears)}
                x2={x(paybackYears)}
                y1={y(0) - 16}
                y2={y(0) + 16}
                stroke="currentColor"
                strokeWidth={2}
              />
              <text x={x(paybackYears) + 8} y={y(0) + 20}>
                paid back
              </text>
            </g>
          ) : null}
          <text x={PAD} y={Math.min(HEIGHT - 26, y(sums[0] ?? 0) + 22)} className="font-mono">
            {money(sums[0] ?? 0)}
          </text>
          <text x={WIDTH - PAD} y={y(sums[last] ?? 0) - 10} textAnchor="end" className="font-mono">
            {money(sums[last] ?? 0)}
          </text>
          <text x={PAD} y={HEIGHT - 6}>
            start
          </text>
          <text x={WIDTH - PAD} y={HEIGHT - 6} textAnchor="end">
            {last} years
          </text>
        </g>
      </svg>
      <figcaption className="mt-1 text-sm text-ink-2">
        Savings less the cost of the work, added up year by year, not discounted.
      </figcaption>
    </figure>
  );
}
