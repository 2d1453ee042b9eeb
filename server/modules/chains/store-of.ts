import type { Sequelize } from 'sequelize';
import { ChainStore } from './chain-store.ts';

const stores = new WeakMap<Sequelize, ChainStore>();

/** The one memory per database pool. */
export function storeOf(database: Sequelize): ChainStore {
  const known = stores.get(database);
  if (known) return known;
  const store = new ChainStore(database);
  stores.set(database, store);
  return store;
}
