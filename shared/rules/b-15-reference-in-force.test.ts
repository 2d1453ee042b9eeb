import { describe, expect, it } from 'vitest';
import { referenceInForce } from './b-15-reference-in-force.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { EndFacts, Question, ValueFacts } from './facts.ts';

const end = (changes: Partial<EndFacts> = {}): EndFacts => ({
  kind: 'superseded',
  effectiveOn: '2024-09-01',
  madeKnownOn: '2024-09-01',
  recordedAt: '2024-09-01T09:00:00.000000Z',
  changed: 'value',
  replacedBy: { uid: 'value-next', certificateNo: 'IP-2024-002', revisionN: 2, ends: [] },
  ...changes,
});
const judge = (ends: EndFacts[], parent: Partial<ValueFacts> = {}, child = valueFacts()) =>
  judgedBy(referenceInForce, linkFacts({ child, parent: referenceFacts({ ends, ...parent }) }));
const today = (ends: EndFacts[], asked: Partial<Question> = {}) =>
  judgedBy(referenceInForce, linkFacts({ parent: referenceFacts({ ends }) }), { ...asked, verdict: 'today' });

describe('at the time of use', () => {
  it('holds while the certificate stood, and on the day of its end', () => {
    expect(judge([])).toMatchObject({ outcome: 'holds', sentence: 'in force' });
    expect(judge([end({ effectiveOn: '2025-03-10', madeKnownOn: '2025-03-10' })]).sentence).toBe('in force');
  });

  it('holds over a re-issue with unchanged values, and says so', () => {
    const found = judge([end({ changed: 'text' })]);
    expect(found).toMatchObject({ outcome: 'holds', severity: 'information', sentence: 'unchanged' });
    expect(found.text).toContain('re-issued on 2024-09-01 as IP-2024-002, revision 2');
  });

  it('fails where it had been superseded by another value, or withdrawn', () => {
    expect(judge([end()])).toMatchObject({ outcome: 'fails', severity: 'critical', sentence: 'superseded' });
    const withdrawn = judge([end({ kind: 'withdrawn', replacedBy: null })]);
    expect(withdrawn).toMatchObject({ outcome: 'fails', sentence: 'withdrawn' });
    expect(withdrawn.text).toContain('withdrawn on 2024-09-01');
  });

  it('is left sound by a withdrawal that was back-dated later', () => {
    const backDated = end({
      kind: 'withdrawn',
      madeKnownOn: '2025-11-01',
      recordedAt: '2025-11-01T09:00:00.000000Z',
    });
    expect(judge([backDated]).outcome).toBe('holds');
    expect(today([backDated])).toMatchObject({ outcome: 'fails', sentence: 'withdrawn since' });
  });

  it('cannot be judged where the year of use does not decide', () => {
    const ended = [end({ effectiveOn: '2025-06-01', madeKnownOn: '2025-06-01' })];
    const found = judge(ended, {}, valueFacts({ datePrecision: 'year' }));
    expect(found.outcome).toBe('cannot be judged');
    expect(found.text).toContain('ended on 2025-06-01; the use is dated 2025 only');
  });

  it('does not apply to the earlier definition', () => {
    expect(judge([], { rootKind: 'earlier definition' }).outcome).toBe('does not apply');
  });
});

describe('today', () => {
  it('holds while it stands on the day asked about, as known then', () => {
    expect(today([]).sentence).toBe('still in force');
    expect(today([end()], { day: '2024-08-31' }).outcome).toBe('holds');
    expect(today([end({ recordedAt: '2026-06-02T00:00:00.000000Z' })]).outcome).toBe('holds');
  });

  it('fails once it has been superseded by another value', () => {
    const found = today([end()]);
    expect(found).toMatchObject({ outcome: 'fails', sentence: 'superseded since', severity: 'critical' });
    expect(found.text).toContain('by IP-2024-002, revision 2');
  });

  it('holds over a re-issue with unchanged values', () => {
    expect(today([end({ changed: 'text' })])).toMatchObject({ outcome: 'holds', severity: 'information' });
  });
});
