/** The file store against the local object store, started as `npm start` starts it. */
import { type ChildProcess, spawn } from 'node:child_process';
import { createHash, randomBytes, randomUUID } from 'node:crypto';
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { createFileStore, type FileStore, type StoreConfig } from '@/lib/platform/storage';

process.env.LOG_LEVEL = 'silent';
process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true';

const PDF = 'application/pdf';
let child: ChildProcess;
let folder: string;
let config: StoreConfig & { endpoint: string };
let store: FileStore;

const gone = () => new Promise<number | null>((resolve) => child.once('exit', resolve));

async function start(): Promise<string> {
  child = spawn(process.execPath, ['docker-free-scripts/object-store.mjs'], {
    env: {
      ...process.env,
      OBJECT_STORE_PORT: new URL(config?.endpoint ?? 'http://x:0').port || '0',
      OBJECT_STORE_DIR: folder,
    },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  return new Promise((resolve, reject) => {
    child.stdout?.once('data', (chunk) => resolve(/http:\S+/.exec(String(chunk))?.[0] ?? ''));
    child.once('exit', (code) => reject(new Error(`ended with ${code}`)));
  });
}

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'lampwright objects-'));
  const endpoint = await start();
  config = {
    endpoint,
    region: 'us-east-1',
    bucket: 'lampwright',
    accessKeyId: 'S3RVER',
    secretAccessKey: 'S3RVER',
  };
  store = createFileStore(config);
});

afterAll(async () => {
  if (child.exitCode === null) {
    child.kill('SIGKILL');
    await gone();
  }
  rmSync(folder, { recursive: true });
});

describe('files of a shop', () => {
  const bytes = randomBytes(300_000);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const shopId = randomUUID();

  test('come back as they were put, under the hash of their content', async () => {
    const stored = await store.putFile({ shopId, bytes, contentType: PDF });
    expect(stored).toEqual({ sha256, bytes: 300_000, contentType: PDF });
    expect(Buffer.from(await store.getFile(shopId, sha256)).equals(bytes)).toBe(true);
    expect(await store.headFile(shopId, sha256)).toEqual(stored);
  });

  test('are there once, however often they are put, even at the same time', async () => {
    const put = () => store.putFile({ shopId, bytes, contentType: PDF });
    const all = await Promise.all([put(), put(), put(), put()]);
    expect(new Set(all.map((one) => one.sha256))).toEqual(new Set([sha256]));
    const names = readdirSync(folder, { recursive: true, encoding: 'utf8' });
    expect(names.filter((name) => name.endsWith(`${sha256}._S3rver_object`))).toHaveLength(1);
  });

  test("are not found under another shop's id", async () => {
    expect(await store.headFile(randomUUID(), sha256)).toBeNull();
    await expect(store.getFile(randomUUID(), sha256)).rejects.toMatchObject({
      code: 'not-found',
      status: 404,
    });
  });

  test.each(['', '../secrets', sha256.slice(1), sha256.toUpperCase(), `${sha256}/x`])(
    'a key like "%s" never gets into an address',
    async (key) => {
      await expect(store.getFile(shopId, key)).rejects.toMatchObject({ code: 'not-found' });
      await expect(store.getFile(`${shopId}/..`, sha256)).rejects.toMatchObject({ code: 'not-found' });
    },
  );

  test('are read by a signed address; changed in any part, it is refused', async () => {
    await store.putFile({ shopId, bytes, contentType: PDF });
    const address = await store.presignFile(shopId, sha256, 60);
    const answer = await fetch(address);
    expect(answer.status).toBe(200);
    expect((await answer.arrayBuffer()).byteLength).toBe(300_000);
    const other = await store.putFile({ shopId, bytes: randomBytes(9), contentType: PDF });
    const signature = /X-Amz-Signature=([0-9a-f]+)/.exec(address)?.[1] ?? '';
    const tampered = [
      address.replace(sha256, other.sha256),
      address.replace('X-Amz-Expires=60', 'X-Amz-Expires=86400'),
      address.replace(
        signature,
        signature.replace(/^./, (first) => (first === '0' ? '1' : '0')),
      ),
    ];
    for (const url of tampered) {
      expect(url).not.toBe(address);
      expect((await fetch(url)).status).toBe(403);
    }
  });

  test('with a wrong secret nothing is written', async () => {
    const stranger = createFileStore({ ...config, secretAccessKey: 'guess' });
    const file = { shopId, bytes: randomBytes(10), contentType: PDF };
    await expect(stranger.putFile(file)).rejects.toMatchObject({ code: 'unavailable' });
  });

  test('that changed in the store are not handed out', async () => {
    const stored = await store.putFile({ shopId, bytes: Buffer.from('signed for 1,000'), contentType: PDF });
    const path = readdirSync(folder, { recursive: true, encoding: 'utf8' }).find(
      (name) => name.includes(stored.sha256) && name.endsWith('_object'),
    );
    writeFileSync(join(folder, path ?? ''), 'signed for 9,000');
    await expect(store.getFile(shopId, stored.sha256)).rejects.toMatchObject({ code: 'unexpected' });
  });

  test('are gone after they were deleted, and deleting again is no error', async () => {
    const { sha256: own } = await store.putFile({ shopId, bytes: randomBytes(20), contentType: PDF });
    await store.deleteFile(shopId, own);
    await store.deleteFile(shopId, own);
    expect(await store.headFile(shopId, own)).toBeNull();
  });
});

test('a store that can not be reached says so, without its address', async () => {
  const away = createFileStore({ ...config, endpoint: 'http://127.0.0.1:1' });
  const asking = away.getFile(randomUUID(), 'a'.repeat(64));
  await expect(asking).rejects.toMatchObject({
    code: 'unavailable',
    message: 'The file store can not be reached. Try again in a minute.',
  });
});

test('files outlive the store, which ends by a signal with 0', async () => {
  const file = { shopId: randomUUID(), bytes: Buffer.from('kept'), contentType: 'text/plain' };
  const { sha256 } = await store.putFile(file);
  child.kill('SIGTERM');
  expect(await gone()).toBe(0);
  expect(await start()).toBe(config.endpoint);
  expect(Buffer.from(await store.getFile(file.shopId, sha256)).toString()).toBe('kept');
});
