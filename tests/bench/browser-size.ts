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

const runner = "export { runCalculation } from '@/lib/engine/run';";
const one = (name: string, file: string) => `export { ${name} } from '@/lib/sizing/${file}'; ${runner}`;

/** What a screen loads, in a piece of its own; the wiring sheet's may weigh as much as the target says. */
const PARTS: { what: string; source: string; most?: number }[] = [
  { what: 'the contract alone', source: runner },
  { what: 'with voltage drop', source: one('voltageDropCalculation', 'voltage-drop') },
  { what: 'with the tape', source: one('tapeAnalysisCalculation', 'tape-analysis') },
  {
    what: 'with the fault finder, as the wiring sheet loads it',
    source: one('faultFinderCalculation', 'fault-finder'),
    most: MOST_KILOBYTES,
  },
  {
    what: 'every calculation (no screen loads it)',
    source: `export { calculations } from '@/lib/engine/registry'; ${runner}`,
  },
];

export async function benchBrowserSize(): Promise<Row[]> {
  const rows: Row[] = [];
  for (const { what, source, most } of PARTS) {
    const value = await gzipKilobytes(source);
    const target = most === undefined ? {} : { target: `${most} at most` };
    const ok = most === undefined ? null : value <= most;
    rows.push({ what: `engine in the browser, ${what}`, value, unit: 'kB gzip', ok, ...target });
  }
  return rows;
}
