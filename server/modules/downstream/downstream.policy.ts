import { permission } from '#server/policy/permission.ts';
import type { ValueView } from '#server/policy/value-view.ts';

/** What a question starts from: how much of it this person sees was worked out when it was loaded. */
export interface DownstreamSubject {
  view: ValueView;
  /** Ids of the values it starts from, by what the request named. */
  ids: number[][];
}

/**
 * Who leans on it, and what if it were otherwise: for whom it is open in full or as a statement. What they see of
 * the answer is narrowed row by row.
 */
export const readDownstream = permission<DownstreamSubject>(
  'downstream:read',
  (_user, subject) => subject.view === 'full' || subject.view === 'statement',
);
