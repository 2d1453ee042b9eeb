import type { Sequelize } from 'sequelize';
import { canonicalJson } from '#shared/canonical-json.ts';
import { sha256, type RowDigest } from '#server/db/act.ts';
import { GRANTS } from '#server/db/grants.ts';
import { readRows } from '#server/db/read.ts';
import { rowSha256, rowsSha256, type ColumnShape } from '#server/db/row-digest.ts';

/** One thing that is not as the record says; `actSeq` names the act to look at. */
export interface RecordProblem {
  actSeq: number;
  /** The act itself, or a table whose rows it wrote. */
  where: string;
  sentence: string;
}

export interface RecordReport {
  acts: number;
  rows: number;
  problems: RecordProblem[];
}

/** Tables whose rows belong to the act of the row they hang on. */
const ACT_OF_PARENT: Readonly<Record<string, string>> = {
  value_link: 'JOIN assigned_value p ON p.id = t.child_id',
  source_link: 'JOIN assigned_value p ON p.id = t.child_id',
  component: 'JOIN assigned_value p ON p.id = t.value_id',
  value_group: 'JOIN revision p ON p.id = t.revision_id',
  audit_finding: 'JOIN audit_run p ON p.id = t.run_id',
  audit_facts: 'JOIN audit_run p ON p.id = t.run_id',
  group_covariance: 'JOIN value_group g ON g.id = t.group_id JOIN revision p ON p.id = g.revision_id',
  notice_term: 'JOIN notice p ON p.id = t.notice_id',
  notice_shift: 'JOIN notice p ON p.id = t.notice_id',
};

/** Rows taken at once: bounds the memory of one step. */
const PAGE = 20_000;

/** The tables that an act's record covers: all that the application may insert into and not change. */
export const RECORDED_TABLES: readonly string[] = Object.entries(GRANTS)
  .filter(([table, privileges]) => table !== 'act' && privileges.join() === 'INSERT')
  .map(([table]) => table);

/**
 * Walks the whole record: every act's content against its hash, every hash against the one before it, and
 * every row of the register against the act that wrote it. What was changed, added or removed behind the
 * product's back is named. Reads only.
 */
export async function verifyRecord(database: Sequelize): Promise<RecordReport> {
  const { acts, problems } = await verifyActs(database);
  let rows = 0;
  for (const table of RECORDED_TABLES) {
    const found = await rowHashesByAct(database, table);
    for (const hashes of found.values()) rows += hashes.length;
    problems.push(...rowProblems(table, acts, found));
  }
  return { acts: acts.size, rows, problems: problems.sort((a, b) => a.actSeq - b.actSeq) };
}

interface ActRow {
  seq: number;
  kind: string;
  subjectType: string;
  subjectId: string;
  content: string;
  contentSha256: string;
  chainSha256: string;
}

interface KnownAct {
  name: string;
  rows: Record<string, RowDigest>;
}

async function verifyActs(
  database: Sequelize,
): Promise<{ acts: Map<number, KnownAct>; problems: RecordProblem[] }> {
  const acts = new Map<number, KnownAct>();
  const problems: RecordProblem[] = [];
  let expectedSeq = 1;
  let chain = '0'.repeat(64);
  for (;;) {
    const page = await readRows<ActRow>(
      database,
      `SELECT seq, kind, subject_type AS subjectType, subject_id AS subjectId, content,
              content_sha256 AS contentSha256, chain_sha256 AS chainSha256
       FROM act WHERE seq >= :expectedSeq ORDER BY seq LIMIT ${PAGE}`,
      { expectedSeq },
    );
    for (const act of page) {
      const problem = actProblem(act, expectedSeq, chain);
      if (problem) problems.push({ actSeq: act.seq, where: 'act', sentence: problem });
      acts.set(act.seq, {
        name: `${act.kind} of ${act.subjectType} ${act.subjectId}`,
        rows: rowsOf(act.content),
      });
      expectedSeq = act.seq + 1;
      chain = act.chainSha256;
    }
    if (page.length < PAGE) return { acts, problems };
  }
}

function actProblem(act: ActRow, expectedSeq: number, previousChain: string): string | null {
  if (act.seq !== expectedSeq) return `Acts ${expectedSeq} to ${act.seq - 1} are missing.`;
  const name = `Act ${act.seq} (${act.kind} of ${act.subjectType} ${act.subjectId})`;
  if (sha256(act.content) !== act.contentSha256) return `${name}: its content is not what was recorded.`;
  if (sha256(previousChain + act.contentSha256) !== act.chainSha256) {
    return `${name}: it does not follow from the act before it.`;
  }
  return columnsAgree(act) ? null : `${name}: its columns do not say what its content says.`;
}

function columnsAgree(act: ActRow): boolean {
  const content = JSON.parse(act.content) as {
    seq: number;
    kind: string;
    subject: { type: string; id: string };
  };
  const columns = { seq: act.seq, kind: act.kind, subject: { type: act.subjectType, id: act.subjectId } };
  return (
    canonicalJson({ seq: content.seq, kind: content.kind, subject: content.subject }) ===
    canonicalJson(columns)
  );
}

/** What the act says of its rows; nothing, where its content cannot be read any more. */
function rowsOf(content: string): Record<string, RowDigest> {
  try {
    return (JSON.parse(content) as { rows?: Record<string, RowDigest> }).rows ?? {};
  } catch {
    return {};
  }
}

function rowProblems(
  table: string,
  acts: ReadonlyMap<number, KnownAct>,
  found: ReadonlyMap<number, string[]>,
): RecordProblem[] {
  const problems: RecordProblem[] = [];
  const say = (actSeq: number, sentence: string) => problems.push({ actSeq, where: table, sentence });
  for (const [actSeq, act] of acts) {
    const stated = act.rows[table] ?? { count: 0, sha256: rowsSha256([]) };
    const hashes = found.get(actSeq) ?? [];
    const name = `Act ${actSeq} (${act.name})`;
    if (hashes.length !== stated.count) {
      say(actSeq, `${name} wrote ${stated.count} rows of ${table}; there are ${hashes.length}.`);
    } else if (rowsSha256(hashes) !== stated.sha256) {
      say(actSeq, `${name}: a row of ${table} is not what the act wrote.`);
    }
  }
  for (const [actSeq, hashes] of found) {
    if (!acts.has(actSeq))
      say(actSeq, `${hashes.length} rows of ${table} name act ${actSeq}, which is not there.`);
  }
  return problems;
}

async function rowHashesByAct(database: Sequelize, table: string): Promise<Map<number, string[]>> {
  const columns = await columnShapes(database, table);
  const join = ACT_OF_PARENT[table] ?? '';
  const actSeq = join ? 'p.act_seq' : 't.act_seq';
  const key = columns.filter((column) => column.isKey).map((column) => `t.${column.name}`);
  const found = new Map<number, string[]>();
  for (let offset = 0; ; offset += PAGE) {
    const page = await readRows<Record<string, unknown> & { verifiedActSeq: number }>(
      database,
      `SELECT t.*, ${actSeq} AS verifiedActSeq FROM ${table} t ${join} ORDER BY ${key.join(', ')} LIMIT ${PAGE} OFFSET ${offset}`,
    );
    for (const row of page) {
      const hashes = found.get(row.verifiedActSeq) ?? [];
      hashes.push(rowSha256(columns, row));
      found.set(row.verifiedActSeq, hashes);
    }
    if (page.length < PAGE) return found;
  }
}

async function columnShapes(
  database: Sequelize,
  table: string,
): Promise<(ColumnShape & { isKey: boolean })[]> {
  const columns = await readRows<{ name: string; type: string; scale: number | null; keyed: string }>(
    database,
    `SELECT COLUMN_NAME AS name, DATA_TYPE AS type, NUMERIC_SCALE AS scale, COLUMN_KEY AS keyed
     FROM information_schema.COLUMNS
     WHERE TABLE_SCHEMA = DATABASE() AND TABLE_NAME = :table ORDER BY ORDINAL_POSITION`,
    { table },
  );
  return columns.map(({ name, type, scale, keyed }) => ({ name, type, scale, isKey: keyed === 'PRI' }));
}
