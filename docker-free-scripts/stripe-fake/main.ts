/** Runs the stand-in until a signal. */
import { fakeConfig } from './config';
import { startStripeFake } from './server';

export async function main(env: NodeJS.ProcessEnv): Promise<void> {
  const fake = await startStripeFake(fakeConfig(env));
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const)
    process.once(signal, () => void fake.close().then(() => process.exit(0)));
  console.log(`The card stand-in answers on ${fake.url}`);
}
