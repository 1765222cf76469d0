/** `npm run bench`: a table on the screen, and bench-results.json. Exit 1 where a target is missed. */
import { writeFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { benchBrowserSize } from './browser-size';
import { benchLadder } from './ladder';
import { calibration, type Row } from './row';
import { benchTapePlan } from './tape-plan';

const figure = (value: number) =>
  Math.abs(value) >= 0.001 || value === 0 ? value.toPrecision(4) : value.toExponential(2);

function show({ what, value, unit, target, ok }: Row): void {
  const verdict = ok === null ? '' : ok ? 'holds' : 'MISSED';
  console.log(
    `${what.padEnd(58)} ${`${figure(value)} ${unit}`.padEnd(18)} ${(target ?? '').padEnd(16)} ${verdict}`,
  );
}

async function main(): Promise<void> {
  const rows: Row[] = [];
  for (const bench of [() => [calibration()], benchLadder, benchTapePlan, benchBrowserSize]) {
    const measured = await bench();
    measured.forEach(show);
    rows.push(...measured);
  }
  const machine = { node: process.version, cpu: cpus()[0]?.model ?? '', cores: cpus().length };
  writeFileSync('bench-results.json', `${JSON.stringify({ machine, rows }, null, 2)}\n`);
  process.exitCode = rows.some(({ ok }) => ok === false) ? 1 : 0;
}

await main();
