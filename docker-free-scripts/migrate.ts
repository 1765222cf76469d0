/** Brings the database up to date: `npm run migrate`. Forward only; a migration that has landed is never edited. */
import { fileURLToPath, pathToFileURL } from 'node:url';
import { type QueryInterface, Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';

const FOLDER = fileURLToPath(new URL('../migrations', import.meta.url));

type Up = (params: { context: QueryInterface }) => Promise<void>;

/** Any number, the same for everyone: two machines that migrate at once take turns. */
const TURN = 720_415;

/**
 * Runs what is pending, each migration with its entry in `table` in one transaction: one that fails
 * leaves nothing behind. All goes over a single connection, which holds the turn and carries the transaction;
 * a migration must not open a transaction of its own.
 *
 * @param url the migrator's address
 * @returns the names of the migrations that ran
 */
export async function migrate(
  url: string,
  { folder = FOLDER, table = 'schema_migrations' } = {},
): Promise<string[]> {
  const pool = { max: 1, min: 1, idle: 3_600_000, evict: 3_600_000 };
  const sequelize = new Sequelize(url, { dialect: 'postgres', logging: false, pool });
  const say = async (statement: string): Promise<void> => {
    await sequelize.query(statement, { raw: true });
  };
  try {
    await say(`select pg_advisory_lock(${TURN})`);
    const umzug = new Umzug({
      migrations: {
        glob: ['*.ts', { cwd: folder }],
        // Imported here and not by umzug, so that a test runner reads TypeScript in its own way.
        resolve: ({ name, path = '', context }) => ({
          name,
          up: async () => {
            const { up } = (await import(pathToFileURL(path).href)) as { up: Up };
            await up({ context });
          },
        }),
      },
      context: sequelize.getQueryInterface(),
      storage: new SequelizeStorage({ sequelize, tableName: table }),
      logger: undefined,
    });
    umzug.on('migrating', () => say('begin'));
    umzug.on('migrated', () => say('commit'));
    return (await umzug.up()).map((migration) => migration.name);
  } finally {
    // Closing the connection gives up the turn and rolls back what was not committed.
    await sequelize.close();
  }
}

async function main(): Promise<void> {
  const url = process.env.DATABASE_URL_MIGRATOR;
  if (!url) throw new Error('DATABASE_URL_MIGRATOR is not set.');
  const ran = await migrate(url);
  console.log(ran.length === 0 ? 'The database is up to date.' : `Migrated: ${ran.join(', ')}`);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  main().catch((error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    process.exit(1);
  });
}
