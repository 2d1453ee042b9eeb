import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { readAmount } from './read-amount.ts';
import type { DownstreamSearch } from './search.ts';

/** What a change is about. */
interface Subject {
  uid: string;
  /** Null where this person may not open the certificate. */
  revisionId: string | null;
}

/** The change that the address supposes; null where it supposes none, or one that cannot be asked. */
export function supposedChange(
  { suppose, amount }: Pick<DownstreamSearch, 'suppose' | 'amount'>,
  subject: Subject,
): WhatIfChange | null {
  if (suppose === undefined) return null;
  if (suppose === 'withdraw') {
    return subject.revisionId === null ? null : { kind: 'withdraw', revisionId: subject.revisionId };
  }
  const read = readAmount(amount ?? '', '.');
  if (read.kind !== 'amount') return null;
  if (suppose === 'shift') return { kind: 'shift', valueUid: subject.uid, shift: read.grams };
  const addedU = Number(read.grams);
  return addedU > 0 ? { kind: 'raise', valueUid: subject.uid, addedU } : null;
}
