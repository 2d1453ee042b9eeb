import { expect, it } from 'vitest';
import { uNotBelowBestCapability } from './b-26-best-capability.ts';
import { judgedBy, SCOPE_LINE, valueFacts } from './example-facts.ts';
import type { ScopeLineFacts, ValueFacts } from './facts.ts';

/** Best capability c x 1 kg; U is 0.30 mg printed to 0.01 mg. */
const line = (milligrams: number, changes: Partial<ScopeLineFacts> = {}): ScopeLineFacts => ({
  ...SCOPE_LINE,
  bestURelative: milligrams / 1e6,
  ...changes,
});
const judge = (scope: ScopeLineFacts[], changes: Partial<ValueFacts> = {}) =>
  judgedBy(uNotBelowBestCapability, valueFacts({ scope, ...changes }));

it('holds above, at, and after rounding at the best capability', () => {
  expect(judge([line(0.25)]).outcome).toBe('holds');
  expect(judge([line(0.3)]).outcome).toBe('holds');
  expect(judge([line(0.304)]).outcome).toBe('holds');
  expect(judge([line(0.305)]).outcome).toBe('holds');
});

it('fails below it after rounding, and names the line', () => {
  const found = judge([line(0.306, { line: 7 })]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(found.text).toContain(
    'states U 0.30\u2009mg under accreditation, below the best capability of River Laboratory, 0.31\u2009mg at k = 2 (line 7',
  );
});

it('compares at the same k', () => {
  expect(judge([line(0.29)], { k: '2.1' }).outcome).toBe('holds');
  expect(judge([line(0.3)], { k: '2.1' }).outcome).toBe('fails');
});

it('takes the line of its own method, else the smallest', () => {
  const direct = line(0.4, { line: 2, method: 'direct' });
  expect(judge([direct, line(0.25)]).outcome).toBe('holds');
  expect(judge([direct, line(0.25)], { method: 'direct' }).outcome).toBe('fails');
  expect(judge([direct, line(0.25)], { method: 'by hand' }).outcome).toBe('holds');
  expect(judge([line(0.25), line(0.4, { line: 2 })]).outcome).toBe('holds');
});

it('cannot be judged without U, without any scope, or where only the printed decimals would decide', () => {
  expect(judge([line(0.25)], { expandedU: null }).outcome).toBe('cannot be judged');
  expect(judge([]).sentence).toBe('no scope');
  expect(judge([line(0.32)], { reportedUDecimals: null })).toMatchObject({
    outcome: 'cannot be judged',
    sentence: 'rounding',
  });
  expect(judge([line(0.25)], { reportedUDecimals: null }).outcome).toBe('holds');
});

it('does not apply outside a claim, or where no line covers it (B-27 does)', () => {
  expect(judge([line(0.4)], { underAccreditation: false }).sentence).toBe('not claimed');
  expect(judge([line(0.4, { nominalTo: '500' })]).sentence).toBe('no line');
});
