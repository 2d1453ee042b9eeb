import { expect, it } from 'vitest';
import { csvHead, csvLine } from './findings-csv.ts';

const RULE = {
  id: 'B-14',
  title: 'Used in date',
  clause: '6.4.6',
  edition: 'An edition, 2017',
  severity: 'critical',
  scope: 'link',
  isLasting: false,
  sentences: { late: 'Used on {used}, "late".' },
} as const;
const value = {
  uid: 'u',
  registryNo: 'AB 0001',
  certificateNo: '=1+1',
  standardId: 's',
  revisionId: null,
  holderId: null,
};
const FINDING = {
  n: 0,
  rule: 'B-14',
  verdict: 'conduct',
  outcome: 'fails',
  severity: 'critical',
  subject: 'link',
  value,
  reference: { ...value, registryNo: 'AB 0002' },
  focusUid: 'u',
  laboratory: { id: 'l', code: 'L', name: 'Laboratory' },
  sentence: 'late',
  parameters: { used: '2025-01-01' },
} as const;

it('writes a finding as one line, quoted where it must be, and no formula', () => {
  const line = csvLine(FINDING, new Map([['B-14', RULE]]));
  expect(line).toBe(
    'B-14,Used in date,6.4.6,"An edition, 2017",at use,fails,critical,link,AB 0001,\'=1+1,AB 0002,\'=1+1,Laboratory,"Used on 2025-01-01, ""late""."\r\n',
  );
  expect(csvHead().split(',')).toHaveLength(14);
});

it('leaves the words out where they are not told, or the rule is not known', () => {
  expect(csvLine({ ...FINDING, sentence: null }, new Map([['B-14', RULE]]))).toMatch(/Laboratory,\r\n$/);
  expect(csvLine({ ...FINDING, rule: 'Z-99' }, new Map())).toMatch(/^Z-99,,,,at use/);
});
