import { describe, expect, it } from 'vitest';
import { parseTestOptions, PARTS } from '../../../docker-free-scripts/lib/options.mjs';

describe('what npm test was asked to run', () => {
  it.each([
    [[], PARTS, []],
    [['--only', 'e2e'], ['e2e'], []],
    [['--only', 'pure', 'tape'], ['pure'], ['tape']],
    [['tests/unit/scripts/lock.test.ts'], ['pure'], ['tests/unit/scripts/lock.test.ts']],
    [['tests/guards/catalogue.db.test.ts'], ['integration'], ['tests/guards/catalogue.db.test.ts']],
    [['tests/e2e/path.spec.ts'], ['e2e'], ['tests/e2e/path.spec.ts']],
    [['tape'], ['pure', 'integration', 'e2e'], ['tape']],
  ])('%j', (args, parts, files) => {
    expect(parseTestOptions(args)).toEqual({ parts, files });
  });

  it.each([
    [['--only'], /--only takes one of static, pure/],
    [['--only', 'units'], /--only takes one of static, pure/],
    [['--watch'], /knows no option --watch/],
  ])('refuses %j', (args, message) => {
    expect(() => parseTestOptions(args)).toThrow(message);
  });
});
