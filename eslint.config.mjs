import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTypescript from 'eslint-config-next/typescript';
import prettier from 'eslint-config-prettier/flat';
import { defineConfig, globalIgnores } from 'eslint/config';

/**
 * The layers, as data: who may not import whom. `tests/guards/layers.test.ts` proves that each rule fires.
 * `except` is relative to `from`.
 */
export const LAYERS = [
  {
    target: ['./lib/engine/**', './lib/sizing/**', './lib/lighting/**', './lib/pricing/**'],
    from: [
      './app/**',
      './components/**',
      './models/**',
      './emails/**',
      './lib/!(engine|sizing|lighting|pricing)/**',
    ],
    message: 'Engines import nothing but each other and small numeric or schema packages.',
  },
  {
    target: './components/**',
    from: [
      './app/**',
      './models/**',
      './emails/**',
      './lib/platform/**',
      './lib/*/!(schema|actions).ts',
      './lib/*/!(schema|actions)/**',
    ],
    allow: /^\.\/lib\/(engine|sizing|lighting|pricing|messages|units|offline)\//,
    message:
      "Components import components, engines, messages, units, offline, and a domain's schema and actions.",
  },
  {
    target: './models/**',
    from: ['./app/**', './components/**', './emails/**', './lib/!(platform)/**', './lib/platform/!(db)/**'],
    message: 'Models import sequelize and lib/platform/db.',
  },
  {
    target: './lib/platform/**',
    from: ['./app/**', './components/**', './emails/**', './lib/!(platform)/**', './models/**'],
    message: 'The platform knows no domain.',
  },
];

const ENGINE_FOLDERS = ['lib/engine/**', 'lib/sizing/**', 'lib/lighting/**', 'lib/pricing/**'];

export default defineConfig([
  ...nextVitals,
  ...nextTypescript,
  prettier,
  globalIgnores(['.next/**', '.next-*/**', '.data/**', '.data-test/**', 'next-env.d.ts', 'test-results/**']),
  {
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'no-console': 'error',
    },
  },
  {
    files: ['docker-free-scripts/**', 'tests/**', 'seeders/**'],
    rules: { 'no-console': 'off' },
  },
  {
    // The environment is read and checked in one place.
    files: [
      'app/**',
      'components/**',
      'lib/**',
      'models/**',
      'emails/**',
      'migrations/**',
      'seeders/**',
      'proxy.ts',
    ],
    ignores: ['lib/platform/env/**'],
    rules: {
      'no-restricted-properties': [
        'error',
        { object: 'process', property: 'env', message: 'Read the environment in lib/platform/env only.' },
      ],
    },
  },
  {
    files: ENGINE_FOLDERS,
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              group: [
                '@/app/*',
                '@/components/*',
                '@/models/*',
                '@/emails/*',
                '@/lib/*',
                '!@/lib/engine',
                '!@/lib/sizing',
                '!@/lib/lighting',
                '!@/lib/pricing',
              ],
              message: LAYERS[0].message,
            },
            {
              group: ['next', 'next/*', 'react', 'react-dom', 'sequelize', 'pg', 'node:*', 'zod'],
              message: 'Engines are pure: zod/mini and small numeric packages only.',
            },
          ],
        },
      ],
      'no-restricted-syntax': [
        'error',
        {
          selector: "MemberExpression[object.name='Math'][property.name='random']",
          message: 'Randomness only by a seed that is passed in.',
        },
        {
          selector: "NewExpression[callee.name='Date'][arguments.length=0]",
          message: 'Engines have no clock.',
        },
        {
          selector: "MemberExpression[object.name='Date'][property.name='now']",
          message: 'Engines have no clock.',
        },
      ],
    },
  },
]);
