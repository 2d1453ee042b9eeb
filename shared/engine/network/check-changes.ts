import { EngineError } from '../errors.ts';
import { requireNumber } from '../quantity/domain.ts';
import type { Change, Notice } from './changes.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import { requireNode } from './walk.ts';

/**
 * Refuses changes that name unknown values, contradict each other or carry impossible numbers.
 * @throws EngineError `unknown-node`, `not-a-value`, `not-finite`, `out-of-range`, `duplicate-id`, `replaced-twice`,
 * `withdrawn-and-replaced`, `replaced-in-a-circle`
 */
export function checkChanges(net: CompiledNetwork, changes: readonly Change[]): void {
  const successors = new Map<string, string>();
  changes.forEach((change, at) => {
    const field = `changes[${at}]`;
    if (change.kind === 'notice') return checkNotice(net, change, field);
    requireValue(net, change.value, `${field}.value`);
    if (change.kind === 'shift') requireNumber(change.delta, `${field}.delta`);
    if (change.kind === 'raise')
      requireNumber(change.addedStandardUncertainty, `${field}.addedStandardUncertainty`, { min: 0 });
    if (change.kind !== 'replace') return;
    requireValue(net, change.by, `${field}.by`);
    requireNumber(change.delta, `${field}.delta`);
    if (successors.has(change.value)) {
      throw new EngineError(
        'replaced-twice',
        `${field}.value`,
        `"${change.value}"`,
        'It is replaced twice; name one successor.',
      );
    }
    successors.set(change.value, change.by);
    refuseCircle(successors, change.value, `${field}.by`);
  });
  refuseWithdrawnAndReplaced(changes, successors);
}

function checkNotice(net: CompiledNetwork, notice: Notice, field: string): void {
  if (net.nodeOf(notice.id) !== undefined) {
    throw new EngineError(
      'duplicate-id',
      `${field}.id`,
      `"${notice.id}"`,
      'The id is already in the network; choose another one.',
    );
  }
  requireNumber(notice.standardUncertainty, `${field}.standardUncertainty`, { min: 0 });
  notice.terms.forEach((term, at) => {
    requireValue(net, term.value, `${field}.terms[${at}].value`);
    requireNumber(term.shift, `${field}.terms[${at}].shift`);
    requireNumber(term.sensitivity, `${field}.terms[${at}].sensitivity`);
  });
  notice.alreadyApplied?.forEach((link, at) => {
    requireValue(net, link.child, `${field}.alreadyApplied[${at}].child`);
    requireValue(net, link.parent, `${field}.alreadyApplied[${at}].parent`);
  });
}

function requireValue(net: CompiledNetwork, id: string, field: string): void {
  if (requireNode(net, id, field) < net.valueCount) return;
  throw new EngineError(
    'not-a-value',
    field,
    `"${id}"`,
    'This is a source; only values can be changed this way.',
  );
}

function refuseCircle(successors: Map<string, string>, value: string, field: string): void {
  for (let next = successors.get(value); next !== undefined; next = successors.get(next)) {
    if (next !== value) continue;
    throw new EngineError(
      'replaced-in-a-circle',
      field,
      `a successor of "${value}"`,
      'It would stand in its own place in the end; name a later value.',
    );
  }
}

function refuseWithdrawnAndReplaced(changes: readonly Change[], successors: Map<string, string>): void {
  changes.forEach((change, at) => {
    if (change.kind !== 'withdraw' || !successors.has(change.value)) return;
    throw new EngineError(
      'withdrawn-and-replaced',
      `changes[${at}].value`,
      `"${change.value}"`,
      'It is both withdrawn and replaced; a value with a successor is replaced.',
    );
  });
}
