import { describe, expect, it } from 'vitest';
import { unitOfValue } from './b-18-unit.ts';
import { historyFacts, judgedBy, SCOPE_LINE, valueFacts } from './example-facts.ts';
import type { ValueFacts } from './facts.ts';

/** As it should be: +0.21 mg, U 0.30 mg; best capability 0.25 mg. */
const UP = { deviation: '0.21', expandedU: '0.3' };
const DOWN = { deviation: '0.00000021', expandedU: '0.0000003' };
const HISTORY = [historyFacts()];
const judge = (changes: Partial<ValueFacts>) => judgedBy(unitOfValue, valueFacts(changes));

describe('with a history', () => {
  it('holds for the usual size, and for a large deviation with the usual U', () => {
    expect(judge({ history: HISTORY }).sentence).toBe('plausible');
    expect(judge({ history: HISTORY, deviation: '0.21' })).toMatchObject({
      outcome: 'holds',
      severity: 'information',
      sentence: 'ten limits',
    });
  });

  it('fails where both are a factor of 1000 off, up or down, with or without a scope', () => {
    for (const slip of [UP, DOWN]) {
      expect(judge({ ...slip, history: HISTORY })).toMatchObject({ outcome: 'fails', severity: 'block' });
      expect(judge({ ...slip, history: HISTORY, scope: [] }).outcome).toBe('fails');
    }
    expect(judge({ ...UP, history: HISTORY }).text).toContain(
      'from the other values of MI 0007 (RL-2023-018)',
    );
  });

  it('finds a slip of a small deviation by what it fits after the factor is taken out', () => {
    const small = [historyFacts({ deviation: '0.00001' })];
    expect(judge({ deviation: '0.5', expandedU: '0.3', history: small }).outcome).toBe('fails');
  });

  it('keeps the question on record after the unit was confirmed, without blocking', () => {
    expect(judge({ ...UP, history: HISTORY, unitConfirmed: true })).toMatchObject({
      outcome: 'fails',
      severity: 'major',
    });
  });

  it('does not ask where only U jumps: a coarser laboratory', () => {
    expect(judge({ deviation: '0.0002', expandedU: '0.3', history: HISTORY }).outcome).toBe('holds');
    const coarse = { ...SCOPE_LINE, bestURelative: 1e-4 };
    expect(judge({ deviation: '0.18', expandedU: '0.3', history: HISTORY, scope: [coarse] }).outcome).toBe(
      'holds',
    );
    expect(judge({ deviation: '0.02', expandedU: '0.015', history: HISTORY }).outcome).toBe('holds');
  });

  it('asks about the slip, not about the value after it', () => {
    const slip = historyFacts({ ...UP, uid: 'slip', performedEnd: '2024-02-02' });
    expect(judge({ history: [historyFacts(), slip] }).outcome).toBe('holds');
    const stateless = historyFacts({ expandedU: null });
    expect(judge({ history: [stateless] }).outcome).toBe('holds');
  });
});

describe('without history', () => {
  it('asks by class and best capability', () => {
    const up = judge({ ...UP });
    expect(up).toMatchObject({ outcome: 'fails', sentence: 'capability' });
    expect(up.text).toContain('best capability of River Laboratory');
    expect(judge({ ...DOWN }).outcome).toBe('fails');
    expect(judge({ deviation: '0.21' }).outcome).toBe('holds');
    expect(judge({ ...UP, class: null }).outcome).toBe('holds');
    expect(judge({ ...UP, scope: [{ ...SCOPE_LINE, bestURelative: 0 }] }).outcome).toBe('holds');
  });

  it('does not apply where there is nothing to compare with, nor to mass', () => {
    expect(judge({ class: null, scope: [] }).sentence).toBe('nothing');
    expect(judge({ ...UP, quantity: 'mass' }).sentence).toBe('mass');
  });

  it('cannot be judged without U', () => {
    expect(judge({ expandedU: null }).outcome).toBe('cannot be judged');
    expect(judge({ k: null }).outcome).toBe('cannot be judged');
  });
});
