import { describe, expect, it } from 'vitest';
import type { ChainCheck } from './chains.ts';
import { packChecks, unpackChecks } from './packed-checks.ts';

const A = '0190a0a0-0000-7000-8000-00000000000a';
const B = '0190a0a0-0000-7000-8000-00000000000b';

function check(parts: Partial<ChainCheck>): ChainCheck {
  return {
    rule: 'B-12',
    subject: { type: 'link', childUid: A, parentUid: B },
    verdict: 'conduct',
    outcome: 'holds',
    severity: 'critical',
    parameters: { reference: 'C-1', used: '2020-01-02' },
    sentence: 'first',
    ...parts,
  };
}

const CHECKS = [
  check({}),
  check({ verdict: 'today' }),
  check({ subject: { type: 'value', uid: A }, parameters: {} }),
  check({ subject: { type: 'chain' }, sentence: null }),
  check({ parameters: { used: '2020-01-02', reference: 'C-1' } }),
  check({ parameters: { reference: '', used: 'C-1' } }),
  check({ severity: 'minor', outcome: 'cannot be judged' }),
];

describe('packed checks', () => {
  it('are the same when unpacked, in their order', () => {
    expect(unpackChecks(packChecks(CHECKS))).toEqual(CHECKS);
    expect(unpackChecks(packChecks([]))).toEqual([]);
  });

  it('say a text, a subject and a kind once', () => {
    const packed = packChecks([...CHECKS, ...CHECKS]);
    expect(packed.texts).toEqual(['C-1', '2020-01-02', '']);
    expect(packed.subjects).toEqual([[A, B], [A], []]);
    expect(packed.kinds).toHaveLength(packChecks(CHECKS).kinds.length);
  });

  it('refuse rows that lead nowhere', () => {
    const packed = packChecks(CHECKS);
    expect(() => unpackChecks({ ...packed, rows: packed.rows.slice(0, -1) })).toThrow(RangeError);
    expect(() => unpackChecks({ ...packed, texts: [] })).toThrow(RangeError);
  });
});
