import { Interned } from './interned.ts';
import { grown } from './grown.ts';

/** A value as it enters the graph. Days are day numbers (`day-number.ts`), masses grams. */
export interface GraphValueRow {
  id: number;
  standardId: string;
  holderId: string;
  issuerId: string;
  nominal: string;
  class: string | null;
  quantity: 'mass' | 'conventional mass';
  decisionRule: 'guarded' | 'simple' | null;
  performedDay: number;
  effectiveDay: number;
  recordedDay: number;
  deviation: number;
  expandedU: number | null;
  u: number | null;
  /** Power of ten of the last digit of U as reported, in grams; null where not known. */
  uPlace: number | null;
}

/** What a value leaned on, as it enters the graph. */
export interface GraphLinkRow {
  childId: number;
  parentId: number;
  sensitivity: number;
  usedBeginDay: number;
  usedEndDay: number;
  /** Whether the child used the nominal with its class limit. */
  isClassLimit: boolean;
  /** Whether the child used the value as corrected by notices. */
  isByNotice?: boolean;
  /** The limit stated on such a link, for a reference without a class; grams. */
  usedExpandedU: number | null;
}

/** The end of a value. */
export interface GraphEndRow {
  valueId: number;
  effectiveDay: number;
  recordedDay: number;
}

/** `uPlace` where the certificate says nothing of its digits. */
export const UNKNOWN_PLACE = 127;

/**
 * The register's graph, or a part of it, on typed arrays: about 60 bytes a value and 30 a link. A node is a value's
 * place in these arrays; links through references only, both ways. Rows are only ever added, as in the register.
 */
export class GraphArrays {
  valueCount = 0;
  linkCount = 0;
  readonly laboratories = new Interned();
  readonly nominals = new Interned();
  readonly classes = new Interned();

  id = new Uint32Array(0);
  /** The first node of the same standard: what several values of one weight have in common. */
  standard = new Int32Array(0);
  holder = new Uint16Array(0);
  issuer = new Uint16Array(0);
  nominal = new Uint16Array(0);
  /** Place in `classes`, plus one; 0 for none. */
  class = new Uint8Array(0);
  isConventional = new Uint8Array(0);
  /** 0 guarded or undeclared, 1 simple. */
  isSimpleRule = new Uint8Array(0);
  uPlace = new Int8Array(0);
  performedDay = new Int32Array(0);
  effectiveDay = new Int32Array(0);
  recordedDay = new Int32Array(0);
  deviation = new Float64Array(0);
  /** NaN where none is stated. */
  expandedU = new Float64Array(0);
  u = new Float64Array(0);

  /** First link of a node to a parent and to a child, -1 for none; the links follow one another in `next...`. */
  firstUp = new Int32Array(0);
  firstDown = new Int32Array(0);
  linkChild = new Int32Array(0);
  linkParent = new Int32Array(0);
  nextUp = new Int32Array(0);
  nextDown = new Int32Array(0);
  sensitivity = new Float64Array(0);
  isClassLimit = new Uint8Array(0);
  isByNotice = new Uint8Array(0);
  usedBeginDay = new Int32Array(0);
  usedEndDay = new Int32Array(0);

  readonly ends = new Map<number, GraphEndRow[]>();
  /** Limits stated on class-limit links, by link, grams. */
  readonly statedLimits = new Map<number, number>();
  /** Node + 1 by id: ids are given out one after the other, so a plain table is dense. */
  #nodeOfId = new Int32Array(0);
  readonly #firstOfStandard = new Map<string, number>();

  /** Makes room for this many in all, so that a load of known size allocates once. */
  reserve(values: number, links: number): void {
    this.#growValues(values);
    this.#growLinks(links);
  }

  /** Node of a value's id; -1 where the graph does not hold it. */
  nodeOf(id: number): number {
    return (this.#nodeOfId[id] ?? 0) - 1;
  }

  /** Adds a value; one that is there already is left as it is. */
  addValue(row: GraphValueRow): void {
    if (this.nodeOf(row.id) >= 0) return;
    const node = this.valueCount;
    if (node === this.id.length) this.#growValues(node + Math.max(1024, node >> 3));
    this.#putId(row.id, node);
    this.id[node] = row.id;
    this.valueCount += 1;
    this.standard[node] = this.#standardNode(row.standardId, node);
    this.holder[node] = this.laboratories.put(row.holderId);
    this.issuer[node] = this.laboratories.put(row.issuerId);
    this.nominal[node] = this.nominals.put(row.nominal);
    this.class[node] = row.class === null ? 0 : this.classes.put(row.class) + 1;
    this.isConventional[node] = row.quantity === 'conventional mass' ? 1 : 0;
    this.isSimpleRule[node] = row.decisionRule === 'simple' ? 1 : 0;
    this.uPlace[node] = row.uPlace ?? UNKNOWN_PLACE;
    this.performedDay[node] = row.performedDay;
    this.effectiveDay[node] = row.effectiveDay;
    this.recordedDay[node] = row.recordedDay;
    this.deviation[node] = row.deviation;
    this.expandedU[node] = row.expandedU ?? NaN;
    this.u[node] = row.u ?? NaN;
    this.firstUp[node] = -1;
    this.firstDown[node] = -1;
  }

  /** Adds a link between two values that are here; others are left out. */
  addLink(row: GraphLinkRow): void {
    const child = this.nodeOf(row.childId);
    const parent = this.nodeOf(row.parentId);
    if (child < 0 || parent < 0) return;
    const link = this.linkCount;
    if (link === this.linkChild.length) this.#growLinks(link + Math.max(1024, link >> 3));
    this.linkCount += 1;
    this.linkChild[link] = child;
    this.linkParent[link] = parent;
    this.nextUp[link] = this.firstUp[child]!;
    this.firstUp[child] = link;
    this.nextDown[link] = this.firstDown[parent]!;
    this.firstDown[parent] = link;
    this.sensitivity[link] = row.sensitivity;
    this.usedBeginDay[link] = row.usedBeginDay;
    this.usedEndDay[link] = row.usedEndDay;
    this.isClassLimit[link] = row.isClassLimit ? 1 : 0;
    this.isByNotice[link] = row.isByNotice ? 1 : 0;
    if (row.isClassLimit && row.usedExpandedU !== null) this.statedLimits.set(link, row.usedExpandedU);
  }

  /** Adds the end of a value that is here. */
  addEnd(row: GraphEndRow): void {
    const node = this.nodeOf(row.valueId);
    if (node < 0) return;
    const known = this.ends.get(node);
    if (known) known.push(row);
    else this.ends.set(node, [row]);
  }

  /** Forgets which standard a value belongs to by name; `addValue` must then be told by `knowStandard`. */
  forgetStandardNames(): void {
    this.#firstOfStandard.clear();
  }

  /** Names the standard of a value that is here, before further values of it are added. */
  knowStandard(standardId: string, valueId: number): void {
    const node = this.nodeOf(valueId);
    if (node >= 0) this.#firstOfStandard.set(standardId, this.standard[node]!);
  }

  /** Bytes held by the typed arrays. */
  get byteLength(): number {
    const columns = Object.values(this).filter((column) => ArrayBuffer.isView(column));
    return columns.reduce((sum, column) => sum + column.byteLength, this.#nodeOfId.byteLength);
  }

  #standardNode(standardId: string, node: number): number {
    const first = this.#firstOfStandard.get(standardId);
    if (first !== undefined) return first;
    this.#firstOfStandard.set(standardId, node);
    return node;
  }

  #putId(id: number, node: number): void {
    if (id >= this.#nodeOfId.length) this.#nodeOfId = grown(this.#nodeOfId, id + 1 + Math.max(1024, id >> 3));
    this.#nodeOfId[id] = node + 1;
  }

  #growValues(length: number): void {
    this.id = grown(this.id, length);
    this.standard = grown(this.standard, length);
    this.holder = grown(this.holder, length);
    this.issuer = grown(this.issuer, length);
    this.nominal = grown(this.nominal, length);
    this.class = grown(this.class, length);
    this.isConventional = grown(this.isConventional, length);
    this.isSimpleRule = grown(this.isSimpleRule, length);
    this.uPlace = grown(this.uPlace, length);
    this.performedDay = grown(this.performedDay, length);
    this.effectiveDay = grown(this.effectiveDay, length);
    this.recordedDay = grown(this.recordedDay, length);
    this.deviation = grown(this.deviation, length);
    this.expandedU = grown(this.expandedU, length);
    this.u = grown(this.u, length);
    this.firstUp = grown(this.firstUp, length);
    this.firstDown = grown(this.firstDown, length);
  }

  #growLinks(length: number): void {
    this.linkChild = grown(this.linkChild, length);
    this.linkParent = grown(this.linkParent, length);
    this.nextUp = grown(this.nextUp, length);
    this.nextDown = grown(this.nextDown, length);
    this.sensitivity = grown(this.sensitivity, length);
    this.isClassLimit = grown(this.isClassLimit, length);
    this.isByNotice = grown(this.isByNotice, length);
    this.usedBeginDay = grown(this.usedBeginDay, length);
    this.usedEndDay = grown(this.usedEndDay, length);
  }
}
