/**
 * The database: one Sequelize instance per process, one transaction per unit of work, one shop per transaction.
 *
 * Next evaluates this module once for pages and once for route handlers, so everything that must be single
 * (instance, models, the store that carries the transaction) lives in ONE object on `globalThis`.
 */
import { AsyncLocalStorage } from 'node:async_hooks';
import { type QueryInterface, type QueryOptions, Sequelize, type Transaction, QueryTypes } from 'sequelize';
import { env, required } from '@/lib/platform/env';

interface Scope {
  transaction: Transaction;
  shopId: string | null;
  personId: string | null;
}

type ClsMap = Map<string, unknown>;

interface Holder {
  sequelize?: Sequelize;
  cls: AsyncLocalStorage<ClsMap>;
  scope: AsyncLocalStorage<Scope>;
  inits: ((db: Sequelize) => void)[];
}

const KEY = Symbol.for('lampwright.db');
const store = globalThis as unknown as Record<symbol, Holder | undefined>;

function holder(): Holder {
  store[KEY] ??= { cls: new AsyncLocalStorage(), scope: new AsyncLocalStorage(), inits: [] };
  return store[KEY];
}

/** Sequelize 6 wants a namespace as `cls-hooked` makes them; AsyncLocalStorage gives the same. */
function clsNamespace(cls: AsyncLocalStorage<ClsMap>) {
  return {
    get: (key: string) => cls.getStore()?.get(key),
    set: (key: string, value: unknown) => void cls.getStore()?.set(key, value),
    run: (fn: (context: unknown) => void) => cls.run(new Map(cls.getStore() ?? []), () => fn(undefined)),
    runAndReturn: <T>(fn: () => T): T => cls.run(new Map(cls.getStore() ?? []), fn),
    bind: <F extends (...args: unknown[]) => unknown>(fn: F): F => AsyncLocalStorage.bind(fn) as unknown as F,
  };
}

function databaseUrl(): string {
  const process = env().LAMPWRIGHT_PROCESS;
  if (process === 'worker') return required('DATABASE_URL_WORKER');
  if (process === 'migrator') return required('DATABASE_URL_MIGRATOR');
  return required('DATABASE_URL_WEB');
}

export function sequelize(): Sequelize {
  const h = holder();
  if (!h.sequelize) {
    (Sequelize as unknown as { useCLS(namespace: unknown): void }).useCLS(clsNamespace(h.cls));
    h.sequelize = new Sequelize(databaseUrl(), {
      dialect: 'postgres',
      logging: false,
      pool: { max: 10, min: 0, idle: 10_000, acquire: 15_000 },
      define: { underscored: true, timestamps: false, freezeTableName: true },
      dialectOptions: {
        application_name: `lampwright-${env().LAMPWRIGHT_PROCESS}`,
        statement_timeout: 20_000,
      },
    });
    for (const init of h.inits) init(h.sequelize);
  }
  return h.sequelize;
}

/**
 * Models are initialised when the instance is made, not at import: a build has no database. Where Next evaluates
 * the models a second time, the second set of classes is initialised against the same instance.
 */
export function registerModels(init: (db: Sequelize) => void): void {
  const h = holder();
  h.inits.push(init);
  if (h.sequelize) init(h.sequelize);
}

async function inScope<T>(
  setting: 'app.shop_id' | 'app.person_id',
  id: string,
  fn: () => Promise<T>,
): Promise<T> {
  const h = holder();
  return sequelize().transaction(async (transaction) => {
    await sequelize().query('select set_config($1, $2, true)', { bind: [setting, id], transaction });
    const scope: Scope = {
      transaction,
      shopId: setting === 'app.shop_id' ? id : null,
      personId: setting === 'app.person_id' ? id : null,
    };
    return h.scope.run(scope, fn);
  });
}

/**
 * Runs `fn` in one transaction that sees only the rows of `shopId`. Inside another `withShop` of the same shop
 * it joins that transaction; of another shop it is refused, since one transaction never spans two shops.
 */
export async function withShop<T>(shopId: string, fn: () => Promise<T>): Promise<T> {
  const current = holder().scope.getStore();
  if (current) {
    if (current.shopId !== shopId) throw new Error('A transaction of one shop can not reach into another.');
    return fn();
  }
  return inScope('app.shop_id', shopId, fn);
}

/** Runs `fn` in one transaction that sees one person's own rows (credentials, sessions) and no shop's. */
export async function withPerson<T>(personId: string, fn: () => Promise<T>): Promise<T> {
  if (holder().scope.getStore()) throw new Error('withPerson can not run inside another scope.');
  return inScope('app.person_id', personId, fn);
}

/** Whether the caller is inside a transaction: code that talks to other services must not be. */
export function insideTransaction(): boolean {
  return holder().scope.getStore() !== undefined;
}

/** The shop of the running transaction. @throws outside `withShop`. */
export function currentShopId(): string {
  const shopId = holder().scope.getStore()?.shopId;
  if (!shopId) throw new Error('No shop: this code must run inside withShop.');
  return shopId;
}

/** The running transaction, for queries that must name it. @throws outside a scope. */
export function currentTransaction(): Transaction {
  const scope = holder().scope.getStore();
  if (!scope) throw new Error('No transaction: this code must run inside withShop or withPerson.');
  return scope.transaction;
}

/** A typed SELECT with binds, in the running transaction where there is one. */
export async function select<R extends object>(sql: string, bind: unknown[] = []): Promise<R[]> {
  const transaction = holder().scope.getStore()?.transaction;
  const options: QueryOptions & { type: QueryTypes.SELECT } = {
    bind,
    type: QueryTypes.SELECT,
    ...(transaction ? { transaction } : {}),
  };
  return sequelize().query<R>(sql, options);
}

/** A statement that returns rows (INSERT … RETURNING, UPDATE … RETURNING), in the running transaction. */
export async function run<R extends object>(sql: string, bind: unknown[] = []): Promise<R[]> {
  const [rows] = await sequelize().query(sql, { bind, transaction: currentTransaction(), raw: true });
  return rows as R[];
}

export async function closeDatabase(): Promise<void> {
  const h = holder();
  await h.sequelize?.close();
  delete h.sequelize;
}

export type Migration = (params: { context: QueryInterface }) => Promise<void>;
