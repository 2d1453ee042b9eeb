import type { Context } from '#server/http/context.ts';
import { publishNotice } from '#server/modules/notices/index.ts';
import { INSTITUTE } from './laboratories.ts';
import { CONSENSUS, REALIZED } from './scales.ts';
import type { Admitted } from './seed-network.ts';

type NoticeInput = Parameters<typeof publishNotice>[1];
interface PlannedNotice {
  /** Made known, and recorded, on this day. */
  day: string;
  from: string;
  notice: Omit<
    NoticeInput,
    'issuerId' | 'fromScaleId' | 'toScaleId' | 'threshold' | 'replacesId' | 'madeKnownOn'
  >;
}

const EVERY_VALUE = {
  quantity: null,
  performedFrom: null,
  performedTo: null,
  nominalFrom: null,
  nominalTo: null,
} as const;

/**
 * The notices of the network, of our invention: one adds an uncertainty to values that rest on the first realization
 * run and leaves them as they are; one leads to the next consensus value, and is not in force yet. Both take effect
 * after the last weighing, so that nobody has left one out.
 */
export const NOTICES: readonly PlannedNotice[] = [
  {
    day: '2026-11-02',
    from: REALIZED,
    notice: {
      number: 'OI-N 1',
      kind: 'uncertainty added',
      title: 'Uncertainty of the first realization run',
      reason:
        'A second look at the moving-coil balance of 2016 found that the alignment had been known less well than assumed. Values stay as they are; certificates are not issued again.',
      newScale: null,
      effectiveOn: '2026-11-16',
      terms: [
        {
          ...EVERY_VALUE,
          // The second run begins to be disseminated after this day.
          performedTo: '2019-06-13',
          shiftPerKilogram: [{ on: '2016-09-05', shift: '0' }],
          addedUPerKilogram: 0.000006,
        },
      ],
    },
  },
  {
    day: '2026-11-16',
    from: CONSENSUS,
    notice: {
      number: 'OI-N 2',
      kind: 'consensus value',
      title: 'Step to the second consensus value',
      reason: 'A second comparison of realizations moved the agreed value of the kilogram.',
      newScale: {
        name: 'Consensus value 2027',
        basis: 'Value of the kilogram agreed from a second comparison of realizations',
        validFrom: '2027-01-01',
      },
      effectiveOn: '2027-01-01',
      terms: [
        {
          ...EVERY_VALUE,
          shiftPerKilogram: [{ on: '2021-03-01', shift: '-0.000005' }],
          addedUPerKilogram: 0,
        },
      ],
    },
  },
];

/** Publishes them in the institute's name, each on its day. */
export async function publishNotices(
  context: Context,
  admitted: Admitted,
  turnTo: (day: string) => void,
): Promise<void> {
  const user = admitted.signatories.get(INSTITUTE) ?? null;
  for (const { day, from, notice } of NOTICES) {
    turnTo(day);
    await publishNotice(
      { ...context, user },
      {
        ...notice,
        issuerId: admitted.laboratoryIds.get(INSTITUTE)!,
        fromScaleId: admitted.scaleIds.get(from)!,
        toScaleId: null,
        threshold: null,
        replacesId: null,
        madeKnownOn: day,
      },
    );
  }
}
