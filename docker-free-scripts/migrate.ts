/** Brings the database up to date: `npm run migrate`. Forward only; a migration that has landed is never edited. */
import { fileURLToPath } from 'node:url';
import { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';

const folder = fileURLToPath(new URL('../migrations', import.meta.url));

/** @returns the names of the migrations that ran. */
export async function migrate(url: string): Promise<string[]> {
  const sequelize = new Sequelize(url, { dialect: 'postgres', logging: false });
  try {
    const umzug = new Umzug({
      migrations: { glob: ['*.ts', { cwd: folder }] },
      context: sequelize.getQueryInterface(),
      storage: new SequelizeStorage({ sequelize, tableName: 'schema_migrations' }),
      logger: undefined,
    });
    return (await umzug.up()).map((migration) => migration.name);
  } finally {
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
