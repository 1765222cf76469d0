/** The worker process: relays the outbox and runs its handlers until it is told to end. */
import { closeDatabase } from '@/lib/platform/db';
import { log } from '@/lib/platform/log';
import { startWorker } from '@/lib/platform/queue/worker';
import { handlers } from './lib/handlers';

async function main(): Promise<void> {
  const worker = await startWorker(handlers);
  log().info('worker ready');
  let ending = false;
  const end = async () => {
    if (ending) return;
    ending = true;
    await worker.stop();
    await closeDatabase();
    process.exit(0);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => void end());
}

main().catch((error: unknown) => {
  log().error({ error: String(error) }, 'the worker could not start');
  process.exit(1);
});
