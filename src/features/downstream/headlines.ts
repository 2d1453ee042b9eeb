import type { WhatIfResponse } from '#shared/contracts/downstream.ts';

/** What leans on a value, in words: values that are told in full, and weights of others. */
export function leaningHeadline({ count, warned }: { count: number; warned: number }): string {
  const values = count - warned;
  const parts = [
    values > 0 ? `${values} ${values === 1 ? 'value' : 'values'}` : '',
    warned > 0 ? `${warned} ${warned === 1 ? 'weight' : 'weights'} of others` : '',
  ].filter((part) => part !== '');
  if (parts.length === 0) return 'Nothing leans on it';
  return `${parts.join(' and ')} ${count === 1 ? 'leans' : 'lean'} on it`;
}

/** What a change comes to, the worst first. */
export function whatIfHeadline({ count, words }: WhatIfResponse['total']): string {
  if (count === 0) return 'Nothing leans on it: nothing would follow';
  const { verdictChanges, material } = words;
  if (verdictChanges > 0) return `The verdict would change for ${verdictChanges} of ${count}`;
  if (material > 0) return `It would be material for ${material} of ${count}`;
  return count === 1
    ? 'It would not be material for the one below'
    : `It would be material for none of ${count}`;
}
