/** The web server and the worker, started under `children`. */
import { join } from 'node:path';
import { ROOT, script } from './paths.mjs';
import { httpProbe, untilReady } from './processes.mjs';

export async function startApp(children, { env, port, distDir, onExit }) {
  const next = join(ROOT, 'node_modules', 'next', 'dist', 'bin', 'next');
  const web = { ...env, NEXT_DIST_DIR: distDir, NODE_ENV: 'production', LAMPWRIGHT_PROCESS: 'web' };
  const server = children.start('web', process.execPath, [next, 'start', '-H', '127.0.0.1', '-p', String(port)], {
    env: web,
    onExit: () => onExit?.('web'),
  });
  await untilReady('The web server', httpProbe(`http://127.0.0.1:${port}/api/v1/health`), {
    log: children.logOf('web'),
    alive: () => server.exitCode === null,
  });
  children.start('worker', process.execPath, ['--import', 'tsx', script('worker.ts')], {
    env: { ...env, LAMPWRIGHT_PROCESS: 'worker' },
    onExit: () => onExit?.('worker'),
  });
}
