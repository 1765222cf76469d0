/**
 * The engine on the command line:
 *   npm run --silent engine -- list
 *   npm run --silent engine -- schema NAME
 *   npm run --silent engine -- NAME < input.json
 *   npm run --silent engine -- NAME --lines < inputs.jsonl
 * One JSON object on standard output and exit 0; a refusal is an object with `error`, exit 2. With --lines each
 * line in gives one line out, refusals included, in order, exit 0; a blank line is a refusal like any other.
 */
import { createInterface } from 'node:readline';
import * as z from 'zod/mini';
import { type Calculation, COMMAND_LINE_LIMITS, EngineError } from '@/lib/engine/contract';
import { calculations } from '@/lib/engine/registry';
import { runCalculation } from '@/lib/engine/run';

const notJson = (detail: string) =>
  new EngineError('invalid-input', 'The input is not JSON.', [
    { path: '', message: `is not JSON: ${detail}` },
  ]);

function find(name: string): Calculation {
  const found = calculations.get(name);
  if (found) return found;
  throw new EngineError('unknown-calculation', `There is no calculation "${name}"; "list" names them.`, [
    { path: '', message: 'is not the name of a calculation' },
  ]);
}

/** Some editors and shells put a byte order mark before the text. */
const BYTE_ORDER_MARK = /^\uFEFF/;

function parse(text: string): unknown {
  if (text.trim() === '') throw notJson('it is empty');
  try {
    return JSON.parse(text.replace(BYTE_ORDER_MARK, ''));
  } catch (error) {
    throw notJson(error instanceof Error ? error.message : 'unreadable');
  }
}

/** One input's answer or refusal as JSON text. */
function answer(calculation: Calculation, text: string): { json: string; refused: boolean } {
  try {
    return {
      json: JSON.stringify(runCalculation(calculation, parse(text), COMMAND_LINE_LIMITS)),
      refused: false,
    };
  } catch (error) {
    if (error instanceof EngineError) return { json: JSON.stringify(error), refused: true };
    throw error;
  }
}

async function write(text: string): Promise<void> {
  if (!process.stdout.write(text)) await new Promise((resolve) => process.stdout.once('drain', resolve));
}

async function answerLines(calculation: Calculation): Promise<void> {
  for await (const line of createInterface({ input: process.stdin, crlfDelay: Infinity }))
    await write(`${answer(calculation, line).json}\n`);
}

async function readAll(): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of process.stdin) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString('utf8');
}

/** A word that is not understood is refused at once, rather than waited out on standard input. */
function refuseExtra(words: readonly string[]): void {
  const [extra] = words;
  if (extra === undefined) return;
  throw new EngineError('invalid-input', `"${extra}" is not understood here.`, [
    { path: '', message: `has the unknown word "${extra}" after the name` },
  ]);
}

async function main([name = 'list', ...rest]: string[]): Promise<number> {
  if (name === 'list') {
    refuseExtra(rest);
    for (const { name: each, summary } of calculations.values())
      await write(`${each.padEnd(22)} ${summary}\n`);
    return 0;
  }
  if (name === 'schema') {
    refuseExtra(rest.slice(1));
    await write(`${JSON.stringify(z.toJSONSchema(find(rest[0] ?? '').schema, { io: 'input' }), null, 2)}\n`);
    return 0;
  }
  const calculation = find(name);
  const lines = rest[0] === '--lines';
  refuseExtra(lines ? rest.slice(1) : rest);
  if (lines) {
    await answerLines(calculation);
    return 0;
  }
  const { json, refused } = answer(calculation, await readAll());
  await write(`${json}\n`);
  return refused ? 2 : 0;
}

// A reader that stops early (head, a closed pipe) is no error of ours.
process.stdout.on('error', () => process.exit(0));

main(process.argv.slice(2)).then(
  (code) => {
    process.exitCode = code;
  },
  (error: unknown) => {
    if (error instanceof EngineError) {
      process.stdout.write(`${JSON.stringify(error)}\n`);
      process.exitCode = 2;
      return;
    }
    process.stderr.write('The engine failed: this is a fault of ours, not of the input.\n');
    process.exitCode = 1;
  },
);
