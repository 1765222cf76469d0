import { readdirSync } from 'node:fs';
import nextVitals from 'eslint-config-next/core-web-vitals';
import nextTypescript from 'eslint-config-next/typescript';
import prettier from 'eslint-config-prettier/flat';
import { defineConfig, globalIgnores } from 'eslint/config';

const ENGINES = ['engine', 'sizing', 'lighting', 'pricing'];
/** Folders of lib/ that are not domains. `access` binds the platform's wrappers to actor and policy. */
const SHARED = [...ENGINES, 'messages', 'units', 'offline', 'platform', 'access'];

const libFolders = readdirSync(new URL('./lib', import.meta.url), { withFileTypes: true })
  .filter((entry) => entry.isDirectory())
  .map((entry) => entry.name);
const domains = libFolders.filter((name) => !SHARED.includes(name));

const inLib = (names) => names.map((name) => `./lib/${name}/**/*`);

/** The layers as data: who may not import whom. tests/guards/layers.test.ts proves that each rule fires. */
export const LAYER_ZONES = [
  {
    target: inLib(ENGINES),
    from: ['./app/**/*', './components/**/*', './models/**/*', './emails/**/*', './lib/**/*'],
    except: inLib(ENGINES),
    message: 'Engines import nothing but each other and small numeric or schema packages.',
  },
  {
    target: './components/**/*',
    from: ['./app/**/*', './models/**/*', './emails/**/*', './lib/**/*'],
    except: [
      ...inLib([...ENGINES, 'messages', 'units', 'offline']),
      './lib/*/schema.ts',
      './lib/*/schema/**/*',
      './lib/*/actions.ts',
    ],
    message:
      "Components import components, engines, messages, units, offline, and a domain's schema and actions.",
  },
  {
    target: './models/**/*',
    from: ['./app/**/*', './components/**/*', './emails/**/*', './lib/**/*'],
    except: ['./lib/platform/db/**/*'],
    message: 'Models import sequelize and lib/platform/db.',
  },
  {
    target: './lib/platform/**/*',
    from: ['./app/**/*', './components/**/*', './emails/**/*', './models/**/*', './lib/**/*'],
    except: ['./lib/platform/**/*'],
    message: 'The platform knows no domain.',
  },
  {
    target: inLib(['messages', 'units', 'offline']),
    from: ['./app/**/*', './components/**/*', './emails/**/*', './models/**/*', './lib/**/*'],
    except: inLib([...ENGINES, 'messages', 'units', 'offline']),
    message: 'Texts, units and the offline store run in the browser and know no domain.',
  },
  {
    target: './app/**/*',
    from: ['./models/**/*', './lib/platform/db/**/*'],
    message: 'Routes are thin: they call a domain, not the database.',
  },
  {
    target: ['./lib/**/*', './emails/**/*', './models/**/*'],
    from: ['./app/**/*'],
    message: 'Nothing imports routes.',
  },
  ...domains.map((domain) => ({
    target: `./lib/${domain}/**/*`,
    from: inLib(domains.filter((other) => other !== domain)),
    except: [
      './lib/*/queries.ts',
      './lib/*/queries/**/*',
      './lib/*/commands.ts',
      './lib/*/commands/**/*',
      './lib/*/schema.ts',
      './lib/*/schema/**/*',
    ],
    message: "Domains meet only through each other's queries, commands and schema.",
  })),
]
  .filter((zone) => zone.from.length > 0)
  // The rule resolves target and from against the folder, but matches `except` as it stands.
  .map((zone) => ({
    ...zone,
    ...(zone.except ? { except: zone.except.map((glob) => glob.replace(/^\./, '**')) } : {}),
  }));

const engineFiles = ENGINES.map((name) => `lib/${name}/**`);

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
      'import/no-restricted-paths': ['error', { zones: LAYER_ZONES }],
    },
  },
  {
    files: ['docker-free-scripts/**', 'tests/**', 'seeders/**'],
    rules: { 'no-console': 'off' },
  },
  {
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
    // The SDKs are touched in lib/platform only.
    files: ['app/**', 'components/**', 'lib/**', 'emails/**'],
    ignores: ['lib/platform/**'],
    rules: {
      'no-restricted-imports': [
        'error',
        {
          patterns: [
            {
              regex:
                '^(stripe|nodemailer|pg|pg-boss|sequelize|@aws-sdk/.*|sharp|next-auth(?!/react$)(/.*)?)$',
              message: 'SDKs stay behind lib/platform.',
            },
          ],
        },
      ],
    },
  },
  {
    files: engineFiles,
    rules: {
      'no-restricted-imports': [
        'error',
        {
          paths: [{ name: 'zod', message: 'Engines use zod/mini: phones load them.' }],
          patterns: [
            {
              group: ['next', 'next/*', 'react', 'react-dom', 'sequelize', 'pg', 'node:*'],
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
