import { expect, it } from 'vitest';
import { withinScope } from './b-27-within-scope.ts';
import { judgedBy, SCOPE_LINE, valueFacts } from './example-facts.ts';
import type { ScopeLineFacts, ValueFacts } from './facts.ts';

const judge = (scope: ScopeLineFacts[], changes: Partial<ValueFacts> = {}) =>
  judgedBy(withinScope, valueFacts({ scope, ...changes }));
const suspended = (validFrom: string, validTo: string): ScopeLineFacts => ({
  ...SCOPE_LINE,
  state: 'suspended',
  validFrom,
  validTo,
  recordedAt: `${validFrom}T12:00:00.000000Z`,
});

it('holds inside the scope, ends of the range included', () => {
  expect(judge([SCOPE_LINE]).outcome).toBe('holds');
  expect(judge([{ ...SCOPE_LINE, nominalTo: '1000' }]).outcome).toBe('holds');
});

it('fails outside the range, or on a day on which the scope was suspended, and names the day', () => {
  const beyond = judge([{ ...SCOPE_LINE, nominalTo: '500' }]);
  expect(beyond).toMatchObject({ outcome: 'fails', severity: 'critical' });
  expect(beyond.text).toContain('conventional mass at 1\u2009000\u2009g on 2025-03-09');
  expect(judge([SCOPE_LINE, suspended('2025-03-12', '2025-06-30')]).text).toContain('on 2025-03-14');
  expect(judge([SCOPE_LINE], { nominal: '0.5' }).text).toContain('500\u2009mg');
});

it('raises no alarm for a scope that was suspended and restored before', () => {
  expect(judge([SCOPE_LINE, suspended('2024-01-01', '2024-06-30')]).outcome).toBe('holds');
});

it('judges the conduct: a suspension entered afterwards over what was known does not reach back', () => {
  const later = { ...suspended('2025-03-01', '2025-06-30'), recordedAt: '2025-09-01T00:00:00.000000Z' };
  expect(judge([SCOPE_LINE, later]).outcome).toBe('holds');
});

it('cannot be judged without any scope on record, or where a year does not decide', () => {
  expect(judge([]).sentence).toBe('no scope');
  const coarse = judge([{ ...SCOPE_LINE, validFrom: '2025-02-01' }], { datePrecision: 'year' });
  expect(coarse).toMatchObject({ outcome: 'cannot be judged', sentence: 'undecided' });
});

it('does not apply where accreditation is not claimed', () => {
  expect(judge([], { underAccreditation: false }).outcome).toBe('does not apply');
});
