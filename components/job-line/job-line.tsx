/**
 * The job line: a job's path as a one-line diagram, source at the left, lamp at the right. A stage that was
 * reached is a closed switch on an amber (live) line; the one that waits stands open; beyond it the line is dotted.
 */
export interface JobLineStep {
  key: string;
  label: string;
  sub?: string | undefined;
  state: 'reached' | 'open' | 'beyond';
}

const WIDTH = 1000;
const SWITCH = 34;

function Source({ x, y, live }: { x: number; y: number; live: boolean }) {
  return (
    <g>
      <circle
        cx={x}
        cy={y}
        r={16}
        fill="var(--sheet)"
        stroke={live ? 'var(--live)' : 'var(--ink)'}
        strokeWidth={3}
      />
      <path d={`M${x - 8} ${y} q4 -9 8 0 t8 0`} fill="none" stroke="var(--ink)" strokeWidth={2.5} />
    </g>
  );
}

function Lamp({ x, y, lit }: { x: number; y: number; lit: boolean }) {
  const d = 10.6;
  return (
    <g stroke={lit ? 'var(--ink)' : 'var(--rule-strong)'} strokeWidth={2.5}>
      <circle cx={x} cy={y} r={15} fill={lit ? 'var(--live)' : 'var(--sheet)'} />
      <path d={`M${x - d} ${y - d} L${x + d} ${y + d} M${x + d} ${y - d} L${x - d} ${y + d}`} />
    </g>
  );
}

function Switch({ x, y, state }: { x: number; y: number; state: JobLineStep['state'] }) {
  const stroke = state === 'beyond' ? 'var(--rule-strong)' : 'var(--ink)';
  const left = x - SWITCH / 2;
  const right = x + SWITCH / 2;
  return (
    <g stroke={stroke} strokeWidth={3.5} fill={state === 'beyond' ? 'var(--sheet)' : stroke}>
      {state === 'reached' ? (
        <path d={`M${left} ${y} H${right}`} stroke="var(--live)" strokeWidth={6} />
      ) : (
        <path d={`M${left} ${y} L${right - 4} ${y - 17}`} strokeLinecap="round" />
      )}
      <circle cx={left} cy={y} r={5} />
      <circle cx={right} cy={y} r={5} fill={state === 'reached' ? stroke : 'var(--sheet)'} />
    </g>
  );
}

function Line({ from, to, y, live }: { from: number; to: number; y: number; live: boolean }) {
  return (
    <path
      d={`M${from} ${y} H${to}`}
      stroke={live ? 'var(--live)' : 'var(--rule-strong)'}
      strokeWidth={live ? 6 : 3}
      strokeDasharray={live ? undefined : '3 7'}
    />
  );
}

/** In words, for those who do not see the drawing. */
export function describeJobLine(steps: readonly JobLineStep[]): string {
  const reached = steps.filter((step) => step.state === 'reached').map((step) => step.label);
  const open = steps.find((step) => step.state === 'open');
  const done = reached.length > 0 ? `Reached: ${reached.join(', ')}.` : 'Nothing reached yet.';
  if (!open) return `${done} The job is paid and closed.`;
  return `${done} Waiting at ${open.label}${open.sub ? `: ${open.sub}` : ''}.`;
}

export function JobLine({
  steps,
  size = 'small',
}: {
  steps: readonly JobLineStep[];
  size?: 'small' | 'large';
}) {
  const y = 30;
  const first = 20;
  const last = WIDTH - 20;
  const gap = (last - first) / (steps.length + 1);
  const at = (index: number) => first + gap * (index + 1);
  const lit = steps.every((step) => step.state === 'reached');
  const live = (index: number) => steps.slice(0, index + 1).every((step) => step.state === 'reached');
  const open = steps.find((step) => step.state === 'open');
  return (
    <div className="min-w-0">
      <svg
        viewBox={`0 0 ${WIDTH} 52`}
        role="img"
        aria-label={describeJobLine(steps)}
        className="block w-full"
      >
        {steps.map((step, index) => (
          <Line
            key={step.key}
            from={index === 0 ? first + 16 : at(index - 1) + SWITCH / 2}
            to={at(index) - SWITCH / 2}
            y={y}
            live={index === 0 || live(index - 1)}
          />
        ))}
        <Line from={at(steps.length - 1) + SWITCH / 2} to={last - 15} y={y} live={lit} />
        <Source x={first} y={y} live />
        {steps.map((step, index) => (
          <Switch key={step.key} x={at(index)} y={y} state={step.state} />
        ))}
        <Lamp x={last} y={y} lit={lit} />
      </svg>
      {size === 'large' ? (
        <>
          <ol
            aria-hidden
            className="mt-1 hidden sm:flex"
            style={{ paddingInline: `${2 + (96 / (steps.length + 1)) * 0.5}%` }}
          >
            {steps.map((step) => (
              <li key={step.key} className="flex-1 px-1 text-center leading-tight">
                <span className="block font-plate text-lg font-bold tracking-wide uppercase">
                  {step.label}
                </span>
                {step.sub ? (
                  <span
                    className={step.state === 'open' ? 'block text-sm font-bold' : 'block text-sm text-ink-2'}
                  >
                    {step.sub}
                  </span>
                ) : null}
              </li>
            ))}
          </ol>
          <p className="mt-1 sm:hidden">
            {open ? (
              <>
                <span className="font-plate text-lg font-bold tracking-wide uppercase">{open.label}</span>
                {open.sub ? <span>: {open.sub}</span> : null}
              </>
            ) : (
              'Paid and closed'
            )}
          </p>
        </>
      ) : null}
    </div>
  );
}
