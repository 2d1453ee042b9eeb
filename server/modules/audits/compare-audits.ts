import type { z } from 'zod';
import type { AuditComparison, AuditCount, AuditDifference } from '#shared/contracts/audits.ts';
import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import { storedFindings } from './audit-findings.queries.ts';
import { auditRun, type AuditRun } from './audit-run.queries.ts';
import { ResultDigest } from './result-digest.ts';

type Comparison = z.infer<typeof AuditComparison>;
type Difference = z.infer<typeof AuditDifference>;
type Found = NonNullable<Difference['then']>;

const SHOWN = 50;

/** How a repeated audit compares with the one it repeats; null until that one is done. */
export async function compareAudits(
  database: Sequelize,
  repeated: AuditRun,
  firstId: string,
): Promise<Comparison | null> {
  const first = await auditRun(database, firstId);
  if (!first) return null;
  const isIntact = (await storedDigest(database, first)) === first.resultSha256;
  const isSame = isIntact && first.resultSha256 === repeated.resultSha256;
  const { differences, differenceCount } = isSame
    ? { differences: [], differenceCount: 0 }
    : await differencesOf(database, first.id, repeated.id);
  return {
    of: first.id,
    isSame,
    ruleSet: { then: first.ruleSet, now: repeated.ruleSet },
    engine: { then: first.engine, now: repeated.engine },
    sameFacts: first.factsSha256 === repeated.factsSha256,
    isIntact,
    differences,
    differenceCount,
  };
}

/** The digest of a run's result, worked out from what is stored of it. */
export async function storedDigest(database: Sequelize, run: AuditRun): Promise<string> {
  const digest = new ResultDigest(run);
  for await (const rows of storedFindings(database, run.id)) for (const row of rows) digest.finding(row);
  const { chains, values, links } = run;
  return digest.end({ chains, values, links, counts: JSON.parse(run.counts) as AuditCount[] });
}

const SAME = `b.run_id = :other AND b.rule = a.rule AND b.verdict = a.verdict AND b.subject = a.subject
  AND b.value_uid = a.value_uid AND b.parent_uid <=> a.parent_uid`;

/** Findings that one of two runs has and the other has not, or gives another outcome or severity. */
async function differencesOf(
  database: Sequelize,
  first: string,
  second: string,
): Promise<Pick<Comparison, 'differences' | 'differenceCount'>> {
  const { rows: gone, count: goneCount } = await lacking(
    database,
    first,
    second,
    'AND b.outcome = a.outcome AND b.severity = a.severity',
  );
  const { rows: added, count: addedCount } = await lacking(database, second, first, '');
  const differences: Difference[] = [
    ...gone.map((row) =>
      difference(row, foundOf(row.outcome, row.severity), foundOf(row.otherOutcome, row.otherSeverity)),
    ),
    ...added.map((row) => difference(row, null, foundOf(row.outcome, row.severity))),
  ];
  return { differences: differences.slice(0, SHOWN), differenceCount: goneCount + addedCount };
}

interface LackingRow {
  rule: string;
  verdict: Difference['verdict'];
  registryNo: string;
  outcome: Found['outcome'];
  severity: Found['severity'];
  /** What the other run says of the same, where it says anything. */
  otherOutcome: Found['outcome'] | null;
  otherSeverity: Found['severity'] | null;
}

function difference(
  { rule, verdict, registryNo }: LackingRow,
  then: Found | null,
  now: Found | null,
): Difference {
  return { rule, verdict, registryNo, then, now };
}

function foundOf(outcome: Found['outcome'] | null, severity: Found['severity'] | null): Found | null {
  return outcome && severity && { outcome, severity };
}

async function lacking(
  database: Sequelize,
  run: string,
  other: string,
  and: string,
): Promise<{ rows: LackingRow[]; count: number }> {
  const from = `audit_finding a WHERE a.run_id = :run
    AND NOT EXISTS (SELECT 1 FROM audit_finding b WHERE ${SAME} ${and})`;
  const [rows, count] = await Promise.all([
    readRows<LackingRow>(
      database,
      `SELECT a.rule, a.verdict, a.outcome, a.severity,
         (SELECT s.registry_no FROM assigned_value v JOIN standard s ON s.id = v.standard_id
          WHERE v.uid = a.value_uid) AS registryNo,
         (SELECT b.outcome FROM audit_finding b WHERE ${SAME} LIMIT 1) AS otherOutcome,
         (SELECT b.severity FROM audit_finding b WHERE ${SAME} LIMIT 1) AS otherSeverity
       FROM ${from} ORDER BY a.n LIMIT ${SHOWN}`,
      { run, other },
    ),
    readRow<{ count: number }>(database, `SELECT COUNT(*) AS count FROM ${from}`, { run, other }),
  ]);
  return { rows, count: count!.count };
}
