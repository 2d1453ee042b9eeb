import type { Sequelize } from 'sequelize';
import { readRow, readRows } from '#server/db/read.ts';
import { ancestorIds, storedGroups, storedSources, storedValues } from './closure.queries.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { laboratoryDossiers, standardDossiers } from './dossier.queries.ts';
import { isNoticeSince, recordedNotices } from './notices.queries.ts';
import type { LaboratoryDossier, StandardDossier, StoredGroup, StoredSource, StoredValue } from './stored.ts';

/** Beyond this many values the memory is emptied and filled anew by what is asked: about 2 kB each. */
const MAXIMUM_VALUES = 100_000;
/** A register up to this size is read whole when the first chain is asked for. */
const WHOLE_REGISTER = 20_000;

/** A part of the register that is complete upwards: with every value, all it leans on. */
export interface Closure {
  /** Each after all of its own references. */
  values: StoredValue[];
  sources: Map<number, StoredSource>;
  groups: Map<number, StoredGroup>;
}

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
  readonly #values = new Map<number, StoredValue>();
  readonly #sources = new Map<number, StoredSource>();
  readonly #groups = new Map<number, StoredGroup>();
  readonly #standards = new Map<string, StandardDossier>();
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
    await this.#loadAncestors(ids);
    const values = this.#inOrder(ids);
    const sources = new Map<number, StoredSource>();
    const groups = new Map<number, StoredGroup>();
    for (const value of values) {
      for (const { sourceId } of value.sources) sources.set(sourceId, this.#sources.get(sourceId)!);
      if (value.groupId !== null) groups.set(value.groupId, this.#groups.get(value.groupId)!);
    }
    return { values, sources, groups };
  }

  /** What is known of these standards, duplicates' partners included. */
  async standards(ids: Iterable<string>): Promise<Map<string, StandardDossier>> {
    const found = await this.#standardsOf(ids);
    const partners = [...found.values()].flatMap((dossier) => dossier.duplicateIds);
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
    memory: Map<string, Dossier>,
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
    await this.#loadValues(rows.map((row) => row.id));
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

  async #loadAncestors(ids: readonly number[]): Promise<void> {
    if (this.#holdsClosure(ids)) return;
    if (this.#values.size > MAXIMUM_VALUES) this.#forgetValues();
    await this.#loadValues(await ancestorIds(this.#database, ids));
  }

  #forgetValues(): void {
    this.#values.clear();
    this.#sources.clear();
    this.#groups.clear();
    this.#standards.clear();
  }

  #holdsClosure(ids: readonly number[]): boolean {
    const seen = new Set<number>(ids);
    for (const id of seen) {
      const value = this.#values.get(id);
      if (!value) return false;
      for (const { parentId } of value.parents) seen.add(parentId);
    }
    return true;
  }

  async #loadValues(ids: number[]): Promise<void> {
    for (const chunk of chunks(
      ids.filter((id) => !this.#values.has(id)),
      2_000,
    )) {
      const values = await storedValues(this.#database, chunk);
      const sourceIds = new Set(values.flatMap((value) => value.sources.map((link) => link.sourceId)));
      const groupIds = new Set(values.flatMap((value) => (value.groupId === null ? [] : [value.groupId])));
      const [sources, groups] = await Promise.all([
        storedSources(
          this.#database,
          [...sourceIds].filter((id) => !this.#sources.has(id)),
        ),
        storedGroups(
          this.#database,
          [...groupIds].filter((id) => !this.#groups.has(id)),
        ),
      ]);
      for (const source of sources) this.#sources.set(source.id, source);
      for (const group of groups) this.#groups.set(group.id, group);
      for (const value of values) this.#values.set(value.id, value);
    }
  }

  /** Depth first, parents before children. The register admits no circle, so this ends. */
  #inOrder(ids: readonly number[]): StoredValue[] {
    const done = new Set<number>();
    const ordered: StoredValue[] = [];
    const visit = (id: number): void => {
      if (done.has(id)) return;
      done.add(id);
      const value = this.#values.get(id)!;
      for (const { parentId } of value.parents) visit(parentId);
      ordered.push(value);
    };
    for (const id of ids) visit(id);
    return ordered;
  }
}

function chunks<T>(items: T[], size: number): T[][] {
  const parts: T[][] = [];
  for (let start = 0; start < items.length; start += size) parts.push(items.slice(start, start + size));
  return parts;
}
