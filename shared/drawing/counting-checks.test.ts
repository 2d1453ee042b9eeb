import { describe, expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { askedTodayOnly } from './asked-today-only.ts';
import { countingChecks, worstOf } from './counting-checks.ts';

type Check = ChainResponse['checks'][number];

function check(change: Partial<Check>): Check {
  return {
    rule: 'passing',
    subject: { type: 'value', uid: 'weight' },
    verdict: 'conduct',
    outcome: 'fails',
    severity: 'major',
    parameters: {},
    sentence: null,
    ...change,
  };
}

/** As much of a chain as counting looks at. */
function chainWith(checks: Check[]): ChainResponse {
  const rule = (id: string, isLasting: boolean) => ({ id, isLasting });
  return {
    focusUid: 'weight',
    rules: [rule('passing', false), rule('lasting', true)],
    links: [
      { childUid: 'weight', parentUid: 'reference', role: 'reference' },
      { childUid: 'reference', parentUid: 'run', role: 'informs' },
    ],
    checks,
  } as unknown as ChainResponse;
}

describe('checks that count under a verdict', () => {
  it('leaves conduct out of today, unless it is a flaw of the result itself', () => {
    const late = check({});
    const flaw = check({ rule: 'lasting' });
    const withdrawn = check({ verdict: 'today' });
    const chain = chainWith([late, flaw, withdrawn]);
    expect(countingChecks(chain, 'today')).toEqual([flaw, withdrawn]);
    expect(countingChecks(chain, 'conduct')).toEqual([late, flaw]);
  });

  it('leaves out what only informs: no link stands or falls with it', () => {
    const chain = chainWith([check({ subject: { type: 'value', uid: 'run' } })]);
    expect(countingChecks(chain, 'conduct')).toEqual([]);
  });
});

describe('findings asked about today only', () => {
  const today = (rule: string, outcome: Check['outcome'] = 'fails') =>
    check({ rule, verdict: 'today', outcome });

  it('are those that the use was never asked about, with the links that they count at', () => {
    expect(askedTodayOnly(chainWith([today('lasting')]))).toEqual({
      rules: ['lasting'],
      links: 1,
      isAllThatDiffers: true,
    });
  });

  it('are none where the use was asked and held: then something changed since', () => {
    const changed = [check({ outcome: 'holds' }), today('passing')];
    expect(askedTodayOnly(chainWith(changed))).toEqual({ rules: [], links: 0, isAllThatDiffers: false });
    expect(askedTodayOnly(chainWith([...changed, today('lasting')]))).toMatchObject({
      rules: ['lasting'],
      isAllThatDiffers: false,
    });
  });

  it('leave out what could not be judged and is slight', () => {
    const slight = { ...today('lasting', 'cannot be judged'), severity: 'minor' as const };
    expect(askedTodayOnly(chainWith([slight])).links).toBe(0);
  });
});

describe('mark of a plate', () => {
  it('is the worst of standing and own checks', () => {
    expect(worstOf([], 'sound')).toBe('sound');
    expect(worstOf([], 'broken')).toBe('broken');
    expect(worstOf([check({})], 'sound')).toBe('broken');
    expect(worstOf([check({ severity: 'minor' })], 'sound')).toBe('caution');
    expect(worstOf([check({ outcome: 'cannot be judged' })], 'caution')).toBe('not judged');
    expect(worstOf([check({ outcome: 'cannot be judged', severity: 'minor' })], 'sound')).toBe('sound');
  });
});
