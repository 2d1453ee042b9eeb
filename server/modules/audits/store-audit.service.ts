import type { Sequelize } from 'sequelize';
import { rulesInWords } from '#shared/rules/rule-set.ts';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { rowSha256, type ColumnShape } from '#server/db/row-digest.ts';
import { inTransaction } from '#server/db/transaction.ts';
import type { Context } from '#server/http/context.ts';
import { closeJob, type AuditJob } from './audit-job.queries.ts';
import { auditRunModel, FACTS_COLUMNS, FINDING_COLUMNS } from './audits.model.ts';
import type { PerformedAudit } from './perform-audit.ts';

/** Rows of one statement. */
const ROWS = 500;

/**
 * Records a finished audit: its findings, what the rules saw, and the run that binds them by digest, as one act. The
 * many rows are written before the act begins, in the same transaction, so that other acts wait for the run alone.
 * @param signal ends the work
 * @returns false where the job was stopped or the work ended meanwhile: then nothing is kept
 */
export async function storeAudit(
  context: Context,
  job: AuditJob,
  performed: PerformedAudit,
  beganAt: Date,
  signal?: AbortSignal,
): Promise<boolean> {
  const stopped = new Error('The audit was stopped while it was stored');
  try {
    await inTransaction(context.database, async () => {
      const refuseIfEnded = () => {
        if (signal?.aborted) throw stopped;
      };
      const written = await writeRows(context.database, job.id, performed, refuseIfEnded);
      await recordRun(context, job, performed, beganAt, written);
      if (!(await closeJob(context, job, 'done', null))) throw stopped;
    });
    return true;
  } catch (error) {
    if (error === stopped) return false;
    throw error;
  }
}

/** Digests of the rows written, by table. */
type Written = Map<string, string[]>;

async function writeRows(
  database: Sequelize,
  runId: string,
  { findings, facts }: PerformedAudit,
  refuseIfEnded: () => void,
): Promise<Written> {
  const written: Written = new Map();
  const write = async (table: string, columns: readonly ColumnShape[], rows: Record<string, unknown>[]) => {
    if (rows.length === 0) return;
    refuseIfEnded();
    await database.getQueryInterface().bulkInsert(table, rows);
    const digests = written.get(table) ?? [];
    for (const row of rows) digests.push(rowSha256(columns, row));
    written.set(table, digests);
  };
  for (const block of findings.blocks()) {
    for (let from = 0; from < block.length; from += ROWS) {
      const rows = block.slice(from, from + ROWS).map((finding) => ({ ...finding, run_id: runId }));
      await write('audit_finding', FINDING_COLUMNS, rows);
    }
  }
  for (const [block, packed] of facts.packed().entries()) {
    await write('audit_facts', FACTS_COLUMNS, [{ run_id: runId, block, body: packed.toString('base64') }]);
  }
  return written;
}

async function recordRun(
  context: Context,
  job: AuditJob,
  performed: PerformedAudit,
  beganAt: Date,
  written: Written,
): Promise<void> {
  const { scope, valueUid, laboratoryId, day, known, asOf, asOfAct, repeatOf, askedBy } = job;
  const { chains, values, links, counts, ruleSet, engine, resultSha256, factsSha256, findings } = performed;
  await inAct(context, { kind: 'audit.run', laboratoryId }, async (act) => {
    await insertRow(auditRunModel(context.database), {
      id: job.id,
      ...{ scope, valueUid, laboratoryId, day, known, asOf, asOfAct, repeatOf, askedBy },
      ruleSet,
      engine,
      beganAt,
      endedAt: context.clock.now(),
      chains,
      valueCount: values,
      linkCount: links,
      findingCount: findings.length,
      counts: JSON.stringify(counts),
      rules: JSON.stringify(rulesInWords(day)),
      resultSha256,
      factsSha256,
    });
    for (const [table, digests] of written) for (const digest of digests) act.noteRow(table, digest);
    act.record({
      subject: { type: 'audit', id: job.id },
      after: { scope, valueUid, laboratoryId, day, known, asOf, ruleSet, engine, resultSha256, factsSha256 },
    });
  });
}
