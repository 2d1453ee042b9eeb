import { EngineError } from '../errors.ts';
import { checkGroups } from './check-groups.ts';
import { requireDegreesOfFreedom, requireNumber, requireSize } from '../quantity/domain.ts';
import type { CompiledGroup, CompiledNetwork } from './compiled-network.ts';
import { topologicalOrder } from './topological-order.ts';

/** A network of many values on typed arrays. Parents from `local.length` on are sources. */
export type NetworkArrays = {
  /** Standard uncertainty of each value's local part; negative = not known. */
  local: Float64Array;
  child: Int32Array;
  parent: Int32Array;
  sensitivity: Float64Array;
  /** Standard uncertainty of the class limit used instead of the parent's value; negative = none. */
  classLimit?: Float64Array;
  sourceUncertainty?: Float64Array;
  groups?: { members: Int32Array; covariance: number[][]; degreesOfFreedom?: number; estimate?: string }[];
  /** By node, values first; left out = infinite. */
  degreesOfFreedom?: Float64Array;
  /** Names by node, values first; left out = the index as text. */
  ids?: readonly string[];
  estimates?: readonly (string | undefined)[];
};

/**
 * Compiles arrays of values and links. Duplicate links add: plain ones by sensitivity; those through a class limit
 * as one and the same unknown deviation from nominal.
 * @throws EngineError `circle`, `size-mismatch`, `unknown-node`, `not-finite`, `out-of-range`, and those of `checkGroups`
 */
export function networkFromArrays(arrays: NetworkArrays): CompiledNetwork {
  const valueCount = arrays.local.length;
  const nodeCount = valueCount + (arrays.sourceUncertainty?.length ?? 0);
  checkArrays(arrays, nodeCount);
  const names = naming(arrays.ids, nodeCount);
  checkGroups(arrays.groups ?? [], valueCount, names.idOf);
  const links = mergedLinks(arrays, nodeCount);
  const order = topologicalOrder(links.linkStart, links.linkParent, names.idOf);
  const position = new Int32Array(nodeCount);
  order.forEach((node, place) => (position[node] = place));
  return {
    valueCount,
    nodeCount,
    ...names,
    ...ownParts(arrays, nodeCount),
    ...groupParts(arrays, nodeCount),
    degreesOfFreedom: arrays.degreesOfFreedom ?? new Float64Array(nodeCount).fill(Infinity),
    estimateOf: (node) => arrays.estimates?.[node],
    ...links,
    order,
    position,
  };
}

function checkArrays(arrays: NetworkArrays, nodeCount: number): void {
  const { child, parent, sensitivity, classLimit, degreesOfFreedom, ids } = arrays;
  requireSize(parent.length, child.length, 'parent', 'links');
  requireSize(sensitivity.length, child.length, 'sensitivity', 'links');
  requireSize(classLimit?.length ?? child.length, child.length, 'classLimit', 'links');
  requireSize(degreesOfFreedom?.length ?? nodeCount, nodeCount, 'degreesOfFreedom', 'nodes');
  requireSize(ids?.length ?? nodeCount, nodeCount, 'ids', 'nodes');
  for (let at = 0; at < child.length; at += 1) {
    requireNode('child', child[at]!, arrays.local.length, at);
    requireNode('parent', parent[at]!, nodeCount, at);
    requireFinite('sensitivity', sensitivity[at]!, at);
    if (classLimit) requireFinite('classLimit', classLimit[at]!, at);
  }
  arrays.local.forEach((value, at) => requireFinite('local', value, at));
  arrays.sourceUncertainty?.forEach((value, at) => {
    if (!(value >= 0 && value < Infinity)) requireNumber(value, `sourceUncertainty[${at}]`, { min: 0 });
  });
  degreesOfFreedom?.forEach((value, at) => {
    if (!(value > 0)) requireDegreesOfFreedom(value, `degreesOfFreedom[${at}]`);
  });
}

function requireNode(field: string, node: number, count: number, at: number): void {
  if (node >= 0 && node < count) return;
  throw new EngineError(
    'unknown-node',
    `${field}[${at}]`,
    `node ${node}`,
    `The nodes allowed there are 0 to ${count - 1}.`,
  );
}

/** Names the field only where something is wrong: a million names would cost more than the checks. */
function requireFinite(field: string, value: number, at: number): void {
  if (!Number.isFinite(value)) requireNumber(value, `${field}[${at}]`);
}

function naming(
  ids: readonly string[] | undefined,
  nodeCount: number,
): Pick<CompiledNetwork, 'idOf' | 'nodeOf'> {
  if (!ids) {
    const isNode = (node: number, id: string) => node >= 0 && node < nodeCount && String(node) === id;
    return {
      idOf: (node) => String(node),
      nodeOf: (id) => (isNode(Number(id), id) ? Number(id) : undefined),
    };
  }
  const nodes = new Map(ids.map((id, node) => [id, node]));
  return { idOf: (node) => ids[node]!, nodeOf: (id) => nodes.get(id) };
}

function ownParts(
  arrays: NetworkArrays,
  nodeCount: number,
): Pick<CompiledNetwork, 'ownVariance' | 'unknown'> {
  const ownVariance = new Float64Array(nodeCount);
  const unknown = new Uint8Array(nodeCount);
  arrays.local.forEach((u, node) => {
    if (u < 0) unknown[node] = 1;
    else ownVariance[node] = u * u;
  });
  arrays.sourceUncertainty?.forEach((u, at) => (ownVariance[arrays.local.length + at] = u * u));
  // The group's covariance replaces a member's own part, so that even an unknown one is known there.
  for (const node of (arrays.groups ?? []).flatMap((group) => [...group.members])) {
    ownVariance[node] = 0;
    unknown[node] = 0;
  }
  return { ownVariance, unknown };
}

function groupParts(
  arrays: NetworkArrays,
  nodeCount: number,
): Pick<CompiledNetwork, 'groups' | 'groupOf' | 'placeInGroup'> {
  const groupOf = new Int32Array(nodeCount).fill(-1);
  const placeInGroup = new Int32Array(nodeCount);
  const groups = (arrays.groups ?? []).map((group, index): CompiledGroup => {
    group.members.forEach((node, place) => {
      groupOf[node] = index;
      placeInGroup[node] = place;
    });
    return { ...group, degreesOfFreedom: group.degreesOfFreedom ?? Infinity, estimate: group.estimate };
  });
  return { groups, groupOf, placeInGroup };
}

/** Sorts links by child and adds those between the same pair. */
function mergedLinks(
  arrays: NetworkArrays,
  nodeCount: number,
): Pick<CompiledNetwork, 'linkStart' | 'linkParent' | 'linkSensitivity' | 'linkSpread'> {
  const byChild = linksByChild(arrays.child, nodeCount);
  const linkStart = new Int32Array(nodeCount + 1);
  const linkParent = new Int32Array(arrays.child.length);
  const linkSensitivity = new Float64Array(arrays.child.length);
  const linkSpread = new Float64Array(arrays.child.length);
  const lastLinkTo = new Int32Array(nodeCount).fill(-1);
  let filled = 0;
  for (let child = 0; child < nodeCount; child += 1) {
    linkStart[child] = filled;
    for (let at = byChild.start[child]!; at < byChild.start[child + 1]!; at += 1) {
      const given = byChild.link[at]!;
      const parent = arrays.parent[given]!;
      if (lastLinkTo[parent]! < linkStart[child]!) {
        lastLinkTo[parent] = filled;
        linkParent[filled++] = parent;
      }
      const limit = arrays.classLimit?.[given] ?? -1;
      const link = lastLinkTo[parent]!;
      if (limit < 0) linkSensitivity[link]! += arrays.sensitivity[given]!;
      else linkSpread[link]! += arrays.sensitivity[given]! * limit;
    }
  }
  linkStart[nodeCount] = filled;
  const used = <T extends Int32Array | Float64Array>(column: T) => column.subarray(0, filled) as T;
  return {
    linkStart,
    linkParent: used(linkParent),
    linkSensitivity: used(linkSensitivity),
    linkSpread: used(linkSpread),
  };
}

function linksByChild(child: Int32Array, nodeCount: number): { start: Int32Array; link: Int32Array } {
  const start = new Int32Array(nodeCount + 1);
  for (const node of child) start[node + 1]! += 1;
  for (let node = 0; node < nodeCount; node += 1) start[node + 1]! += start[node]!;
  const next = start.slice(0, nodeCount);
  const link = new Int32Array(child.length);
  child.forEach((node, at) => {
    link[next[node]!] = at;
    next[node]! += 1;
  });
  return { start, link };
}
