import { AsyncLocalStorage } from 'node:async_hooks';
import { Sequelize } from 'sequelize';

/**
 * Lets Sequelize find the ambient transaction: the four calls it makes on a continuation-local namespace,
 * over Node's own AsyncLocalStorage. Passing `transaction` by hand is forgotten sooner or later.
 */
const storage = new AsyncLocalStorage<Map<string, unknown>>();
const namespace = {
  bind: <F>(callback: F) => callback,
  run: (callback: (scope: Map<string, unknown>) => unknown) => {
    const scope = new Map(storage.getStore());
    return storage.run(scope, callback, scope);
  },
  get: (key: string) => storage.getStore()?.get(key),
  set: (key: string, value: unknown) => storage.getStore()?.set(key, value),
};
Sequelize.useCLS(namespace);

/**
 * Opens the pool. The four connector options keep DECIMAL exact: without them the connector turns columns
 * into binary floats and drops digits in silence (a test reads 0.123456789012345679 back).
 */
export function openDatabase(url: string, poolSize: number): Sequelize {
  return new Sequelize(url, {
    dialect: 'mariadb',
    logging: false,
    timezone: '+00:00',
    define: { timestamps: false, freezeTableName: true },
    pool: { max: poolSize, min: 1, acquire: 30_000, idle: 30_000 },
    dialectOptions: {
      supportBigNumbers: false,
      bigIntAsNumber: true,
      insertIdAsNumber: true,
      checkNumberRange: true,
      connectTimeout: 10_000,
    },
  });
}
