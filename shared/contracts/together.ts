import { z } from 'zod';
import { DecimalString, Deviation, Id, QuantityKind, WeightClass } from './common.ts';

/** POST /api/chains/together: weights on one pan (+1), or on the other (-1). */
export const TogetherInput = z
  .strictObject({
    valueUids: z
      .array(Id)
      .min(2, 'Name two values at least')
      .max(20)
      .refine((uids) => new Set(uids).size === uids.length, 'Expected each value once'),
    /** One for each value; all +1 when left out. */
    signs: z.array(z.union([z.literal(1), z.literal(-1)])).optional(),
  })
  .refine(({ valueUids, signs }) => !signs || signs.length === valueUids.length, {
    path: ['signs'],
    error: 'Expected one sign for each value',
  });
export type TogetherInput = z.infer<typeof TogetherInput>;

const CombinedU = z.object({
  /** With every covariance known here; null where an undeclared one, or an unknown u, stands in the way. Grams. */
  u: z.number().nullable(),
  /** Undeclared covariances at their largest, the known ones as they are; null without the u of each. */
  bound: z.number().nullable(),
  /** Every correlation at its largest: the sum of the standard uncertainties. */
  linear: z.number().nullable(),
  /** The masses so added, grams, exact; null where they may not be added. */
  total: DecimalString.nullable(),
});

export const TogetherResponse = z.object({
  valueUids: z.array(Id),
  signs: z.array(z.number().int()),
  /** What each is, as a traceability statement would show it. */
  weights: z.array(
    z.object({
      registryNo: z.string(),
      marking: z.string(),
      nominal: DecimalString,
      class: WeightClass.nullable(),
      quantity: QuantityKind,
      deviation: Deviation,
      expandedU: DecimalString.nullable(),
      k: DecimalString.nullable(),
      certificateNo: z.string(),
    }),
  ),
  /** Why they may not be added; null where they may. */
  notAdded: z.string().nullable(),
  /** Standard uncertainty of each, grams: as computed now, else as stated; null where neither is known. */
  standardUncertainties: z.array(z.number().nullable()),
  /** Grams squared; null where undeclared. */
  covariance: z.array(z.array(z.number().nullable())),
  correlation: z.array(z.array(z.number().nullable())),
  /** Pairs, by place, whose covariance is undeclared, and why. */
  undeclared: z.array(z.object({ pair: z.tuple([z.number().int(), z.number().int()]), because: z.string() })),
  /** All added. */
  sum: CombinedU,
  /** With the signs asked for: a difference where one is -1. */
  signed: CombinedU,
  /** What two or more of them share, with the places of those that do. */
  shared: z.array(
    z.object({
      uid: Id,
      type: z.enum(['value', 'source']),
      label: z.string(),
      places: z.array(z.number().int()),
    }),
  ),
});
export type TogetherResponse = z.infer<typeof TogetherResponse>;
