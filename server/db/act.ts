import { AsyncLocalStorage } from 'node:async_hooks';
import { createHash } from 'node:crypto';
import { QueryTypes } from 'sequelize';
import { canonicalJson } from '#shared/canonical-json.ts';
import type { Context } from '#server/http/context.ts';
import { readRow } from './read.ts';
import { rowsSha256 } from './row-digest.ts';
import { inTransaction } from './transaction.ts';

/** What an act is about, said before it begins. */
export interface ActDescription {
  /** `<noun>.<verb>`, for example `calibration.issue`. */
  kind: `${string}.${string}`;
  /** The laboratory that acts; null for the registrar and the product itself. */
  laboratoryId: string | null;
  reason?: string;
}

/** What an act changed, said before it ends. */
export interface ActContent {
  subject: { type: string; id: string };
  before?: unknown;
  after: unknown;
}

/** The act that is open: every row it inserts carries its number and its time. */
export interface Act {
  readonly seq: number;
  readonly recordedAt: Date;
  /** States what changed; an act without it is not committed. */
  record(content: ActContent): void;
  /** Notes a row that this act wrote; models call it, services do not. */
  noteRow(table: string, sha256: string): void;
}

const openAct = new AsyncLocalStorage<Act>();

/** The act that is open in this chain of calls; register models refuse to write without one. */
export function currentAct(): Act | undefined {
  return openAct.getStore();
}

/**
 * Runs a change of the register as one act: acts are serialised, numbered without gaps, and each leaves one
 * row with who, what, why, before and after, chained by SHA-256 to the act before it. Either the whole act
 * stands or nothing does. An act within an act joins the outer one.
 */
export async function inAct<T>(
  context: Context,
  description: ActDescription,
  work: (act: Act) => Promise<T>,
): Promise<T> {
  const outer = currentAct();
  if (outer) return work({ ...outer, record: () => {} });
  return inTransaction(context.database, async () => {
    const head = await lockHead(context);
    let content: ActContent | undefined;
    const rows = new Map<string, string[]>();
    const act: Act = {
      seq: head.seq + 1,
      recordedAt: context.clock.now(),
      record: (stated) => {
        content = stated;
      },
      noteRow: (table, hash) => {
        const noted = rows.get(table) ?? [];
        noted.push(hash);
        rows.set(table, noted);
      },
    };
    const result = await openAct.run(act, () => work(act));
    if (!content) throw new Error(`The act ${description.kind} did not say what it changed`);
    await insertAct(context, description, act, content, rowDigests(rows), head.chainSha256);
    return result;
  });
}

/** What an act's record says of the rows it wrote in one table. */
export interface RowDigest {
  count: number;
  sha256: string;
}

function rowDigests(rows: ReadonlyMap<string, string[]>): Record<string, RowDigest> {
  const digests = [...rows].map(([table, hashes]) => [
    table,
    { count: hashes.length, sha256: rowsSha256(hashes) },
  ]);
  return Object.fromEntries(digests) as Record<string, RowDigest>;
}

interface Head {
  seq: number;
  chainSha256: string;
}

/** One row is locked by every act: what is read after it is the newest, and numbers follow the order of commits. */
async function lockHead(context: Context): Promise<Head> {
  await readRow(context.database, 'SELECT id FROM act_lock WHERE id = 1 FOR UPDATE');
  const last = await readRow<Head>(
    context.database,
    'SELECT seq, chain_sha256 AS chainSha256 FROM act ORDER BY seq DESC LIMIT 1 LOCK IN SHARE MODE',
  );
  return last ?? { seq: 0, chainSha256: '0'.repeat(64) };
}

async function insertAct(
  context: Context,
  description: ActDescription,
  act: Act,
  content: ActContent,
  rows: Record<string, RowDigest>,
  previousChain: string,
): Promise<void> {
  const body = canonicalJson({
    seq: act.seq,
    recordedAt: act.recordedAt,
    kind: description.kind,
    accountId: context.user?.accountId ?? null,
    laboratoryId: description.laboratoryId,
    reason: description.reason ?? null,
    requestId: context.requestId,
    subject: content.subject,
    before: content.before ?? null,
    after: content.after,
    rows,
  });
  const contentSha256 = sha256(body);
  await context.database.query(
    `INSERT INTO act (seq, recorded_at, kind, account_id, laboratory_id, subject_type, subject_id, content,
                      content_sha256, chain_sha256)
     VALUES (:seq, :recordedAt, :kind, :accountId, :laboratoryId, :subjectType, :subjectId, :content,
             :contentSha256, :chainSha256)`,
    {
      type: QueryTypes.INSERT,
      replacements: {
        seq: act.seq,
        recordedAt: act.recordedAt,
        kind: description.kind,
        accountId: context.user?.accountId ?? null,
        laboratoryId: description.laboratoryId,
        subjectType: content.subject.type,
        subjectId: content.subject.id,
        content: body,
        contentSha256,
        chainSha256: sha256(previousChain + contentSha256),
      },
    },
  );
}

/** SHA-256 of UTF-8 text, lower-case hexadecimal. */
export function sha256(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex');
}
