/** The layer rules fire: each case is a file that must be refused, beside one that must pass. */
import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const eslint = new ESLint({ cwd: process.cwd() });

/** Lints `code` as if it stood in `file`; import targets must exist for the path rule to see them. */
async function rulesBroken(file: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath: file });
  return (result?.messages ?? []).map((message) => message.ruleId ?? message.message);
}

const PATHS = 'import/no-restricted-paths';

describe('layers', () => {
  it.each([
    ['lib/engine/probe.ts', `import { env } from '@/lib/platform/env';\nexport const a = env;`, PATHS],
    ['lib/sizing/probe.ts', `import { Shop } from '@/models/shop';\nexport const a = Shop;`, PATHS],
    ['lib/sizing/probe.ts', `import { z } from 'zod';\nexport const a = z;`, 'no-restricted-imports'],
    ['lib/sizing/probe.ts', `export const a = Math.random();`, 'no-restricted-syntax'],
    ['lib/pricing/probe.ts', `export const a = new Date();`, 'no-restricted-syntax'],
    [
      'components/probe.tsx',
      `import { withShop } from '@/lib/platform/db';\nexport const a = withShop;`,
      PATHS,
    ],
    ['components/probe.tsx', `import { Shop } from '@/models/shop';\nexport const a = Shop;`, PATHS],
    ['components/probe.tsx', `import { may } from '@/lib/access/policy';\nexport const a = may;`, PATHS],
    ['models/probe.ts', `import { may } from '@/lib/access/policy';\nexport const a = may;`, PATHS],
    ['lib/platform/probe.ts', `import { may } from '@/lib/access/policy';\nexport const a = may;`, PATHS],
    ['app/probe.ts', `import { Shop } from '@/models/shop';\nexport const a = Shop;`, PATHS],
    ['lib/access/probe.ts', `export const a = process.env.HOME;`, 'no-restricted-properties'],
    [
      'lib/access/probe.ts',
      `import Stripe from 'stripe';\nexport const a = Stripe;`,
      'no-restricted-imports',
    ],
  ])('refuses %s: %s', async (file, code, rule) => {
    expect(await rulesBroken(file, code)).toContain(rule);
  });

  it.each([
    ['lib/engine/probe.ts', `import * as z from 'zod/mini';\nexport const a = z;`],
    [
      'models/probe.ts',
      `import { registerModels } from '@/lib/platform/db';\nexport const a = registerModels;`,
    ],
    ['components/probe.tsx', `import { REL } from '@/lib/engine/contract';\nexport const a = REL;`],
    ['lib/platform/env/probe.ts', `export const a = process.env.HOME;`],
  ])('lets %s through', async (file, code) => {
    expect(await rulesBroken(file, code)).toEqual([]);
  });
});
