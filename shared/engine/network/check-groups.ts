import { EngineError } from '../errors.ts';
import { requirePositiveSemidefinite } from '../linear/matrix.ts';
import { requireDegreesOfFreedom, requireSize } from '../quantity/domain.ts';

type Group = { members: Int32Array; covariance: number[][]; degreesOfFreedom?: number };

/**
 * Refuses groups of local parts whose covariance no set of results can have, or that share a member.
 * @throws EngineError `unknown-node`, `member-twice`, `size-mismatch`, `out-of-range`, `not-finite`, and
 * those of `requirePositiveSemidefinite`
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
          `node ${node}`,
          `Members are values; those are 0 to ${valueCount - 1}.`,
        );
      }
      if (grouped.has(node)) {
        throw new EngineError(
          'member-twice',
          field,
          `"${idOf(node)}"`,
          'It is in a group already; a value has one local part.',
        );
      }
      grouped.add(node);
    });
    requireDegreesOfFreedom(group.degreesOfFreedom ?? Infinity, `groups[${index}].degreesOfFreedom`);
    const field = `groups[${index}].covariance`;
    requireSize(group.covariance.length, group.members.length, field, 'members');
    requirePositiveSemidefinite(group.covariance, field, (i) => `"${idOf(group.members[i]!)}"`);
  });
}
