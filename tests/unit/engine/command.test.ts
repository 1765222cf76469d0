/** The engine command as people and scripts call it: what it prints, where, and how it ends. */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { ENGINE_VERSION } from '@/lib/engine/contract';
import { calculations } from '@/lib/engine/registry';

const root = fileURLToPath(new URL('../../..', import.meta.url));

interface Ended {
  code: number | null;
  out: string;
  err: string;
}

function run(command: string, args: string[], input: string | Buffer): Promise<Ended> {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd: root });
    const ended: Ended = { code: null, out: '', err: '' };
    child.stdout.on('data', (chunk: Buffer) => (ended.out += chunk.toString('utf8')));
    child.stderr.on('data', (chunk: Buffer) => (ended.err += chunk.toString('utf8')));
    child.on('error', reject);
    child.on('close', (code) => resolve({ ...ended, code }));
    // A refusal may come before all is read.
    child.stdin.on('error', () => undefined);
    child.stdin.end(input);
  });
}

const engine = (args: string[], input: string | Buffer = '') =>
  run(process.execPath, ['--import', 'tsx', 'docker-free-scripts/engine.ts', ...args], input);

const drop = {
  system: 'dc',
  volts: 24,
  amps: 2,
  metres: 10,
  size: '1.5 mm2',
  stranding: 'stranded',
  celsius: 20,
};
const refusal = ({ out }: Ended) =>
  (
    JSON.parse(out) as {
      error: { code: string; message: string; issues: { path: string; message: string }[] };
    }
  ).error;

describe('engine NAME', () => {
  it('answers one object by the npm command', async () => {
    const ended = await run('npm', ['run', '--silent', 'engine', '--', 'voltage-drop'], JSON.stringify(drop));
    expect(ended).toMatchObject({ code: 0, err: '' });
    expect(ended.out.trimEnd().split('\n')).toHaveLength(1);
    const answer = JSON.parse(ended.out) as Record<string, unknown>;
    expect(Object.keys(answer)).toEqual(['engine', 'result', 'findings', 'working']);
    expect(answer['engine']).toBe(ENGINE_VERSION);
  });

  it.each([
    ['nothing', ''],
    ['blanks', ' \n'],
    ['no JSON', '{volts: 24}'],
    ['nesting without end', '['.repeat(200_000)],
  ])('refuses %s as invalid input', async (_, input) => {
    const ended = await engine(['voltage-drop'], input);
    expect(ended).toMatchObject({ code: 2, err: '' });
    expect(refusal(ended)).toMatchObject({ code: 'invalid-input', issues: [{ path: '' }] });
  });

  it('names the fields of bad input, unknown keys by their own path', async () => {
    const ended = await engine(['voltage-drop'], JSON.stringify({ ...drop, metres: -1, colour: 'red' }));
    expect(ended.code).toBe(2);
    expect(refusal(ended)).toEqual({
      code: 'invalid-input',
      message: 'metres: must not be negative',
      issues: [
        { path: 'metres', message: 'must not be negative' },
        { path: 'colour', message: 'is not a known key' },
      ],
    });
  });

  it('knows what it does not know', async () => {
    const [calculation, schema, word] = await Promise.all([
      engine(['no-such-thing'], '{}'),
      engine(['schema']),
      engine(['voltage-drop', '--line'], '{}'),
    ]);
    expect(calculation.code).toBe(2);
    expect(refusal(calculation).code).toBe('unknown-calculation');
    expect(schema.code).toBe(2);
    expect(refusal(schema).code).toBe('unknown-calculation');
    expect(word.code).toBe(2);
    expect(refusal(word).code).toBe('invalid-input');
  });

  it('takes a byte order mark before the text', async () => {
    expect((await engine(['voltage-drop'], `\uFEFF${JSON.stringify(drop)}`)).code).toBe(0);
  });

  it('takes as many lines as a quote may have, and refuses one more', async () => {
    const quote = (lines: number) =>
      JSON.stringify({
        currency: 'USD',
        taxRounding: 'line',
        taxes: [],
        lines: Array.from({ length: lines }, (_, i) => ({
          id: String(i),
          quantity: 1,
          unitCost: '1.00',
          markupPct: 10,
          taxIds: [],
        })),
      });
    const [fits, over] = await Promise.all([
      engine(['price-lines'], quote(20_000)),
      engine(['price-lines'], quote(20_001)),
    ]);
    expect(fits.code).toBe(0);
    expect((JSON.parse(fits.out) as { result: { netMinor: number } }).result.netMinor).toBe(2_200_000);
    expect(over.code).toBe(2);
    expect(refusal(over).issues).toEqual([{ path: 'lines', message: 'must have at most 20,000 lines' }]);
  });
});

describe('engine list and schema', () => {
  it('lists every calculation with one line', async () => {
    const { code, out } = await engine(['list']);
    expect(code).toBe(0);
    const lines = out.trimEnd().split('\n');
    expect(lines.map((line) => line.split(' ')[0])).toEqual([...calculations.keys()]);
    for (const line of lines) expect(line).toMatch(/^[a-z0-9-]+ +\S.{20,}$/);
  });

  it('prints the JSON Schema of the input', async () => {
    const { code, out } = await engine(['schema', 'voltage-drop']);
    const schema = JSON.parse(out) as {
      properties: object;
      required: string[];
      additionalProperties: boolean;
    };
    expect(code).toBe(0);
    expect(schema.required).toEqual(Object.keys(drop));
    expect(schema.additionalProperties).toBe(false);
  });
});

describe('engine NAME --lines', () => {
  it('answers line by line, in order, refusals and blank lines included, and ends with 0', async () => {
    const lines = [
      JSON.stringify(drop),
      'not JSON',
      '',
      JSON.stringify({ ...drop, volts: 0 }),
      JSON.stringify({ ...drop, amps: 4 }),
    ];
    const { code, out, err } = await engine(['voltage-drop', '--lines'], lines.join('\n'));
    expect({ code, err }).toEqual({ code: 0, err: '' });
    const answers = out
      .trimEnd()
      .split('\n')
      .map(
        (line) =>
          JSON.parse(line) as { result?: { dropVolts: number }; error?: { issues: { path: string }[] } },
      );
    expect(answers.map((one) => one.error?.issues[0]?.path ?? 'answered')).toEqual([
      'answered',
      '',
      '',
      'volts',
      'answered',
    ]);
    expect(answers[4]?.result?.dropVolts).toBeCloseTo(2 * (answers[0]?.result?.dropVolts ?? 0), 12);
  });

  it('answers each line before the next is sent', async () => {
    const child = spawn(
      process.execPath,
      ['--import', 'tsx', 'docker-free-scripts/engine.ts', 'voltage-drop', '--lines'],
      { cwd: root },
    );
    const answer = () =>
      new Promise<string>((resolve) => child.stdout.once('data', (d: Buffer) => resolve(String(d))));
    for (const amps of [1, 2, 3]) {
      child.stdin.write(`${JSON.stringify({ ...drop, amps })}\n`);
      expect(JSON.parse(await answer())).toMatchObject({
        working: [{ inputs: [{}, { value: amps }, {}, {}, {}, {}] }, {}, {}],
      });
    }
    child.stdin.end();
    expect(await new Promise((resolve) => child.on('close', resolve))).toBe(0);
  });

  it('answers nothing to nothing', async () => {
    expect(await engine(['voltage-drop', '--lines'])).toEqual({ code: 0, out: '', err: '' });
  });
});
