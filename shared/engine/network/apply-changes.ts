import { changedNetwork, entryPoints, leansOn, type Successor, successorsOf } from './changed-network.ts';
import type { Change, Notice } from './changes.ts';
import { checkChanges } from './check-changes.ts';
import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import type { Network } from './network.ts';
import { variances } from './variances.ts';

/**
 * The network after changes: how far every value moves, its variance then, and which values cannot be computed
 * any more. Shifts and variances stand in the order of the values given; a replaced value shows what stands in its
 * place. A value that depends on a withdrawn one has shift 0 and variance `Infinity`, and is named in
 * `notComputable`; variance is `Infinity` also where a local part is not known. A class limit stops shifts and
 * withdrawals: the child used the nominal value.
 * @throws EngineError `circle` when a successor leans, through others, on what it replaces; those of `checkChanges`
 * and `compileNetwork`
 */
export function applyChanges(
  network: Network | CompiledNetwork,
  changes: readonly Change[],
): { shifts: Float64Array; variances: Float64Array; notComputable: string[] } {
  const before = compiled(network);
  checkChanges(before, changes);
  const successors = successorsOf(before, changes);
  const after = changedNetwork(before, changes, successors);
  const lost = lostNodes(after, changes);
  const shiftAfter = shiftsAfter(before, after, changes, successors);
  const varianceAfter = variances(after);
  const shifts = new Float64Array(before.valueCount);
  const notComputable: string[] = [];
  for (let node = 0; node < before.valueCount; node += 1) {
    const { node: seen, delta } = successors.get(node) ?? { node, delta: 0 };
    if (lost[seen]) notComputable.push(before.idOf(node));
    else shifts[node] = shiftAfter[seen]! + delta;
  }
  const seenVariances = Float64Array.from(shifts, (_, node) => {
    const seen = successors.get(node)?.node ?? node;
    return lost[seen] ? Infinity : varianceAfter[seen]!;
  });
  return { shifts, variances: seenVariances, notComputable };
}

/** Withdrawn values and all that depend on them. */
function lostNodes(after: CompiledNetwork, changes: readonly Change[]): Uint8Array {
  const lost = new Uint8Array(after.nodeCount);
  for (const change of changes) if (change.kind === 'withdraw') lost[after.nodeOf(change.value)!] = 1;
  for (const node of after.order) {
    for (let link = after.linkStart[node]!; link < after.linkStart[node + 1]!; link += 1) {
      if (after.linkSensitivity[link] !== 0 && lost[after.linkParent[link]!]) lost[node] = 1;
    }
  }
  return lost;
}

function shiftsAfter(
  before: CompiledNetwork,
  after: CompiledNetwork,
  changes: readonly Change[],
  successors: Map<number, Successor>,
): Float64Array {
  const shifts = replacementSteps(before, after, successors);
  for (const change of changes)
    if (change.kind === 'shift') shifts[after.nodeOf(change.value)!]! += change.delta;
  accumulate(after, shifts, () => true);
  for (const change of changes) {
    if (change.kind !== 'notice') continue;
    noticeShifts(before, after, change, successors).forEach((shift, node) => (shifts[node]! += shift));
  }
  return shifts;
}

/** What each child gains where it is read as leaning on a successor. */
function replacementSteps(
  before: CompiledNetwork,
  after: CompiledNetwork,
  successors: Map<number, Successor>,
): Float64Array {
  const steps = new Float64Array(after.nodeCount);
  if (successors.size === 0) return steps;
  for (let child = 0; child < before.valueCount; child += 1) {
    for (let link = before.linkStart[child]!; link < before.linkStart[child + 1]!; link += 1) {
      const parent = before.linkParent[link]!;
      if (leansOn(child, parent, successors) === parent) continue;
      steps[child]! += before.linkSensitivity[link]! * successors.get(parent)!.delta;
    }
  }
  return steps;
}

/** A notice moves its oldest covered values and what inherits from them, except through links that applied it. */
function noticeShifts(
  before: CompiledNetwork,
  after: CompiledNetwork,
  notice: Notice,
  successors: Map<number, Successor>,
): Float64Array {
  const shifts = new Float64Array(after.nodeCount);
  for (const term of entryPoints(after, notice)) shifts[after.nodeOf(term.value)!]! += term.shift;
  const applied = new Set(
    notice.alreadyApplied?.map(({ child, parent }) => {
      const node = before.nodeOf(child)!;
      return `${node} ${leansOn(node, before.nodeOf(parent)!, successors)}`;
    }),
  );
  accumulate(after, shifts, (child, parent) => !applied.has(`${child} ${parent}`));
  return shifts;
}

/** Forward accumulation in place: each node adds what its parents hand down. */
function accumulate(
  net: CompiledNetwork,
  shifts: Float64Array,
  passes: (child: number, parent: number) => boolean,
): void {
  for (const node of net.order) {
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      const parent = net.linkParent[link]!;
      const step = net.linkSensitivity[link]! * shifts[parent]!;
      if (step !== 0 && passes(node, parent)) shifts[node]! += step;
    }
  }
}
