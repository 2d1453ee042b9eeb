import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import { ancestorIds, storedGroups, storedSources, storedValues } from './closure.queries.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { duplicatesOf, laboratoryDossiers, standardDossiers } from './dossier.queries.ts';
import { isNoticeSince, recordedNotices } from './notices.queries.ts';
import { RecentMap } from './recent-map.ts';
import type { LaboratoryDossier, StandardDossier, StoredGroup, StoredSource, StoredValue } from './stored.ts';

/** What is kept at most: a value takes about 4 kB, a standard with its history about 14 kB. */
const MOST_VALUES = 10_000;
const MOST_STANDARDS = 3_600;
const MOST_GROUPS = 300;
/** A register up to this size is read whole when the first chain is asked for. */
const WHOLE_REGISTER = 10_000;

/** A part of the register that is complete upwards: with every value, all it leans on. */
export interface Closure {
  /** Each after all of its own references. */
  values: StoredValue[];
  sources: Map<number, StoredSource>;
  groups: Map<number, StoredGroup>;
}

/** What both kinds of memory can do. */
type Memory<Key, Value> = Pick<RecentMap<Key, Value>, 'get' | 'set'>;

/** Tables whose later rows change what is known of a standard, or of a laboratory. */
const TOUCHED_STANDARDS = `
  SELECT standard_id AS id FROM assigned_value WHERE act_seq > :seq
  UNION SELECT v.standard_id FROM value_end x JOIN assigned_value v ON v.id = x.value_id WHERE x.act_seq > :seq
  UNION SELECT standard_id FROM programme WHERE act_seq > :seq
  UNION SELECT standard_id FROM epoch WHERE act_seq > :seq
  UNION SELECT standard_id FROM property WHERE act_seq > :seq
  UNION SELECT standard_id FROM set_member WHERE act_seq > :seq
  UNION SELECT standard_id FROM standard_fact WHERE act_seq > :seq AND kind = 'class'
  UNION SELECT standard_id FROM source WHERE id > :source AND standard_id IS NOT NULL`;
/** The newest act, and the newest source: ids of sources follow the acts. */
const NEWEST = 'SELECT (SELECT MAX(seq) FROM act) AS seq, (SELECT MAX(id) FROM source) AS source';
const TOUCHED_LABORATORIES = `
  SELECT laboratory_id AS id FROM scope_line WHERE act_seq > :seq
  UNION SELECT laboratory_id FROM recognition WHERE act_seq > :seq
  UNION SELECT laboratory_id FROM authorisation WHERE act_seq > :seq`;

/**
 * The part of the register that chains have asked about, in memory. Recorded values never change, so they are
 * kept; what later acts add to (histories, programmes, scopes) is dropped when an act touched it. Every
 * question first catches up with the newest act, so an answer is never older than the question.
 */
export class ChainStore {
  readonly #database: Sequelize;
  readonly #values = new RecentMap<number, StoredValue>(MOST_VALUES);
  readonly #sources = new RecentMap<number, StoredSource>(MOST_VALUES);
  readonly #groups = new RecentMap<number, StoredGroup>(MOST_GROUPS);
  readonly #standards = new RecentMap<string, StandardDossier>(MOST_STANDARDS);
  readonly #laboratories = new Map<string, LaboratoryDossier>();
  #notices: readonly Notice[] = [];
  #seq = -1;
  /** The newest source then. */
  #source = 0;
  #catchingUp: Promise<void> | null = null;

  constructor(database: Sequelize) {
    this.#database = database;
  }

  /** The act up to which the memory is current. */
  get seq(): number {
    return this.#seq;
  }

  /** Every notice recorded by now, whatever its days. */
  get notices(): readonly Notice[] {
    return this.#notices;
  }

  /** Brings the memory up to the newest act. Callers that arrive together share one look. */
  catchUp(): Promise<void> {
    this.#catchingUp ??= this.#lookForActs().finally(() => {
      this.#catchingUp = null;
    });
    return this.#catchingUp;
  }

  /** The values with these ids and all they lean on. */
  async closure(ids: readonly number[]): Promise<Closure> {
    const held = this.#heldAbove(ids) ?? (await this.#valuesOf(await ancestorIds(this.#database, ids)));
    const values = inOrder(held, ids);
    const sourceIds = new Set(values.flatMap((value) => value.sources.map((link) => link.sourceId)));
    const groupIds = new Set(values.flatMap((value) => (value.groupId === null ? [] : [value.groupId])));
    const [sources, groups] = await Promise.all([
      found(this.#sources, sourceIds, (missing) => storedSources(this.#database, missing)),
      found(this.#groups, groupIds, (missing) => storedGroups(this.#database, missing)),
    ]);
    return { values, sources, groups };
  }

  /** What is known of these standards, duplicates' partners included. */
  async standards(ids: Iterable<string>): Promise<Map<string, StandardDossier>> {
    const asked = [...new Set(ids)];
    const unread = asked.filter((id) => !this.#standards.has(id));
    // The partners of what has to be read are read with it, those of what is held have to be in memory still.
    const found = await this.#standardsOf([...asked, ...(await duplicatesOf(this.#database, unread))]);
    const partners = asked.flatMap((id) => found.get(id)?.duplicateIds ?? []);
    for (const [id, dossier] of await this.#standardsOf(partners)) found.set(id, dossier);
    return found;
  }

  /** What is known of these laboratories. */
  async laboratories(ids: Iterable<string>): Promise<Map<string, LaboratoryDossier>> {
    return this.#dossiers(this.#laboratories, ids, async (missing) => {
      const dossiers = await laboratoryDossiers(this.#database, missing);
      return dossiers.map((dossier) => [dossier.id, dossier]);
    });
  }

  #standardsOf(ids: Iterable<string>): Promise<Map<string, StandardDossier>> {
    return this.#dossiers(this.#standards, ids, async (missing) => {
      const dossiers = await standardDossiers(this.#database, missing);
      return dossiers.map((dossier) => [dossier.standardId, dossier]);
    });
  }

  /**
   * From memory, or read and remembered. Those found are handed out as a map of their own: an act may empty the
   * memory while a chain is worked out. What was read while an act came in may be older than it, and is not kept.
   */
  async #dossiers<Dossier>(
    memory: Memory<string, Dossier>,
    ids: Iterable<string>,
    read: (missing: string[]) => Promise<(readonly [string, Dossier])[]>,
  ): Promise<Map<string, Dossier>> {
    const found = new Map<string, Dossier>();
    const missing: string[] = [];
    for (const id of new Set(ids)) {
      const known = memory.get(id);
      if (known) found.set(id, known);
      else missing.push(id);
    }
    const seq = this.#seq;
    for (const chunk of chunks(missing, 1_000)) {
      for (const [id, dossier] of await read(chunk)) {
        found.set(id, dossier);
        if (this.#seq === seq) memory.set(id, dossier);
      }
    }
    return found;
  }

  async #lookForActs(): Promise<void> {
    const head = await readRow<{ seq: number | null; source: number | null }>(this.#database, NEWEST);
    const seq = head?.seq ?? 0;
    if (seq === this.#seq) return;
    if (this.#seq === -1 || (await isNoticeSince(this.#database, this.#seq))) {
      this.#notices = await recordedNotices(this.#database);
    }
    if (this.#seq === -1) await this.#readSmallRegister();
    else await this.#forgetTouched();
    this.#seq = seq;
    this.#source = head?.source ?? 0;
  }

  /** A small register is read in one go: the first visitor's chain is then as quick as the hundredth. */
  async #readSmallRegister(): Promise<void> {
    const rows = await readRows<{ id: number; standardId: string; issuerId: string; holderId: string }>(
      this.#database,
      `SELECT id, standard_id AS standardId, issuer_id AS issuerId, holder_id AS holderId
       FROM assigned_value LIMIT ${WHOLE_REGISTER + 1}`,
    );
    if (rows.length > WHOLE_REGISTER) return;
    await this.#valuesOf(rows.map((row) => row.id));
    await this.standards(rows.map((row) => row.standardId));
    await this.laboratories(rows.flatMap((row) => [row.issuerId, row.holderId]));
  }

  async #forgetTouched(): Promise<void> {
    const [standards, laboratories] = await Promise.all([
      readRows<{ id: string }>(this.#database, TOUCHED_STANDARDS, {
        seq: this.#seq,
        source: this.#source,
      }),
      readRows<{ id: string }>(this.#database, TOUCHED_LABORATORIES, { seq: this.#seq }),
    ]);
    for (const { id } of standards) this.#standards.delete(id);
    for (const { id } of laboratories) this.#laboratories.delete(id);
  }

  /** These values and all they lean on, where all of them are in memory; otherwise null. */
  #heldAbove(ids: readonly number[]): Map<number, StoredValue> | null {
    const held = new Map<number, StoredValue>();
    const seen = new Set<number>(ids);
    for (const id of seen) {
      const value = this.#values.get(id);
      if (!value) return null;
      held.set(id, value);
      for (const { parentId } of value.parents) seen.add(parentId);
    }
    return held;
  }

  #valuesOf(ids: readonly number[]): Promise<Map<number, StoredValue>> {
    return found(this.#values, ids, (missing) => storedValues(this.#database, missing));
  }
}

/** Values that never change, by id, from memory or read and remembered: a map of its own, whatever memory lets go. */
async function found<Item extends { id: number }>(
  memory: RecentMap<number, Item>,
  ids: Iterable<number>,
  read: (missing: number[]) => Promise<Item[]>,
): Promise<Map<number, Item>> {
  // In the order asked for, which decides the order of sums and lists, whatever is in memory already.
  const items = new Map<number, Item>();
  const missing: number[] = [];
  for (const id of ids) {
    const known = memory.get(id);
    items.set(id, known!);
    if (!known) missing.push(id);
  }
  for (const chunk of chunks(missing, 2_000)) {
    for (const item of await read(chunk)) {
      items.set(item.id, item);
      memory.set(item.id, item);
    }
  }
  return items;
}

/** Depth first, parents before children. The register admits no circle, so this ends. */
function inOrder(held: ReadonlyMap<number, StoredValue>, ids: readonly number[]): StoredValue[] {
  const done = new Set<number>();
  const ordered: StoredValue[] = [];
  const visit = (id: number): void => {
    if (done.has(id)) return;
    done.add(id);
    const value = held.get(id)!;
    for (const { parentId } of value.parents) visit(parentId);
    ordered.push(value);
  };
  for (const id of ids) visit(id);
  return ordered;
}

function chunks<T>(items: T[], size: number): T[][] {
  const parts: T[][] = [];
  for (let start = 0; start < items.length; start += size) parts.push(items.slice(start, start + size));
  return parts;
}
