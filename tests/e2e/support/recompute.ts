import type { Register } from './register.ts';

/*
 * The uncertainty of values worked out from the rows of the register alone: every independent input (the own part of
 * a value, a group's own parts, a shared source, a class limit), the whole Jacobian by substitution in the order of
 * the values, and the covariance matrix J S J^T. It shares no code with the product.
 */

export interface Recomputed {
  /** Covariance of two values, g2. */
  covariance(a: string, b: string): number;
  /** Variance that a value's own part brings to another, g2; a member of a group has no part by itself. */
  fromOwnPart(value: string, to: string): number;
  /** Variance that flows through a value to another: its sensitivity times their covariance, g2. */
  through(value: string, to: string): number;
  /** Own part from the budget lines of an itemised value, g: root sum of squares of u times sensitivity. */
  itemised: Map<string, number>;
  /** Root values, by uid. */
  roots: string[];
}

interface ValueRow {
  id: number;
  uid: string;
  local: number | null;
  localOrigin: string;
  rootKind: string | null;
}

/** Reads the values and all they lean on, and works their covariances out. */
export async function recompute(register: Register, uids: string[]): Promise<Recomputed> {
  const values = await closure(register, uids);
  const ids = values.map((value) => value.id);
  const at = new Map(ids.map((id, index) => [id, index]));
  const links = await register.rows<{
    child: number;
    parent: number;
    c: number;
    usedAs: string;
    limit: string | null;
    k: string | null;
  }>(
    `SELECT child_id AS child, parent_id AS parent, sensitivity AS c, used_as AS usedAs,
            used_expanded_u AS \`limit\`, used_k AS k
     FROM value_link WHERE child_id IN (:ids) AND role = 'reference'`,
    { ids },
  );
  const sources = await register.rows<{ child: number; source: number; c: number; u: number }>(
    `SELECT l.child_id AS child, l.source_id AS source, l.sensitivity AS c, o.u
     FROM source_link l JOIN source o ON o.id = l.source_id WHERE l.child_id IN (:ids)`,
    { ids },
  );
  const groups = await register.rows<{ a: number; b: number; k: number }>(
    'SELECT row_id AS a, column_id AS b, covariance AS k FROM group_covariance WHERE row_id IN (:ids) AND column_id IN (:ids)',
    { ids },
  );
  const itemised = await itemisedParts(register, values);

  // Columns of the Jacobian: an own part for each value, then the sources, then the uses by class limit.
  const sourceIds = [...new Set(sources.map((link) => link.source))];
  const limits = links.filter((link) => link.usedAs === 'class limit');
  const width = values.length + sourceIds.length + limits.length;
  const spread = matrix(width, width);
  const grouped = new Set(groups.map((cell) => cell.a));
  values.forEach((value, index) => {
    if (grouped.has(value.id)) return;
    const own = itemised.get(value.uid) ?? value.local;
    if (own === null) throw new Error(`${value.uid} states no uncertainty`);
    spread[index]![index] = own ** 2;
  });
  for (const { a, b, k } of groups) {
    spread[at.get(a)!]![at.get(b)!] = k;
    spread[at.get(b)!]![at.get(a)!] = k;
  }
  for (const link of sources) {
    const column = values.length + sourceIds.indexOf(link.source);
    spread[column]![column] = link.u ** 2;
  }
  limits.forEach((link, index) => {
    const column = values.length + sourceIds.length + index;
    spread[column]![column] = (Number(link.limit) / Number(link.k)) ** 2;
  });

  const jacobian = matrix(values.length, width);
  values.forEach((value, index) => {
    const row = jacobian[index]!;
    row[index] = 1;
    for (const link of sources)
      if (link.child === value.id) row[values.length + sourceIds.indexOf(link.source)]! += link.c;
    for (const link of links) {
      if (link.child !== value.id) continue;
      if (link.usedAs === 'class limit')
        row[values.length + sourceIds.length + limits.indexOf(link)]! += link.c;
      else jacobian[at.get(link.parent)!]!.forEach((entry, column) => (row[column]! += link.c * entry));
    }
  });

  const rowOf = (uid: string) => jacobian[values.findIndex((value) => value.uid === uid)]!;
  return {
    covariance: (a, b) => bilinear(rowOf(a), spread, rowOf(b)),
    fromOwnPart: (value, to) => {
      const column = values.findIndex((one) => one.uid === value);
      return rowOf(to)[column]! ** 2 * spread[column]![column]!;
    },
    through: (value, to) => {
      const column = values.findIndex((one) => one.uid === value);
      return rowOf(to)[column]! * bilinear(rowOf(to), spread, rowOf(value));
    },
    itemised,
    roots: values.filter((value) => value.rootKind !== null).map((value) => value.uid),
  };
}

/** The values and every ancestor, references before what leans on them: their ids grow with time. */
async function closure(register: Register, uids: string[]): Promise<ValueRow[]> {
  const found = new Map<number, ValueRow>();
  const columns = `id, uid, local_u AS local, local_origin AS localOrigin, root_kind AS rootKind`;
  let next = await register.rows<ValueRow>(`SELECT ${columns} FROM assigned_value WHERE uid IN (:uids)`, {
    uids,
  });
  while (next.length > 0) {
    for (const value of next) found.set(value.id, value);
    const above = await register.rows<ValueRow>(
      `SELECT ${columns} FROM assigned_value
       WHERE id IN (SELECT parent_id FROM value_link WHERE child_id IN (:ids) AND role = 'reference')`,
      { ids: next.map((value) => value.id) },
    );
    next = above.filter((value) => !found.has(value.id));
  }
  return [...found.values()].sort((a, b) => a.id - b.id);
}

async function itemisedParts(register: Register, values: ValueRow[]): Promise<Map<string, number>> {
  const itemised = values.filter((value) => value.localOrigin === 'components');
  const parts = new Map<string, number>();
  for (const { id, uid } of itemised) {
    const components = await register.rows<{ u: number; c: number }>(
      'SELECT u, sensitivity AS c FROM component WHERE value_id = :id',
      { id },
    );
    parts.set(uid, Math.sqrt(components.reduce((sum, { u, c }) => sum + (u * c) ** 2, 0)));
  }
  return parts;
}

function matrix(rows: number, columns: number): number[][] {
  return Array.from({ length: rows }, () => new Array<number>(columns).fill(0));
}

function bilinear(left: number[], middle: number[][], right: number[]): number {
  let sum = 0;
  left.forEach((a, row) => {
    if (a === 0) return;
    middle[row]!.forEach((cell, column) => (sum += a * cell * right[column]!));
  });
  return sum;
}
