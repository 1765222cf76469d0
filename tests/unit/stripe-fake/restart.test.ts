/** The stand-in's own process: started as `npm start` starts it, killed, and started again. */
import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, expect, test } from 'vitest';
import {
  GOOD_CARD,
  SECRET_KEY,
  sdk,
  sessionParams,
  startReceiver,
  submit,
  WEBHOOK_SECRET,
} from './support/fake';

const children: ChildProcess[] = [];
const folders: string[] = [];

const gone = (child: ChildProcess) =>
  new Promise<number | null>((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) resolve(child.exitCode);
    else child.once('exit', resolve);
  });

afterEach(async () => {
  for (const child of children.splice(0)) {
    child.kill('SIGKILL');
    await gone(child);
  }
  for (const folder of folders.splice(0)) rmSync(folder, { recursive: true });
});

function ownFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'lampwright stripe-'));
  folders.push(folder);
  return folder;
}

async function startProcess(env: Record<string, string>): Promise<{ child: ChildProcess; url: string }> {
  const child = spawn(process.execPath, ['docker-free-scripts/stripe-fake.mjs'], {
    env: { ...process.env, STRIPE_FAKE_PORT: '0', STRIPE_FAKE_RETRY_MS: '50', ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  children.push(child);
  let said = '';
  child.stderr?.on('data', (chunk) => (said += String(chunk)));
  return new Promise((resolve, reject) => {
    child.stdout?.once('data', (chunk) => {
      const url = /http:\S+/.exec(String(chunk))?.[0] ?? '';
      resolve({ child, url });
    });
    child.once('exit', (code) => reject(new Error(`ended with ${code}: ${said}`)));
  });
}

test('what was told is known after a kill, and what nobody accepted is sent again', async () => {
  const folder = ownFolder();
  const receiver = await startReceiver();
  const env = {
    STRIPE_FAKE_DATA: folder,
    STRIPE_FAKE_SECRET_KEY: SECRET_KEY,
    STRIPE_FAKE_WEBHOOK_SECRET: WEBHOOK_SECRET,
    STRIPE_FAKE_WEBHOOK_URL: receiver.url,
  };
  receiver.status = 503;
  const first = await startProcess(env);
  expect((await fetch(`${first.url}/healthz`)).status).toBe(200);
  const key = { idempotencyKey: 'pay-1' };
  const session = await sdk(first.url).checkout.sessions.create(sessionParams(), key);
  await submit(session.url ?? '', GOOD_CARD);
  await receiver.until(1);
  first.child.kill('SIGKILL');
  await gone(first.child);

  const before = receiver.received.length;
  receiver.status = 200;
  const second = await startProcess(env);
  const stripe = sdk(second.url);
  const found = await stripe.checkout.sessions.retrieve(session.id);
  expect(found).toMatchObject({ status: 'complete', payment_status: 'paid' });
  expect((await stripe.checkout.sessions.create(sessionParams(), key)).id).toBe(session.id);
  await receiver.until(before + 2);
  const types = receiver.types().slice(before);
  expect(new Set(types)).toEqual(new Set(['payment_intent.succeeded', 'checkout.session.completed']));
}, 30_000);

test('no number that was typed is in the file', async () => {
  const folder = ownFolder();
  const { url } = await startProcess({ STRIPE_FAKE_DATA: folder });
  const params = sessionParams({ allowed_payment_method_types: ['card', 'us_bank_account'] });
  const session = await sdk(url).checkout.sessions.create(params);
  const bank = { method: 'bank', routing: '110000000', account: '000123456789', name: 'Ada Holder' };
  await submit(session.url ?? '', { ...GOOD_CARD, number: '4000 0025 0000 3155' });
  await submit(session.url ?? '', bank);
  const kept = readFileSync(join(folder, 'state.json'), 'utf8');
  expect(kept).toContain('Ada Holder');
  for (const secret of ['4000002500003155', '4000 0025 0000 3155', '000123456789', '"cvc"'])
    expect(kept).not.toContain(secret);
});

test('a signal ends it with 0', async () => {
  const { child } = await startProcess({});
  child.kill('SIGTERM');
  expect(await gone(child)).toBe(0);
});

test('a port that is none is said in one line', async () => {
  await expect(startProcess({ STRIPE_FAKE_PORT: 'http' })).rejects.toThrow(
    'STRIPE_FAKE_PORT must be a port number, not "http".',
  );
});
