import { QueryTypes, type Sequelize } from 'sequelize';

/*
 * An independent check of propagation: reads the register's rows and draws, importing nothing of the product's
 * arithmetic. Class limits are not needed for the chains it is asked about and are refused.
 */

interface Node {
  id: number;
  localU: number;
  parents: { id: number; sensitivity: number }[];
  sources: { id: number; sensitivity: number }[];
}

/** Everything above a value, each after what it leans on. */
interface Ancestry {
  nodes: Node[];
  sourceU: Map<number, number>;
  /** Groups with two or more members among the nodes: ids and covariance. */
  groups: { members: number[]; covariance: number[][] }[];
}

const DRAWS = 1_000_000;
const BLOCK = 10_000;

/** Standard uncertainty of a value by drawing every effect a million times, g. */
export function simulatedU(ancestry: Ancestry, focusId: number, seed: number): number {
  const normal = normals(seed);
  const factors = ancestry.groups.map(({ covariance }) => lowerFactor(covariance));
  let [sum, squares] = [0, 0];
  for (let block = 0; block < DRAWS / BLOCK; block += 1) {
    const focus = drawBlock(ancestry, factors, normal).get(focusId)!;
    for (const error of focus) {
      sum += error;
      squares += error * error;
    }
  }
  return Math.sqrt(squares / DRAWS - (sum / DRAWS) ** 2);
}

/** The same if everything a value leans on were independent, g: what a cautious reader must not do. */
export function uWithoutCorrelation(ancestry: Ancestry, focusId: number): number {
  const variance = new Map<number, number>();
  for (const { id, localU, parents, sources } of ancestry.nodes) {
    const leaned = parents.reduce((sum, p) => sum + p.sensitivity ** 2 * variance.get(p.id)!, localU ** 2);
    const shared = sources.reduce((sum, s) => sum + (s.sensitivity * ancestry.sourceU.get(s.id)!) ** 2, 0);
    variance.set(id, leaned + shared);
  }
  return Math.sqrt(variance.get(focusId)!);
}

function drawBlock(
  { nodes, sourceU, groups }: Ancestry,
  factors: number[][][],
  normal: () => number,
): Map<number, Float64Array> {
  const draw = (u: number) => Float64Array.from({ length: BLOCK }, () => u * normal());
  const sources = new Map([...sourceU].map(([id, u]) => [id, draw(u)]));
  const grouped = new Map<number, Float64Array>();
  for (const [at, { members }] of groups.entries()) {
    const independent = members.map(() => draw(1));
    for (const [row, id] of members.entries()) {
      const errors = new Float64Array(BLOCK);
      for (const [column, factor] of factors[at]![row]!.entries()) add(errors, factor, independent[column]!);
      grouped.set(id, errors);
    }
  }
  const values = new Map<number, Float64Array>();
  for (const node of nodes) {
    const errors = grouped.get(node.id) ?? draw(node.localU);
    for (const { id, sensitivity } of node.parents) add(errors, sensitivity, values.get(id)!);
    for (const { id, sensitivity } of node.sources) add(errors, sensitivity, sources.get(id)!);
    values.set(node.id, errors);
  }
  return values;
}

function add(to: Float64Array, factor: number, what: Float64Array): void {
  for (let i = 0; i < to.length; i += 1) to[i]! += factor * what[i]!;
}

/** L with L L' = matrix, for a matrix that may be singular: a pivot lost in rounding is taken as zero. */
function lowerFactor(matrix: number[][]): number[][] {
  const lower = matrix.map((row) => row.map(() => 0));
  for (let i = 0; i < matrix.length; i += 1) {
    for (let j = 0; j <= i; j += 1) {
      let rest = matrix[i]![j]!;
      for (let k = 0; k < j; k += 1) rest -= lower[i]![k]! * lower[j]![k]!;
      if (i === j) lower[i]![i] = rest > 1e-12 * matrix[i]![i]! ? Math.sqrt(rest) : 0;
      else lower[i]![j] = lower[j]![j] === 0 ? 0 : rest / lower[j]![j]!;
    }
  }
  return lower;
}

/** Normal numbers by the polar method over a small multiply-and-shift generator. */
function normals(seed: number): () => number {
  let state = seed >>> 0;
  const uniform = () => {
    state = (state + 0x9e3779b9) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 0x85ebca6b);
    mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
    return ((mixed ^ (mixed >>> 16)) >>> 0) / 2 ** 32;
  };
  let spare: number | null = null;
  return () => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    for (;;) {
      const [x, y] = [2 * uniform() - 1, 2 * uniform() - 1];
      const square = x * x + y * y;
      if (square === 0 || square >= 1) continue;
      const scale = Math.sqrt((-2 * Math.log(square)) / square);
      spare = y * scale;
      return x * scale;
    }
  };
}

/** Reads everything above a value by plain SQL. @throws Error for a class limit or an unknown own part */
export async function ancestryOf(database: Sequelize, focusId: number): Promise<Ancestry> {
  const select = <Row extends object>(sql: string, ids: number[]) =>
    database.query<Row>(sql, { type: QueryTypes.SELECT, replacements: { ids: ids.length ? ids : [0] } });
  type Link = { child: number; parent: number; sensitivity: number; usedAs: string };
  const links: Link[] = [];
  const found = new Set([focusId]);
  for (let fresh = [focusId]; fresh.length > 0;) {
    const above = await select<Link>(
      `SELECT child_id child, parent_id parent, sensitivity, used_as usedAs FROM value_link
       WHERE role = 'reference' AND child_id IN (:ids)`,
      fresh,
    );
    if (above.some((link) => link.usedAs === 'class limit')) throw new Error('A class limit in this chain');
    links.push(...above);
    fresh = [...new Set(above.map((link) => link.parent))].filter((id) => !found.has(id));
    for (const id of fresh) found.add(id);
  }
  const ids = [...found];
  const locals = await select<{ id: number; u: number | null }>(
    'SELECT id, local_u u FROM assigned_value WHERE id IN (:ids)',
    ids,
  );
  if (locals.some((row) => row.u === null)) throw new Error('An unknown own part in this chain');
  const uses = await select<{ child: number; source: number; sensitivity: number }>(
    'SELECT child_id child, source_id source, sensitivity FROM source_link WHERE child_id IN (:ids)',
    ids,
  );
  const sources = await select<{ id: number; u: number }>(
    'SELECT id, u FROM source WHERE id IN (:ids)',
    uses.map((use) => use.source),
  );
  const nodes = new Map(
    locals.map(({ id, u }): [number, Node] => [
      id,
      {
        id,
        localU: u!,
        parents: links
          .filter((l) => l.child === id)
          .map((l) => ({ id: l.parent, sensitivity: l.sensitivity })),
        sources: uses
          .filter((s) => s.child === id)
          .map((s) => ({ id: s.source, sensitivity: s.sensitivity })),
      },
    ]),
  );
  return {
    nodes: inOrder(nodes, focusId),
    sourceU: new Map(sources.map(({ id, u }) => [id, u])),
    groups: await groupsAmong(select, ids),
  };
}

function inOrder(nodes: ReadonlyMap<number, Node>, focusId: number): Node[] {
  const done = new Set<number>();
  const ordered: Node[] = [];
  const visit = (id: number): void => {
    if (done.has(id)) return;
    done.add(id);
    const node = nodes.get(id)!;
    for (const parent of node.parents) visit(parent.id);
    ordered.push(node);
  };
  visit(focusId);
  return ordered;
}

async function groupsAmong(
  select: <Row extends object>(sql: string, ids: number[]) => Promise<Row[]>,
  ids: number[],
): Promise<Ancestry['groups']> {
  const cells = await select<{ id: number; row: number; column: number; covariance: number }>(
    `SELECT group_id id, row_id \`row\`, column_id \`column\`, covariance FROM group_covariance
     WHERE row_id IN (:ids) AND column_id IN (:ids)`,
    ids,
  );
  return [...new Set(cells.map((cell) => cell.id))].map((group) => {
    const own = cells.filter((cell) => cell.id === group);
    const members = [...new Set(own.map((cell) => cell.row))];
    const covariance = members.map((a) =>
      members.map(
        (b) =>
          own.find((cell) => (cell.row === a && cell.column === b) || (cell.row === b && cell.column === a))!
            .covariance,
      ),
    );
    return { members, covariance };
  });
}
