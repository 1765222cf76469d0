/** Where things are. Node built-ins only: these scripts run before any package is installed. */
import { fileURLToPath } from 'node:url';
import { join } from 'node:path';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '');
export const script = (name) => join(ROOT, 'docker-free-scripts', name);
export const nextBin = join(ROOT, 'node_modules', 'next', 'dist', 'bin', 'next');

export const say = (text) => process.stdout.write(`${text}\n`);
export const complain = (text) => process.stderr.write(`${text}\n`);
export const wait = (ms) => new Promise((resolve) => setTimeout(resolve, ms));

/** An end that is told in one line, without a stack. */
export class Stop extends Error {
  constructor(message, code = 1) {
    super(message);
    this.code = code;
  }
}
