/** What the engine weighs in a browser: bundled and minified as for the screens, gzip. */
import { gzipSync } from 'node:zlib';
import { fileURLToPath } from 'node:url';
import { build } from 'vite';
import type { Row } from './row';

const MOST_KILOBYTES = 60;
const root = fileURLToPath(new URL('../..', import.meta.url));

async function gzipKilobytes(source: string): Promise<number> {
  const entry = 'virtual:engine-size';
  const built = await build({
    root,
    logLevel: 'silent',
    configFile: false,
    resolve: { alias: [{ find: /^@\//, replacement: root }] },
    plugins: [
      {
        name: 'engine-size',
        resolveId: (id) => (id === entry ? id : null),
        load: (id) => (id === entry ? source : null),
      },
    ],
    build: { write: false, minify: true, rollupOptions: { input: entry, preserveEntrySignatures: 'strict' } },
  });
  const outputs = (Array.isArray(built) ? built : [built]) as { output: { type: string; code?: string }[] }[];
  const code = outputs.flatMap(({ output }) => output.map((one) => one.code ?? '')).join('');
  return gzipSync(code).length / 1000;
}

const PARTS: [string, string][] = [
  ['the contract alone', "export { runCalculation } from '@/lib/engine/run';"],
  [
    'with voltage drop',
    "export { voltageDropCalculation } from '@/lib/sizing/voltage-drop'; export { runCalculation } from '@/lib/engine/run';",
  ],
  [
    'with the tape',
    "export { tapeAnalysisCalculation } from '@/lib/sizing/tape-analysis'; export { runCalculation } from '@/lib/engine/run';",
  ],
];

export async function benchBrowserSize(): Promise<Row[]> {
  const rows: Row[] = [];
  for (const [what, source] of PARTS)
    rows.push({
      what: `engine in the browser, ${what}`,
      value: await gzipKilobytes(source),
      unit: 'kB gzip',
      ok: null,
    });
  const whole = await gzipKilobytes(
    "export { calculations } from '@/lib/engine/registry'; export { runCalculation } from '@/lib/engine/run';",
  );
  rows.push({
    what: 'engine in the browser, every calculation',
    value: whole,
    unit: 'kB gzip',
    target: `${MOST_KILOBYTES} at most`,
    ok: whole <= MOST_KILOBYTES,
  });
  return rows;
}
