/** A tape run as it would be wired, and its volts along the length, drawn from the solved circuit. */
import type { TapeResult } from '@/lib/circuits/schema/figure';
import type { TapeRun } from '@/lib/circuits/schema/electrical';
import { formatLength, formatNumber, formatWireSize } from '@/lib/units';
import type { ShopSettings } from '@/lib/units/settings';
import { Box, Label, STROKE, Wire } from './symbols';

const LEFT = 118;
const RIGHT = 346;
const TOP = 74;
const BOTTOM = 124;
const SEGMENTS = 9;

const FED_AT = { start: 'the start', end: 'the end', both: 'both ends', middle: 'the middle' } as const;

export function describeTape(run: TapeRun, result: TapeResult, settings: ShopSettings): string {
  const feeder = `${formatLength(run.driverMetres, settings)} of ${formatWireSize(run.feederSize)}`;
  return (
    `Driver of ${formatNumber(run.driver?.volts ?? 0)} volts, feeder ${feeder}, to ${formatLength(run.runMetres, settings)} of tape ` +
    `with ${result.loadVolts.length} segments, fed at ${FED_AT[run.feed]}. ` +
    `Volts along the run between ${formatNumber(result.maxVolts, 2)} and ${formatNumber(result.minVolts, 2)}.`
  );
}

function Feeders({ run }: { run: TapeRun }) {
  const middle = (LEFT + RIGHT) / 2;
  const far = run.feed === 'both' || run.feed === 'end';
  return (
    <>
      {run.feed === 'start' || run.feed === 'both' ? (
        <>
          <Wire
            points={[
              [82, TOP],
              [LEFT, TOP],
            ]}
          />
          <Wire
            points={[
              [82, BOTTOM],
              [LEFT, BOTTOM],
            ]}
          />
        </>
      ) : null}
      {far ? (
        <>
          <Wire
            points={[
              [70, 66],
              [70, 40],
              [RIGHT, 40],
              [RIGHT, TOP],
            ]}
          />
          <Wire
            points={[
              [70, 132],
              [70, 158],
              [RIGHT, 158],
              [RIGHT, BOTTOM],
            ]}
          />
        </>
      ) : null}
      {run.feed === 'middle' ? (
        <>
          <Wire
            points={[
              [70, 66],
              [70, 40],
              [middle, 40],
              [middle, TOP],
            ]}
          />
          <Wire
            points={[
              [70, 132],
              [70, 158],
              [middle, 158],
              [middle, BOTTOM],
            ]}
          />
        </>
      ) : null}
    </>
  );
}

function Segments({ result }: { result: TapeResult }) {
  const brightest = Math.max(...result.loadAmps, 1e-12);
  const count = result.loadAmps.length;
  return (
    <>
      {Array.from({ length: SEGMENTS }, (_, index) => {
        const x = LEFT + ((index + 0.5) / SEGMENTS) * (RIGHT - LEFT);
        const at = Math.min(count - 1, Math.floor(((index + 0.5) / SEGMENTS) * count));
        const light = Math.max(0, (result.loadAmps[at] ?? 0) / brightest);
        return (
          <g key={index}>
            <Wire
              points={[
                [x, TOP],
                [x, 91],
              ]}
            />
            <g transform={`rotate(90 ${x} 99)`}>
              <path
                d={`M${x - 7} 92 L${x + 7} 99 L${x - 7} 106 Z`}
                {...STROKE}
                fill="currentColor"
                fillOpacity={light}
              />
              <path d={`M${x + 7} 92 V106`} {...STROKE} />
            </g>
            <Wire
              points={[
                [x, 106],
                [x, BOTTOM],
              ]}
            />
          </g>
        );
      })}
    </>
  );
}

export function TapeDiagram({
  run,
  result,
  settings,
}: {
  run: TapeRun;
  result: TapeResult;
  settings: ShopSettings;
}) {
  const amps = result.feeds.reduce((sum, feed) => sum + feed.amps, 0);
  const first = result.loadVolts[0] ?? 0;
  const last = result.loadVolts[result.loadVolts.length - 1] ?? 0;
  return (
    <svg
      viewBox="0 0 360 212"
      role="img"
      aria-label={describeTape(run, result, settings)}
      className="block w-full max-w-3xl"
    >
      <Feeders run={run} />
      <Box x={10} y={66} width={72} height={66} />
      <Label x={46} y={86} bold>
        driver
      </Label>
      <Label x={46} y={104}>{`${formatNumber(run.driver?.volts ?? 0, 1)} V`}</Label>
      <Label x={46} y={122}>{`${formatNumber(amps, 2)} A`}</Label>
      <Label x={88} y={68} anchor="start">
        +
      </Label>
      <Label x={88} y={138} anchor="start">
        −
      </Label>
      <Wire
        heavy
        points={[
          [LEFT, TOP],
          [RIGHT, TOP],
        ]}
      />
      <Wire
        heavy
        points={[
          [LEFT, BOTTOM],
          [RIGHT, BOTTOM],
        ]}
      />
      <Segments result={result} />
      <Label x={10} y={18} anchor="start">
        {`${formatLength(run.driverMetres, settings)}, ${formatWireSize(run.feederSize)}, to the tape`}
      </Label>
      <Label
        x={10}
        y={180}
        anchor="start"
      >{`${formatLength(run.runMetres, settings)} tape, ${result.loadVolts.length} segments`}</Label>
      <Label x={10} y={200} anchor="start">{`start ${formatNumber(first, 2)} V`}</Label>
      <Label x={346} y={200} anchor="end">{`end ${formatNumber(last, 2)} V`}</Label>
    </svg>
  );
}

/** At most `most` points of a long list, ends kept: a plot is not finer than its pixels. */
function thinned(values: readonly number[], most: number): { at: number; value: number }[] {
  const step = Math.max(1, Math.ceil(values.length / most));
  return values.flatMap((value, index) =>
    index % step === 0 || index === values.length - 1 ? [{ at: (index + 0.5) / values.length, value }] : [],
  );
}

export function TapePlot({
  run,
  result,
  bothEnds,
  settings,
}: {
  run: TapeRun;
  result: TapeResult;
  bothEnds: TapeResult | null;
  settings: ShopSettings;
}) {
  const supply = run.driver?.volts ?? result.maxVolts;
  const limit = supply * (1 - run.maxDropPct / 100);
  const low = Math.min(result.minVolts, bothEnds?.minVolts ?? Infinity, limit);
  const floor = supply - Math.max(0.5, (supply - low) * 1.15);
  const y = (volts: number) => 12 + ((supply - volts) / (supply - floor)) * 120;
  const x = (at: number) => 52 + at * 296;
  const path = (values: readonly number[]) =>
    thinned(values, 120)
      .map(({ at, value }, index) => `${index === 0 ? 'M' : 'L'}${x(at).toFixed(1)} ${y(value).toFixed(1)}`)
      .join(' ');
  return (
    <svg
      viewBox="0 0 360 166"
      role="img"
      aria-label={`Volts along the run: lowest ${formatNumber(result.minVolts, 2)} V; the limit of ${formatNumber(run.maxDropPct)} % is ${formatNumber(limit, 2)} V.`}
      className="block w-full max-w-3xl"
    >
      {[supply, (supply + floor) / 2, floor].map((volts) => (
        <g key={volts}>
          <path d={`M52 ${y(volts)} H348`} stroke="var(--rule)" />
          <Label x={46} y={y(volts) + 4} anchor="end">
            {formatNumber(volts, 1)}
          </Label>
        </g>
      ))}
      <path d={`M52 ${y(limit)} H348`} stroke="var(--danger)" strokeDasharray="6 4" />
      <text
        x={348}
        y={y(limit) - 4}
        textAnchor="end"
        fontSize={11}
        fill="var(--danger)"
        className="font-mono"
      >
        {`limit ${formatNumber(limit, 2)} V`}
      </text>
      {bothEnds && run.feed !== 'both' ? (
        <path d={path(bothEnds.loadVolts)} {...STROKE} strokeDasharray="2 4" strokeWidth={2} />
      ) : null}
      <path d={path(result.loadVolts)} {...STROKE} strokeWidth={2.5} />
      <Label x={52} y={158} anchor="start">
        0
      </Label>
      <Label x={348} y={158} anchor="end">
        {formatLength(run.runMetres, settings)}
      </Label>
      <Label x={200} y={158}>
        {bothEnds && run.feed !== 'both' ? 'V; dotted: both ends' : 'volts'}
      </Label>
    </svg>
  );
}
