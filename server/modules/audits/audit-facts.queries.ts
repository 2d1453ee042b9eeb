import type { Sequelize } from 'sequelize';
import { readRow } from '#server/db/read.ts';
import { unpacked } from './packed-list.ts';
import { FACTS_PER_BLOCK } from './perform-audit.ts';

/** What a finding's rule saw, as it was stored. */
export async function storedFacts(database: Sequelize, runId: string, factsN: number): Promise<unknown> {
  const row = await readRow<{ body: string }>(
    database,
    'SELECT body FROM audit_facts WHERE run_id = :runId AND block = :block',
    { runId, block: Math.floor(factsN / FACTS_PER_BLOCK) },
  );
  return unpacked<unknown>(Buffer.from(row!.body, 'base64'))[factsN % FACTS_PER_BLOCK];
}
