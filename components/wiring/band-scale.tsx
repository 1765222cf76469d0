/** A reading on its band, drawn: the expected band as a box, what is near it dashed, the measured value as a pointer. */
import { message } from '@/lib/messages';
import { formatNumber } from '@/lib/units';

const WIDTH = 320;
const EDGE = 14;
/** The scale reaches this many half bands beyond the band on either side; what lies further is drawn at the edge. */
const BEYOND = 3;

export interface ScaleBand {
  low: number;
  high: number;
  nominal: number;
}

/** @returns where a value stands on the scale, and whether it lies beyond its edge. */
export function placeOnScale(
  band: Pick<ScaleBand, 'low' | 'high'>,
  value: number,
): { x: number; beyond: boolean } {
  const half = Math.max((band.high - band.low) / 2, 1e-12);
  const from = band.low - BEYOND * half;
  const share = (value - from) / ((2 + 2 * BEYOND) * half);
  const x = EDGE + Math.min(1, Math.max(0, share)) * (WIDTH - 2 * EDGE);
  return { x, beyond: share < 0 || share > 1 };
}

export function BandScale({
  band,
  value,
  factor,
  unit,
  decimals,
}: {
  band: ScaleBand;
  value: number | null;
  factor: number;
  unit: string;
  decimals: number;
}) {
  const show = (amount: number) => formatNumber(amount * factor, decimals);
  const half = (band.high - band.low) / 2;
  const x = (amount: number) => placeOnScale(band, amount).x;
  const pointer = value === null ? null : placeOnScale(band, value);
  const label =
    `${message('wiring.reading.expected')} ${show(band.low)} to ${show(band.high)} ${unit}` +
    (value === null ? '' : `; ${show(value)} ${unit}`);
  return (
    <svg viewBox={`0 0 ${WIDTH} 74`} role="img" aria-label={label} className="block w-full max-w-md">
      <path d={`M${EDGE} 42 H${WIDTH - EDGE}`} stroke="var(--rule-strong)" strokeWidth={2} />
      <rect
        x={x(band.low - half)}
        y={36}
        width={x(band.high + half) - x(band.low - half)}
        height={12}
        fill="none"
        stroke="var(--rule-strong)"
        strokeDasharray="3 3"
      />
      <rect
        x={x(band.low)}
        y={32}
        width={x(band.high) - x(band.low)}
        height={20}
        fill="var(--sheet)"
        stroke="currentColor"
        strokeWidth={2}
      />
      <path d={`M${x(band.nominal)} 30 V54`} stroke="currentColor" strokeWidth={2} />
      <text
        x={x(band.low)}
        y={68}
        textAnchor="middle"
        fontSize={13}
        fill="currentColor"
        className="font-mono"
      >
        {show(band.low)}
      </text>
      <text
        x={x(band.high)}
        y={68}
        textAnchor="middle"
        fontSize={13}
        fill="currentColor"
        className="font-mono"
      >
        {show(band.high)}
      </text>
      <text x={WIDTH - EDGE} y={68} textAnchor="end" fontSize={13} fill="var(--ink-2)" className="font-mono">
        {unit}
      </text>
      <text x={EDGE} y={68} fontSize={13} fill="var(--ink-2)">
        {message('wiring.reading.expected')}
      </text>
      {pointer ? (
        <g fill="var(--measured)" stroke="var(--measured)">
          <path d={`M${pointer.x} 36 V50`} strokeWidth={3} />
          <path d={`M${pointer.x - 9} 10 H${pointer.x + 9} L${pointer.x} 36 Z`} stroke="none" />
        </g>
      ) : null}
    </svg>
  );
}
