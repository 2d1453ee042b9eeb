import type { z } from 'zod';
import type { Outcome, Severity, ValueState } from '#shared/contracts/common.ts';

/** How something stands after it was checked, as `StateMark` draws it. */
export type State = 'sound' | 'caution' | 'broken' | 'not judged' | 'does not apply';

/** How a value's state is marked: a superseded value is a caution, since what leans on it stands meanwhile. */
export function stateOfValue(value: z.infer<typeof ValueState>): State {
  return {
    'in force': 'sound',
    'not yet in force': 'not judged',
    superseded: 'caution',
    withdrawn: 'broken',
  }[value] as State;
}

/** How a check's outcome is marked; a failed check of little weight is a caution, not a break. */
export function stateOfOutcome(
  outcome: z.infer<typeof Outcome>,
  severity: z.infer<typeof Severity> = 'critical',
): State {
  if (outcome === 'holds') return 'sound';
  if (outcome === 'cannot be judged') return 'not judged';
  if (outcome === 'does not apply') return 'does not apply';
  return severity === 'block' || severity === 'critical' ? 'broken' : 'caution';
}
