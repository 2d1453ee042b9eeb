import { groupBy } from '#shared/group-by.ts';
import { stateOfValue, type State } from '#shared/states.ts';
import { countingChecks, worstOf, type CountedChain } from './counting-checks.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import type { DrawnNode } from './drawn-chain.ts';

/** How each value stands: the worst of its own checks and of its standing. */
export function ownStates(
  chain: CountedChain & { nodes: readonly DrawnNode[] },
  verdict: DrawingQuestion['verdict'],
): Map<string, State> {
  const ofValues = countingChecks(chain, verdict).flatMap((check) =>
    check.subject.type === 'value' ? [{ uid: check.subject.uid, check }] : [],
  );
  const byUid = groupBy(ofValues, ({ uid }) => uid);
  return new Map(
    chain.nodes.flatMap((node) =>
      node.type === 'value'
        ? [
            [
              node.uid,
              worstOf(
                (byUid.get(node.uid) ?? []).map(({ check }) => check),
                stateOfValue(node.state),
              ),
            ] as const,
          ]
        : [],
    ),
  );
}
