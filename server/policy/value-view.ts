import { readsInFull, type User } from './user.ts';

/**
 * How much of an assigned value a person sees: everything; what a traceability statement would show
 * (identity, value, U, dates, certificate number, state, share of flow); laboratory and weight only, enough
 * to warn; or nothing.
 */
export type ValueView = 'full' | 'statement' | 'warning' | 'none';

/** How a value stands to the weights that the person reads in full: they lean on it, it leans on them, or neither. */
export type Relation = 'upstream' | 'downstream' | 'unrelated';

/**
 * The one place that decides what is seen of a value. Holdings and issued calibrations of the person's own
 * laboratories, or of those opened to them as assessor, are seen in full; the registrar sees all in full.
 * Being the national institute, or a comparison's pilot, opens nothing more.
 */
export function valueView(
  user: User,
  value: { holderId: string; issuerId: string },
  relation: Relation,
): ValueView {
  if (readsInFull(user, value.holderId) || readsInFull(user, value.issuerId)) return 'full';
  if (relation === 'upstream') return 'statement';
  return relation === 'downstream' ? 'warning' : 'none';
}

/**
 * Whether the person sees what else befell the weight of a value: its other calibrations, epochs, drift. That is the
 * holder's to tell: who issued one certificate sees that one in full, and nothing of another laboratory's.
 */
export function seesHistory(user: User, { holderId }: { holderId: string }): boolean {
  return readsInFull(user, holderId);
}
