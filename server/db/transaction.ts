import { setTimeout as pause } from 'node:timers/promises';
import { Sequelize, Transaction } from 'sequelize';

/** Deadlock, lock wait, and a snapshot overtaken by another writer: the whole transaction may be run again. */
const RETRYABLE = new Set([1213, 1205, 1020]);
const ATTEMPTS = 5;

/**
 * Runs `work` in one transaction, again from the start where the database asks for it (COMMIT included). A
 * nested call joins the transaction that is open: two would wait for each other.
 */
export async function inTransaction<T>(database: Sequelize, work: () => Promise<T>): Promise<T> {
  if (isInTransaction()) return work();
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await database.transaction(
        { isolationLevel: Transaction.ISOLATION_LEVELS.REPEATABLE_READ },
        work,
      );
    } catch (error) {
      if (attempt >= ATTEMPTS || !isRetryable(error)) throw error;
      await pause(2 ** attempt * 5 * (0.5 + Math.random()));
    }
  }
}

/** Whether a transaction is open in this chain of calls. */
export function isInTransaction(): boolean {
  return ambient()?.get('transaction') !== undefined;
}

function isRetryable(error: unknown): boolean {
  const parent = (error as { parent?: { errno?: number } } | null)?.parent;
  return parent?.errno !== undefined && RETRYABLE.has(parent.errno);
}

/** Sequelize keeps the namespace given to `useCLS` here; its types leave it out. */
function ambient(): { get(key: string): unknown } | undefined {
  return (Sequelize as unknown as { _cls?: { get(key: string): unknown } })._cls;
}
