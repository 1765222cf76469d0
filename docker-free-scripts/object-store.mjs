/**
 * The local stand-in for the object store, on loopback, with one bucket. It knows one fixed pair of test credentials
 * (S3RVER / S3RVER), checks signatures, and keeps its files in a folder.
 */
import { mkdirSync } from 'node:fs';
import { createRequire } from 'node:module';

const S3rver = createRequire(import.meta.url)('@20minutes/s3rver');

const port = Number(process.env.OBJECT_STORE_PORT);
const directory = process.env.OBJECT_STORE_DIR;
const bucket = process.env.S3_BUCKET || 'lampwright';

if (!process.env.OBJECT_STORE_PORT || !Number.isInteger(port) || port < 0 || port > 65_535 || !directory) {
  console.error('OBJECT_STORE_PORT (a port number) and OBJECT_STORE_DIR (a folder) must be set.');
  process.exit(2);
}
mkdirSync(directory, { recursive: true, mode: 0o700 });

const store = new S3rver({
  port,
  address: '127.0.0.1',
  silent: true,
  directory,
  vhostBuckets: false,
  configureBuckets: [{ name: bucket }],
});

const address = await store.run();
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'])
  process.once(signal, () => {
    store.httpServer.closeAllConnections();
    store.close(() => process.exit(0));
  });
console.log(`The object store answers on http://127.0.0.1:${address.port}`);
