import { EngineError } from '../errors.ts';
import { isPositiveSemidefinite } from '../linear/matrix.ts';
import { requireDegreesOfFreedom } from './check-network.ts';

type Group = { members: Int32Array; covariance: number[][]; degreesOfFreedom?: number };

/**
 * Refuses groups of local parts whose covariance no set of results can have, or that share a member.
 * @throws EngineError `unknown-node`, `member-twice`, `size-mismatch`, `not-a-covariance`, `out-of-range`, and
 * those of `isPositiveSemidefinite` for a matrix that is ragged or not finite
 */
export function checkGroups(
  groups: readonly Group[],
  valueCount: number,
  idOf: (node: number) => string,
): void {
  const grouped = new Set<number>();
  groups.forEach((group, index) => {
    group.members.forEach((node, at) => {
      const field = `groups[${index}].members[${at}]`;
      if (node < 0 || node >= valueCount) {
        throw new EngineError(
          'unknown-node',
          field,
          `Member ${node} is not a value; values are 0 to ${valueCount - 1}.`,
        );
      }
      if (grouped.has(node)) {
        throw new EngineError(
          'member-twice',
          field,
          `"${idOf(node)}" is in a group already; a value has one local part.`,
        );
      }
      grouped.add(node);
    });
    requireDegreesOfFreedom(group.degreesOfFreedom ?? Infinity, `groups[${index}].degreesOfFreedom`);
    checkCovariance(group, `groups[${index}].covariance`, idOf);
  });
}

function checkCovariance(group: Group, field: string, idOf: (node: number) => string): void {
  if (group.covariance.length !== group.members.length) {
    throw new EngineError(
      'size-mismatch',
      field,
      `The covariance has ${group.covariance.length} rows for ${group.members.length} members.`,
    );
  }
  const { ok, offending } = isPositiveSemidefinite(group.covariance);
  if (ok) return;
  const [i, j] = offending!;
  const pair = `"${idOf(group.members[i]!)}" and "${idOf(group.members[j]!)}"`;
  throw new EngineError(
    'not-a-covariance',
    `${field}[${i}][${j}]`,
    `No set of results can have this covariance: see ${pair}, entry ${group.covariance[i]![j]!}.`,
  );
}
