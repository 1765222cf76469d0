/** What `npm test` was asked to run. */
import { Stop } from './paths.mjs';

export const PARTS = ['static', 'pure', 'integration', 'e2e'];

/** The part that a test file belongs to, as vitest.config.ts and playwright.config.ts sort them. */
function partOf(file) {
  if (/\.db\.test\.|tests\/integration/.test(file)) return 'integration';
  if (/tests\/e2e|\.spec\./.test(file)) return 'e2e';
  return /tests\/(unit|reference|guards)/.test(file) ? 'pure' : null;
}

/**
 * `[--only static|pure|integration|e2e] [files…]`; files alone choose their parts.
 * @returns `{parts, files}`
 * @throws {Stop} 2 on anything else
 */
export function parseTestOptions(args) {
  const files = [];
  let only;
  for (let at = 0; at < args.length; at += 1) {
    if (args[at] === '--only') {
      only = args[(at += 1)];
      if (!PARTS.includes(only)) throw new Stop(`--only takes one of ${PARTS.join(', ')}.`, 2);
    } else if (args[at].startsWith('-'))
      throw new Stop(`npm test knows no option ${args[at]}, only --only.`, 2);
    else files.push(args[at]);
  }
  if (only) return { parts: [only], files };
  if (files.length === 0) return { parts: PARTS, files };
  const known = files.map(partOf);
  const parts = known.includes(null)
    ? PARTS.filter((part) => part !== 'static')
    : PARTS.filter((part) => known.includes(part));
  return { parts, files };
}
