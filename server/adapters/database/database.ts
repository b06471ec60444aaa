import { AsyncLocalStorage } from 'node:async_hooks';
import { Sequelize } from 'sequelize';

type Store = Map<string, unknown>;
const storage = new AsyncLocalStorage<Store>();

/**
 * Sequelize's hook for finding the running transaction, on Node's own AsyncLocalStorage: every query made inside
 * `sequelize.transaction(…)` joins it without being handed it, so none can slip out and starve the pool.
 */
const transactionScope = {
  get: (key: string) => storage.getStore()?.get(key),
  set: (key: string, value: unknown) => storage.getStore()?.set(key, value),
  run: (body: (store: Store) => void) => {
    const store: Store = new Map(storage.getStore() ?? []);
    storage.run(store, body, store);
  },
  bind: <T>(body: T): T => body,
};

/** Opens the pool of one process. Times are UTC; statements end before a request would. */
export function createDatabase(url: string, poolSize = 12): Sequelize {
  Sequelize.useCLS(transactionScope);
  return new Sequelize(url, {
    dialect: 'postgres',
    logging: false,
    timezone: '+00:00',
    pool: { max: poolSize, min: 0, acquire: 20_000, idle: 10_000 },
    dialectOptions: { application_name: 'dapple', statement_timeout: 25_000, idle_in_transaction_session_timeout: 30_000 },
    define: { underscored: true },
  });
}
