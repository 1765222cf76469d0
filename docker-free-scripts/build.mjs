/** `npm run build`: the build that `serve` and `start` share; skipped when no source changed. */
import { join } from 'node:path';
import { buildOrStop } from './lib/build.mjs';
import { runCommand } from './lib/command.mjs';
import { complain, ROOT, say } from './lib/paths.mjs';

const data = join(ROOT, '.data');

await runCommand(
  {
    data: join(data, 'build'),
    lock: join(data, 'start.lock'),
    onBusy: () => {
      complain('"npm start" of this checkout is running and has the build. End it first.');
      return 3;
    },
  },
  async (children) => {
    await buildOrStop(children, '.next');
    say('The build is current.');
    return 0;
  },
);
