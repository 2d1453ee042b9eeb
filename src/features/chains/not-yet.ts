import type { ChainResponse } from '#shared/contracts/chains.ts';

/** That the weight's value did not stand yet, or was not known yet, when it was asked about. */
export interface NotYet {
  day: string;
  what: 'in force' | 'recorded';
}

/** Whether the question lies before the focus: null where it stands, or has stood. */
export function notYet(chain: ChainResponse): NotYet | null {
  const focus = chain.nodes.find((node) => node.uid === chain.focusUid);
  if (focus?.type !== 'value' || focus.state !== 'not yet in force') return null;
  const { day, known } = chain.question;
  return focus.issuedOn > day ? { day, what: 'in force' } : { day: known, what: 'recorded' };
}
