import { expect, it } from 'vitest';
import { readSearch, withChange } from './search.ts';

it('reads what it knows and leaves out the rest', () => {
  const search = readSearch(new URLSearchParams('rule=B-14&outcome=fails&severity=dreadful&whose=own&x=1'));
  expect(search).toEqual({ rule: 'B-14', outcome: 'fails', whose: 'own' });
});

it('changes one part and drops what is taken back', () => {
  const search = { rule: 'B-14', outcome: 'fails', whose: 'own' } as const;
  expect(withChange(search, { rule: undefined, verdict: 'today' })).toEqual({
    outcome: 'fails',
    whose: 'own',
    verdict: 'today',
  });
});
