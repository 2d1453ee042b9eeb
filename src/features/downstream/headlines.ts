import type { WhatIfResponse } from '#shared/contracts/downstream.ts';

/** How many weights lean on a value, in words. */
export function leaningHeadline({ count }: { count: number }): string {
  if (count === 0) return 'Nothing leans on it';
  return count === 1 ? '1 weight leans on it' : `${count} weights lean on it`;
}

/** What a change comes to, the worst first. */
export function whatIfHeadline({ count, words }: WhatIfResponse['total']): string {
  if (count === 0) return 'Nothing leans on it: nothing would follow';
  const { verdictChanges, material } = words;
  const of = `of ${count} ${count === 1 ? 'weight' : 'weights'}`;
  if (verdictChanges > 0) return `The verdict would change for ${verdictChanges} ${of}`;
  if (material > 0) return `It would be material for ${material} ${of}`;
  return count === 1 ? 'It would not be material for the 1 weight' : `It would be material for none ${of}`;
}
