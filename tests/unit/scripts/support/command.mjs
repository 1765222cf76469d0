/** A command like start.mjs, with services that do nothing: `node command.mjs <data> [stubborn|crash|throw|step]`. */
import { join } from 'node:path';
import { runCommand } from '../../../../docker-free-scripts/lib/command.mjs';
import { Stop } from '../../../../docker-free-scripts/lib/paths.mjs';

const [data, mode] = process.argv.slice(2);
const node = (source) => [process.execPath, ['-e', source]];
const IDLE = 'setInterval(() => {}, 1000);';
// A service that starts another program which outlives it, in a group of its own.
const PARENT = `require('node:child_process').spawn(process.execPath, ['-e', '${IDLE}'], { detached: true, stdio: 'ignore' }); ${IDLE}`;

const SERVICES = {
  stubborn: `process.on('SIGTERM', () => console.log('no')); console.log('up'); ${IDLE}`,
  crash: 'setTimeout(() => {}, 400);',
};

await runCommand(
  {
    data,
    lock: join(data, 'start.lock'),
    onBusy: () => 7,
    onEnded: () => console.log('ended'),
  },
  async (children) => {
    children.graceMs = 400;
    await children.endLeftovers();
    const database = children.start('database', ...node(IDLE), { signal: 'SIGINT' });
    const web = children.start('web', ...node(SERVICES[mode] ?? PARENT));
    if (mode === 'throw') throw new Stop('No such luck.', 3);
    console.log(JSON.stringify([database.child.pid, web.child.pid]));
    if (mode === 'step') {
      await children.run('step', ...node(IDLE));
      console.log('a step that was ended went on');
    }
  },
);
