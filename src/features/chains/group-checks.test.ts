import { expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { groupChecks, type Check } from './group-checks.ts';

const chain = {
  rules: [
    { id: 'B-19', severity: 'major' },
    { id: 'B-47', severity: 'information' },
  ],
} as unknown as ChainResponse;
const check = (outcome: Check['outcome'], severity: Check['severity'], rule = 'B-19'): Check => ({
  rule,
  subject: { type: 'chain' },
  verdict: 'today',
  outcome,
  severity,
  parameters: {},
  sentence: null,
});
const told = (checks: Check[]) => {
  const { loud, quiet } = groupChecks(chain, checks);
  return {
    loud: loud.map(({ outcome, severity }) => `${outcome}, ${severity}`),
    quiet: quiet.map(({ outcome, checks: group }) => `${group.length} ${outcome}`),
  };
};

it('shows what fails and what is open, the gravest first, then what holds with a note', () => {
  expect(
    told([
      check('holds', 'information'),
      check('cannot be judged', 'minor'),
      check('fails', 'minor'),
      check('cannot be judged', 'critical'),
      check('fails', 'block'),
    ]),
  ).toEqual({
    loud: [
      'fails, block',
      'fails, minor',
      'cannot be judged, critical',
      'cannot be judged, minor',
      'holds, information',
    ],
    quiet: [],
  });
});

it('keeps the rest behind counts', () => {
  const rest = [
    check('holds', 'major'),
    check('holds', 'information', 'B-47'),
    check('does not apply', 'major'),
    check('cannot be judged', 'information'),
  ];
  expect(told(rest)).toEqual({
    loud: [],
    quiet: ['2 holds', '1 cannot be judged', '1 does not apply'],
  });
});
