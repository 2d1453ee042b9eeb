import type { Network } from '../network.ts';

/**
 * The covariance of all values and sources by the definition, V = J S J', with the whole matrix of sensitivities
 * to every origin: slow, direct, and written without anything the engine uses.
 */
export function fullMatrix(network: Network): { ids: string[]; matrix: number[][] } {
  const ids = [...network.values, ...(network.sources ?? [])].map((node) => node.id);
  const limits = limitsOf(network);
  const origins = [...ids, ...limits.keys()];
  const sigma = originCovariance(network, ids, limits, origins.length);
  const rows = new Map<string, number[]>();
  const rowOf = (id: string): number[] => {
    const known = rows.get(id);
    if (known) return known;
    const row = origins.map((origin) => Number(origin === id));
    for (const link of network.links.filter((each) => each.child === id)) {
      if (link.classLimit) row[origins.indexOf(limitKey(link))]! += link.sensitivity;
      else rowOf(link.parent).forEach((value, at) => (row[at]! += link.sensitivity * value));
    }
    rows.set(id, row);
    return row;
  };
  const half = ids.map((id) => sigma.map((column) => dot(rowOf(id), column)));
  return { ids, matrix: half.map((row) => ids.map((id) => dot(row, rowOf(id)))) };
}

function dot(a: number[], b: number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0);
}

function limitKey(link: Network['links'][number]): string {
  return `limit of ${link.parent} at ${link.child}`;
}

/** One deviation per child and parent; its uncertainty, with the sensitivities kept apart. */
function limitsOf(network: Network): Map<string, number> {
  const limits = new Map<string, number>();
  for (const link of network.links) {
    if (!link.classLimit) continue;
    const key = limitKey(link);
    limits.set(key, limits.get(key) ?? link.classLimit.standardUncertainty);
  }
  return limits;
}

function originCovariance(
  network: Network,
  ids: string[],
  limits: Map<string, number>,
  size: number,
): number[][] {
  const sigma = Array.from({ length: size }, () => Array.from({ length: size }, () => 0));
  network.values.forEach(
    (value) => (sigma[ids.indexOf(value.id)]![ids.indexOf(value.id)] = (value.local ?? 0) ** 2),
  );
  network.sources?.forEach(({ id, standardUncertainty }) => {
    sigma[ids.indexOf(id)]![ids.indexOf(id)] = standardUncertainty ** 2;
  });
  [...limits.values()].forEach((u, at) => (sigma[ids.length + at]![ids.length + at] = u ** 2));
  network.groups?.forEach(({ members, covariance }) => {
    members.forEach((a, i) =>
      members.forEach((b, j) => (sigma[ids.indexOf(a)]![ids.indexOf(b)] = covariance[i]![j]!)),
    );
  });
  return sigma;
}
