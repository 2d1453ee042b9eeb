import { expect, it } from 'vitest';
import { intervalWithinReason } from './b-54-interval-within-reason.ts';
import { judgedBy, linkFacts } from './example-facts.ts';
import type { LinkFacts, OtherValueFacts, ProgrammeFacts } from './facts.ts';

const [usual] = linkFacts().programmes;
const judge = (programmes: Partial<ProgrammeFacts>[], changes: Partial<LinkFacts> = {}) =>
  judgedBy(
    intervalWithinReason,
    linkFacts({ programmes: programmes.map((row) => ({ ...usual!, ...row })), ...changes }),
  );
/** 24 months since 2020, 36 from 2024-03-01 on; the reference was calibrated on 2024-01-15. */
const lengthened = [
  { intervalMonths: 24 },
  { intervalMonths: 36, validFrom: '2024-03-01', recordedAt: '2024-03-01T08:00:00.000000Z' },
];
const earlier: OtherValueFacts = {
  uid: 'value-2022',
  certificateNo: 'IP-2022-004',
  revisionN: 1,
  performedBegin: '2022-01-10',
  performedEnd: '2022-01-12',
  issuedOn: '2022-01-15',
  datePrecision: 'day',
  sameEpoch: true,
  ends: [],
};

it('holds up to ten years, and where nothing was lengthened', () => {
  expect(judge([{ intervalMonths: 120 }]).outcome).toBe('holds');
  expect(judge(lengthened.map((row, at) => ({ ...row, intervalMonths: at === 0 ? 48 : 36 }))).sentence).toBe(
    'usual',
  );
});

it('fails beyond ten years without a reason', () => {
  const justification = 'Stated by the holder at registration.';
  const found = judge([{ intervalMonths: 132, justification }]);
  expect(found).toMatchObject({ outcome: 'fails', severity: 'minor' });
  expect(found.text).toContain('relies on it for 132 months, more than ten years, and gives no reason');
});

it('leaves a reason for more than ten years to people', () => {
  expect(judge([{ intervalMonths: 132 }])).toMatchObject({
    outcome: 'cannot be judged',
    sentence: 'long with reason',
  });
});

it('holds where it was lengthened after two calibrations of the epoch', () => {
  const found = judge(lengthened, { otherValues: [earlier] });
  expect(found).toMatchObject({ outcome: 'holds', sentence: 'lengthened' });
  expect(found.text).toContain('from 24 to 36 months after 2 calibrations on record');
});

it('cannot be judged where the register holds fewer', () => {
  expect(judge(lengthened)).toMatchObject({ outcome: 'cannot be judged', sentence: 'too early' });
  expect(judge(lengthened, { otherValues: [{ ...earlier, sameEpoch: false }] }).sentence).toBe('too early');
});

it('does not apply without a programme', () => {
  expect(judge([]).outcome).toBe('does not apply');
});
