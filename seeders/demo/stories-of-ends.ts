import { reissue, withdraw, type Entry } from './certificate.ts';
import { monthsAfter } from './days.ts';
import { printed } from './printed.ts';
import type { Series } from './series.ts';
import { addPair, referenceValue, type Cast, type Telling } from './story-cast.ts';

const FAULT = { is: 'fault', rule: 'B-15' } as const;

/** The certificate had been corrected, and the old value was used all the same. */
export function supersededReference(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const { reference } = addPair(cast, telling, {
    references: [at, monthsAfter(at, 11)],
    work: [
      {
        begin: monthsAfter(at, 5),
        uses: 0,
        is: { ...FAULT, kind: 'superseded reference', verdict: 'conduct' },
      },
      { begin: monthsAfter(at, 7), uses: 'what stands' },
    ],
  });
  correctOn(cast, reference, monthsAfter(at, 3));
}

/** Rightly used; the certificate was corrected later. The conduct is sound, today's verdict is not. */
export function correctedAfterUse(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const { reference } = addPair(cast, telling, {
    references: [at, monthsAfter(at, 11)],
    work: [
      {
        begin: monthsAfter(at, 1),
        uses: 0,
        is: { ...FAULT, kind: 'reference corrected after use', verdict: 'today' },
      },
      { begin: monthsAfter(at, 12), uses: 1 },
    ],
  });
  correctOn(cast, reference, monthsAfter(at, 4));
}

/** Withdrawn two months before it was used. */
export function withdrawnReference(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const { reference } = addPair(cast, telling, {
    references: [at, monthsAfter(at, 8)],
    work: [
      {
        begin: monthsAfter(at, 6),
        uses: 0,
        is: { ...FAULT, kind: 'withdrawn reference', verdict: 'conduct' },
      },
      { begin: monthsAfter(at, 9), uses: 1, omits: 'signatory' },
    ],
  });
  withdrawOn(cast, reference, monthsAfter(at, 4), monthsAfter(at, 4));
}

/** Rightly used; withdrawn later from an earlier day on. The conduct stays sound, today's verdict does not. */
export function withdrawnAfterUse(cast: Cast, telling: Telling): void {
  const { at } = telling;
  const kind = 'reference withdrawn after use, from before it';
  const { reference } = addPair(cast, telling, {
    references: [at, monthsAfter(at, 10)],
    work: [
      { begin: monthsAfter(at, 5), uses: 0, is: { ...FAULT, kind, verdict: 'today' } },
      { begin: monthsAfter(at, 11), uses: 1, omits: 'decision rule' },
    ],
  });
  withdrawOn(cast, reference, monthsAfter(at, 7), monthsAfter(at, 2));
}

/** The first certificate of a reference had stated too small a U; a new revision states the larger one. */
function correctOn(cast: Cast, reference: Series, day: string): void {
  const correct = (entry: Entry): Entry => {
    const { deviation, printed: before } = entry.result;
    return { ...entry, result: { ...entry.result, printed: printed(deviation, 1.3 * before.expandedU) } };
  };
  cast.happenings.push({
    day,
    happen: () => {
      const { certificateNo } = referenceValue(cast, reference, 0);
      const reason = 'The uncertainty of the reference had been left out of U.';
      reissue(cast.world, certificateNo, { day, reason, correct });
    },
  });
}

function withdrawOn(cast: Cast, reference: Series, day: string, effectiveOn: string): void {
  cast.happenings.push({
    day,
    happen: () => {
      const { certificateNo } = referenceValue(cast, reference, 0);
      withdraw(cast.world, certificateNo, { day, reason: 'The balance had been out of order.', effectiveOn });
    },
  });
}
