/** The web server and the worker, started under `children`. */
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { nextBin, ROOT, script } from './paths.mjs';
import { httpProbe } from './processes.mjs';

/** Started by its own file, not by npx, so that the pid is the server's. */
export async function startApp(children, { env, port, distDir }) {
  const server = children.start(
    'web',
    process.execPath,
    [nextBin, 'start', '-H', '127.0.0.1', '-p', String(port)],
    {
      env: { ...env, NEXT_DIST_DIR: distDir, NODE_ENV: 'production', LAMPWRIGHT_PROCESS: 'web' },
    },
  );
  await children.ready(server, 'The web server', httpProbe(`http://127.0.0.1:${port}/api/v1/health`));
  if (existsSync(join(ROOT, 'docker-free-scripts', 'worker.ts')))
    children.start('worker', process.execPath, ['--import', 'tsx', script('worker.ts')], {
      env: { ...env, NODE_ENV: 'production', LAMPWRIGHT_PROCESS: 'worker' },
    });
}
