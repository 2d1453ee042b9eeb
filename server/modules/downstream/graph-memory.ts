import type { Sequelize } from 'sequelize';
import { AppError } from '#server/http/app-error.ts';
import { GraphArrays } from './graph-arrays.ts';
import {
  anyValueOf,
  endsSince,
  isPartSmall,
  linkPage,
  newestAct,
  partBelow,
  recordedSince,
  registerSize,
  valuePage,
} from './graph.queries.ts';

/** Rows read at a time: a page is thousands of rows, never the register. */
const PAGE = 4_000;
/** Values that a question may take from the database while the memory is being loaded: more would fill the memory twice. */
const MOST_BY_QUERY = 20_000;

/** Values and links read so far, and how many there are. */
export interface LoadProgress {
  done: number;
  total: number;
}

/**
 * The whole register's graph in memory, loaded page by page in the background when the first question comes, and
 * caught up with the newest act before each further one. Until it is there, questions are answered by the database.
 */
export class GraphMemory {
  readonly #database: Sequelize;
  #graph: GraphArrays | null = null;
  #seq = 0;
  #loading: Promise<void> | null = null;
  #catchingUp: Promise<void> | null = null;
  #progress: LoadProgress = { done: 0, total: 0 };

  constructor(database: Sequelize) {
    this.#database = database;
  }

  /** How far the loading is. */
  get progress(): LoadProgress {
    return this.#progress;
  }

  /** The graph of everything recorded by now, where it is loaded; otherwise null, and loading begins. */
  async current(): Promise<GraphArrays | null> {
    if (!this.#graph) {
      // A failed load leaves the database to answer, which says itself what is wrong; the next question tries again.
      void this.load().catch(() => undefined);
      return null;
    }
    await this.#catchUp();
    return this.#graph;
  }

  /** Loads the register; those who call meanwhile wait for the same load. */
  load(): Promise<void> {
    this.#loading ??= this.#read().finally(() => {
      this.#loading = null;
    });
    return this.#loading;
  }

  async #read(): Promise<void> {
    if (this.#graph) return;
    const { seq, values, links, lastId } = await registerSize(this.#database);
    const graph = new GraphArrays();
    graph.reserve(values, links);
    const note = () => (this.#progress = { done: graph.valueCount + graph.linkCount, total: values + links });
    for (let after = 0; after >= 0;) {
      const page = await valuePage(this.#database, seq, after, PAGE);
      for (const row of page) graph.addValue(row);
      note();
      after = page.length < PAGE ? -1 : page.at(-1)!.id;
    }
    for (let from = 1; from <= lastId; from += PAGE) {
      for (const row of await linkPage(this.#database, from, from + PAGE - 1)) graph.addLink(row);
      note();
    }
    for (const row of await endsSince(this.#database, 0, seq)) graph.addEnd(row);
    graph.forgetStandardNames();
    this.#seq = seq;
    this.#graph = graph;
  }

  /** Callers that arrive together share one look. */
  #catchUp(): Promise<void> {
    this.#catchingUp ??= this.#lookForActs().finally(() => {
      this.#catchingUp = null;
    });
    return this.#catchingUp;
  }

  async #lookForActs(): Promise<void> {
    const graph = this.#graph!;
    const seq = await newestAct(this.#database);
    if (seq === this.#seq) return;
    const { values, links, ends } = await recordedSince(this.#database, this.#seq, seq);
    const standardIds = [...new Set(values.map((row) => row.standardId))];
    const known = await anyValueOf(this.#database, standardIds, this.#seq);
    for (const { standardId, valueId } of known) graph.knowStandard(standardId, valueId);
    for (const row of values) graph.addValue(row);
    for (const row of links) graph.addLink(row);
    for (const row of ends) graph.addEnd(row);
    graph.forgetStandardNames();
    this.#seq = seq;
  }
}

const memories = new WeakMap<Sequelize, GraphMemory>();

/** The one memory per database pool. */
export function memoryOf(database: Sequelize): GraphMemory {
  const known = memories.get(database);
  if (known) return known;
  const memory = new GraphMemory(database);
  memories.set(database, memory);
  return memory;
}

/**
 * A graph that holds these values and everything below them: the memory, or meanwhile what the database gives.
 * @throws AppError `unavailable`, with how far the loading is, for what only the memory can answer
 */
export async function graphBelow(database: Sequelize, ids: readonly number[]): Promise<GraphArrays> {
  const memory = memoryOf(database);
  const graph = await memory.current();
  if (graph) return graph;
  if (await isPartSmall(database, ids, MOST_BY_QUERY)) return graphFromDatabase(database, ids);
  throw new AppError(
    'unavailable',
    'The register is being read after a start. What so many values lean on can be told when it is: in a moment.',
    { members: { progress: memory.progress }, isReportable: false },
  );
}

/** These values and everything below them, by a recursive query. */
export async function graphFromDatabase(database: Sequelize, ids: readonly number[]): Promise<GraphArrays> {
  const { values, links, ends } = await partBelow(database, ids);
  const graph = new GraphArrays();
  graph.reserve(values.length, links.length);
  for (const row of values) graph.addValue(row);
  for (const row of links) graph.addLink(row);
  for (const row of ends) graph.addEnd(row);
  return graph;
}
