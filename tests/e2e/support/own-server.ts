/** A web server of a test's own, on the build and the database of the run: one that can really be stopped. */
import { type ChildProcess, spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../../..', import.meta.url));

async function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' && address ? address.port : 0));
    });
  });
}

export class OwnServer {
  private child: ChildProcess | null = null;
  private constructor(readonly port: number) {}

  static async make(): Promise<OwnServer> {
    return new OwnServer(await freePort());
  }
  get url(): string {
    return `http://127.0.0.1:${this.port}`;
  }

  async start(): Promise<void> {
    const env = {
      ...process.env,
      APP_URL: this.url,
      NEXTAUTH_URL: this.url,
      NEXT_DIST_DIR: process.env.NEXT_DIST_DIR ?? '.next-test',
      NODE_ENV: 'production' as const,
      LAMPWRIGHT_PROCESS: 'web',
    };
    const args = ['node_modules/next/dist/bin/next', 'start', '-H', '127.0.0.1', '-p', String(this.port)];
    this.child = spawn(process.execPath, args, { cwd: root, env, stdio: 'ignore' });
    for (let attempt = 0; attempt < 150; attempt++) {
      const answer = await fetch(`${this.url}/api/v1/health`).catch(() => null);
      if (answer?.ok) return;
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    throw new Error('The test’s own web server did not start.');
  }

  /** Ended by its own id, and waited for: nothing answers on its port any more. */
  async stop(): Promise<void> {
    const child = this.child;
    this.child = null;
    if (!child || child.exitCode !== null) return;
    const gone = new Promise((resolve) => child.once('exit', resolve));
    child.kill('SIGTERM');
    await gone;
  }
}
