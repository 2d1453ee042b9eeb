import { reissue } from './certificate.ts';
import { daysAfter, monthsAfter } from './days.ts';
import { addPair, INTERVAL, referenceValue, type Cast, type Telling } from './story-cast.ts';

const LATE = { is: 'fault', kind: 'late use', rule: 'B-14', verdict: 'conduct' } as const;

/** Used three weeks after the laboratory's own programme called for a new calibration. */
export function lateUse(cast: Cast, telling: Telling): void {
  const { at } = telling;
  addPair(cast, telling, {
    references: [at, monthsAfter(at, 14), monthsAfter(at, 25)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0, omits: 'drift' },
      { begin: daysAfter(monthsAfter(at, INTERVAL), 20), uses: 0, is: LATE },
      { begin: monthsAfter(at, 15), uses: 1, omits: 'degrees of freedom' },
    ],
  });
}

/** Begun in date and ended after it. */
export function ranOver(cast: Cast, telling: Telling): void {
  const { at } = telling;
  addPair(cast, telling, {
    references: [at, monthsAfter(at, 14)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      { begin: daysAfter(monthsAfter(at, INTERVAL), -4), days: 8, uses: 0, is: LATE },
    ],
  });
}

/** A newer value had been issued weeks before, and the older one was used. */
export function olderValue(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const kind = 'older value, though a newer was known';
  addPair(cast, telling, {
    references: [at, monthsAfter(at, 9)],
    work: [
      { begin: monthsAfter(at, 2), uses: 0 },
      {
        begin: daysAfter(monthsAfter(at, 9), 30),
        uses: 0,
        is: { is: 'fault', kind, rule: 'B-81', verdict: 'conduct' },
      },
      { begin: monthsAfter(at, 12), uses: 1 },
    ],
  });
}

/** What looks like a fault and is none: the last day in date, the day a newer certificate came, words corrected. */
export function nearMisses(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const due = monthsAfter(at, INTERVAL);
  const conduct = { is: 'look-alike', verdict: 'conduct' } as const;
  const { reference } = addPair(cast, telling, {
    // The second calibration ends two days before the first is due and is issued on the very day.
    references: [at, daysAfter(due, -2)],
    work: [
      { begin: monthsAfter(at, 1), uses: 0 },
      {
        begin: monthsAfter(at, 4),
        uses: 'what stands',
        is: { ...conduct, kind: 'used after it was re-issued in words', rule: 'B-81' },
      },
      {
        begin: due,
        uses: 'what stands',
        is: { ...conduct, kind: 'used on the last day in date', rule: 'B-14' },
      },
      {
        begin: due,
        uses: 'what stands',
        is: { ...conduct, kind: 'used on the day the newer certificate was issued', rule: 'B-81' },
      },
      { begin: due, uses: 1 },
    ],
  });
  const day = monthsAfter(at, 3);
  cast.happenings.push({
    day,
    happen: () => {
      const { certificateNo } = referenceValue(cast, reference, 0);
      const reason = 'The address of the customer was corrected; value and U are the same.';
      reissue(cast.world, certificateNo, { day, reason });
    },
  });
}
