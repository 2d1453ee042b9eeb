import { describe, expect, it } from 'vitest';
import { noticesIncluded } from './b-24-notices-included.ts';
import { judgedBy, linkFacts, referenceFacts, valueFacts } from './example-facts.ts';
import type { LinkFacts, NoticeFacts } from './facts.ts';
import type { VerdictName } from './rule.ts';

/** In force a month before the use of 2025-03-09 to -10; u of the result 0.15 mg. */
const notice = (changes: Partial<NoticeFacts> = {}): NoticeFacts => ({
  number: 'IP-N3',
  title: 'Uncertainty of the scale',
  effectiveOn: '2025-02-01',
  madeKnownOn: '2025-01-10',
  shift: 0,
  u: 0.00006,
  ...changes,
});
const judge = (notices: NoticeFacts[], changes: Partial<LinkFacts> = {}, verdict: VerdictName = 'conduct') =>
  judgedBy(noticesIncluded, linkFacts({ notices, ...changes }), { verdict });
const corrected = (usedDeviation: string | null) => ({ usedAs: 'by notice' as const, usedDeviation });

describe('a notice in force at use', () => {
  it('fails where it was left out: critical from 5 % of u on, information below', () => {
    const found = judge([notice()]);
    expect(found).toMatchObject({ outcome: 'fails', severity: 'critical', sentence: 'left out' });
    expect(found.text).toContain(
      'Notice IP-N3 was in force when certificate IP-2024-002 was used, until 2025-03-10',
    );
    expect(found.text).toContain('u of certificate RL-2025-031 would be 7.7 % larger');
    expect(judge([notice({ u: 0.00004 })])).toMatchObject({ outcome: 'fails', severity: 'information' });
  });

  it('counts a shift left out in quadrature, shifts of several notices added before', () => {
    expect(judge([notice({ u: 0, shift: 0.00006 })])).toMatchObject({ severity: 'critical' });
    const both = [notice({ u: 0, shift: -0.00006 }), notice({ number: 'IP-N4', u: 0, shift: 0.00006 })];
    expect(judge(both)).toMatchObject({ severity: 'information' });
    expect(judge(both).text).toContain('Notice IP-N3, IP-N4');
  });

  it('weighs by the sensitivity of the step', () => {
    expect(judge([notice()], { sensitivity: 0.1 })).toMatchObject({ severity: 'information' });
  });

  it('holds where the corrected value was used', () => {
    expect(judge([notice({ shift: -0.00002 })], corrected(null)).sentence).toBe('included');
    // The reference stands at +0.05 mg: corrected 0.03 mg.
    expect(judge([notice({ shift: -0.00002 })], corrected('0.00003')).outcome).toBe('holds');
    expect(judge([notice({ shift: -0.0000234 })], corrected('0.00003')).outcome).toBe('holds');
  });

  it('fails where the shift was used twice, or with the other sign', () => {
    const twice = judge([notice({ shift: -0.0001 })], corrected('-0.00015'));
    expect(twice).toMatchObject({ outcome: 'fails', severity: 'critical', sentence: 'otherwise corrected' });
    expect(twice.text).toContain('0.10\u2009mg from what notice IP-N3 makes of it');
    expect(judge([notice({ shift: -0.0001 })], corrected('0.00015')).outcome).toBe('fails');
  });
});

describe('the two verdicts', () => {
  it('a back-dated notice leaves the conduct sound, and today not', () => {
    const backDated = notice({ madeKnownOn: '2026-01-10' });
    expect(judge([backDated]).outcome).toBe('does not apply');
    expect(judge([backDated], {}, 'today').outcome).toBe('fails');
  });

  it('what was made known on the day of use came too late', () => {
    expect(judge([notice({ madeKnownOn: '2025-03-09' })]).outcome).toBe('does not apply');
    expect(judge([notice({ madeKnownOn: '2025-03-08' })]).outcome).toBe('fails');
  });

  it('a notice of effect after the use says nothing of it', () => {
    expect(judge([notice({ effectiveOn: '2025-03-11' })], {}, 'today').outcome).toBe('does not apply');
    expect(judge([notice({ effectiveOn: '2025-03-10' })], {}, 'today').outcome).toBe('fails');
  });
});

describe('cannot be judged, or does not apply', () => {
  it('where the day of use is not known well enough', () => {
    const child = valueFacts({ datePrecision: 'month' });
    const coarse = notice({ effectiveOn: '2025-03-20' });
    expect(judge([coarse], { child }, 'today')).toMatchObject({
      outcome: 'cannot be judged',
      sentence: 'undecided',
    });
    expect(judge([coarse], { child, ...corrected(null) }, 'today').outcome).toBe('holds');
  });

  it('where the result states no U to weigh it by', () => {
    const child = valueFacts({ expandedU: null });
    expect(judge([notice()], { child }).sentence).toBe('no uncertainty');
    expect(judge([notice({ shift: -0.0001 })], { child, ...corrected('-0.00015') }).sentence).toBe(
      'no uncertainty',
    );
  });

  it('where none bears on it, or the class limit was used', () => {
    expect(judge([]).sentence).toBe('none');
    const limit = judge([notice()], { usedAs: 'class limit', parent: referenceFacts({ class: 'E2' }) });
    expect(limit).toMatchObject({ outcome: 'does not apply', sentence: 'class limit' });
  });
});
