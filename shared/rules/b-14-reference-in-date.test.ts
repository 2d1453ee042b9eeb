import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { referenceInDate } from './b-14-reference-in-date.ts';
import { addMonths, periodOf } from './days.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts, Question } from './facts.ts';

const programme = (intervalMonths: number, recordedOn = '2020-01-01') => ({
  intervalMonths,
  method: 'fixed interval',
  justification: 'Three calibrations have shown no change beyond a third of U.',
  validFrom: '2020-01-01',
  validTo: null,
  recordedAt: `${recordedOn}T08:00:00.000000Z`,
});
const judge = (changes: Partial<LinkFacts> = {}, asked: Partial<Question> = {}) =>
  judgedBy(referenceInDate, linkFacts(changes), asked);
const today = (changes: Partial<LinkFacts> = {}, asked: Partial<Question> = {}) =>
  judgedBy(referenceInDate, linkFacts(changes), { ...asked, verdict: 'today' });

describe('at the time of use', () => {
  it('holds up to the due date itself, and says whose programme', () => {
    expect(judge()).toMatchObject({ outcome: 'holds' });
    expect(judge().text).toContain(
      'By the programme of River Laboratory (36 months) RL 0001 was due on 2027-01-15',
    );
    const dueDay = { usedBegin: '2027-01-15', usedEnd: '2027-01-15' };
    expect(judge(dueDay).outcome).toBe('holds');
  });

  it('fails where it was late from the beginning, or ran over', () => {
    expect(judge({ programmes: [programme(12)] })).toMatchObject({
      outcome: 'fails',
      severity: 'critical',
      sentence: 'late',
    });
    const over = judge({ usedBegin: '2027-01-15', usedEnd: '2027-01-16' });
    expect(over).toMatchObject({ outcome: 'fails', sentence: 'ran over' });
    expect(over.text).toContain('the work began on 2027-01-15 and ended on 2027-01-16');
  });

  it('judges by the programme known then, not by one entered over it later', () => {
    const shortened = programme(12, '2025-09-01');
    expect(judge({ programmes: [programme(36), shortened] }).outcome).toBe('holds');
    expect(judge({ programmes: [shortened] }).outcome).toBe('fails');
  });

  it('cannot be judged without a programme, or where the month does not decide', () => {
    const none = judge({ programmes: [] });
    expect(none.outcome).toBe('cannot be judged');
    expect(none.text).toContain('No calibration programme of River Laboratory for RL 0001');
    const coarse = {
      usedBegin: '2027-01-01',
      usedEnd: '2027-01-31',
      child: valueFacts({ datePrecision: 'month' }),
    };
    expect(judge(coarse)).toMatchObject({ outcome: 'cannot be judged', sentence: 'undecided' });
  });

  it('does not apply to a consensus value', () => {
    expect(judge({ parent: referenceFacts({ rootKind: 'consensus value' }) }).outcome).toBe('does not apply');
  });

  it('holds on every day up to the due date and fails on every later one', () => {
    const offset = fc.integer({ min: -900, max: 900 });
    const due = addMonths(periodOf('2024-01-15', 'day'), 36).last;
    fc.assert(
      fc.property(offset, (days) => {
        const used = new Date(Date.parse(due) + days * 86_400_000).toISOString().slice(0, 10);
        const { outcome } = judge({ usedBegin: used, usedEnd: used });
        expect(outcome).toBe(days <= 0 ? 'holds' : 'fails');
      }),
    );
  });
});

describe('today', () => {
  it('says where the programme has ended since, and breaks only by policy', () => {
    expect(today({}, { day: '2026-06-01' })).toMatchObject({ outcome: 'holds', sentence: 'still in date' });
    expect(today({}, { day: '2027-02-01' })).toMatchObject({
      outcome: 'holds',
      sentence: 'ended since',
      severity: 'information',
    });
    expect(today({}, { day: '2027-02-01', programmeEndedAfterUse: 'breaks' })).toMatchObject({
      outcome: 'fails',
      severity: 'major',
    });
  });

  it('does not apply without a programme today', () => {
    expect(today({ programmes: [] })).toMatchObject({ outcome: 'does not apply', sentence: 'not relied on' });
  });
});
