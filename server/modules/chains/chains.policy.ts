import { permission } from '#server/policy/permission.ts';
import type { ValueView } from '#server/policy/value-view.ts';

/** A value as the door sees it: how much of it this person sees was worked out when it was loaded. */
export interface ChainSubject {
  id: number;
  uid: string;
  holderId: string;
  issuerId: string;
  view: ValueView;
}

export const readChain = permission<ChainSubject>(
  'chain:read',
  (_user, subject) => subject.view === 'full' || subject.view === 'statement',
);
