/**
 * Symbols by the shop's basis: IEC 60617 or IEEE 315 (resistor as rectangle or zigzag; lamp as crossed circle in
 * both). Strokes follow the text colour, so that screen, dark mode and print agree.
 */
export type Basis = 'us' | 'iec';

export const STROKE = { stroke: 'currentColor', strokeWidth: 1.6, fill: 'none' } as const;

export function Label({
  x,
  y,
  children,
  anchor = 'middle',
  bold,
}: {
  x: number;
  y: number;
  children: React.ReactNode;
  anchor?: 'start' | 'middle' | 'end';
  bold?: boolean;
}) {
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      fontSize={12}
      fontWeight={bold ? 700 : 400}
      fill="currentColor"
      className="font-mono"
    >
      {children}
    </text>
  );
}

/** A wire along points. */
export function Wire({
  points,
  dashed,
  heavy,
}: {
  points: [number, number][];
  dashed?: boolean;
  heavy?: boolean;
}) {
  return (
    <polyline
      points={points.map((point) => point.join(',')).join(' ')}
      {...STROKE}
      strokeWidth={heavy ? 3 : 1.6}
      strokeDasharray={dashed ? '4 4' : undefined}
    />
  );
}

/** A horizontal resistor, 36 long, centred. IEC 60617 04-01-01: rectangle; IEEE 315: zigzag. */
export function Resistor({ x, y, basis }: { x: number; y: number; basis: Basis }) {
  if (basis === 'iec')
    return <rect x={x - 18} y={y - 6} width={36} height={12} {...STROKE} fill="var(--sheet)" />;
  const zig = [-18, -15, -9, -3, 3, 9, 15, 18].map(
    (dx, i) => `${x + dx},${y + (i === 0 || i === 7 ? 0 : i % 2 ? -6 : 6)}`,
  );
  return (
    <>
      <rect x={x - 18} y={y - 3} width={36} height={6} fill="var(--sheet)" />
      <polyline points={zig.join(' ')} {...STROKE} />
    </>
  );
}

/** A light-emitting diode pointing right (IEC 60617 05-03-02, IEEE 315 8.5.3): triangle, bar and two arrows. */
export function Led({ x, y, opacity = 1 }: { x: number; y: number; opacity?: number }) {
  return (
    <g {...STROKE} strokeWidth={1.3}>
      <path
        d={`M${x - 6} ${y - 7} L${x + 6} ${y} L${x - 6} ${y + 7} Z`}
        fill="currentColor"
        fillOpacity={opacity}
      />
      <path d={`M${x + 6} ${y - 7} V${y + 7}`} />
      <path
        d={`M${x} ${y - 9} l5 -6 M${x + 5} ${y - 15} l-3.6 .8 M${x + 5} ${y - 15} l-.4 3.6`}
        strokeWidth={1}
      />
      <path
        d={`M${x + 6} ${y - 9} l5 -6 M${x + 11} ${y - 15} l-3.6 .8 M${x + 11} ${y - 15} l-.4 3.6`}
        strokeWidth={1}
      />
    </g>
  );
}

/** A luminaire: crossed circle (IEC 60617 11-15-01; the lamp of IEEE 315 in architectural use). */
export function Lamp({ x, y, r = 10 }: { x: number; y: number; r?: number }) {
  const d = r * Math.SQRT1_2;
  return (
    <g {...STROKE}>
      <circle cx={x} cy={y} r={r} fill="var(--sheet)" />
      <path d={`M${x - d} ${y - d} L${x + d} ${y + d} M${x + d} ${y - d} L${x - d} ${y + d}`} />
    </g>
  );
}

/** A circuit-breaker in the line: IEC 60617 07-13-05 (contact with cross), IEEE 315 11.2 (arc over the gap). */
export function Breaker({ x, y, basis }: { x: number; y: number; basis: Basis }) {
  if (basis === 'us')
    return (
      <g {...STROKE}>
        <circle cx={x - 14} cy={y} r={2.5} fill="currentColor" />
        <circle cx={x + 14} cy={y} r={2.5} fill="currentColor" />
        <path d={`M${x - 14} ${y - 5} Q${x} ${y - 18} ${x + 14} ${y - 5}`} />
      </g>
    );
  return (
    <g {...STROKE}>
      <path d={`M${x - 14} ${y} L${x + 12} ${y - 12}`} />
      <path d={`M${x + 10} ${y - 4} l8 8 M${x + 18} ${y - 4} l-8 8`} />
    </g>
  );
}

export function Box({ x, y, width, height }: { x: number; y: number; width: number; height: number }) {
  return (
    <rect x={x} y={y} width={width} height={height} rx={2} {...STROKE} fill="var(--sheet)" strokeWidth={2} />
  );
}
