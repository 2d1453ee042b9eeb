import { z } from 'zod';
import { Day, DecimalString, Id, WeightClass } from './common.ts';

/** How wrong an ancestor may be before the focus leaves its class. Grams; null: without limit. */
export const AncestorDistance = z.object({
  uid: Id,
  registryNo: z.string(),
  nominal: DecimalString,
  /** Change of the focus per change of the ancestor. */
  sensitivity: z.number(),
  upwards: z.number().nullable(),
  downwards: z.number().nullable(),
  /** The smaller of the two, rounded down to two digits: "0.21 mg"; null: without limit. */
  text: z.string().nullable(),
});

/** How fast a weight changes, grams per year. */
const Drift = z.object({
  perYear: z.number(),
  u: z.number(),
  /** A line through its calibrations of one epoch, or the rate that its laboratory declares. */
  from: z.enum(['calibrations', 'declared rate']),
  calibrations: z.number().int(),
});

/** GET /api/chains/:valueUid/distance */
export const DistanceResponse = z.object({
  focusUid: Id,
  registryNo: z.string(),
  class: WeightClass.nullable(),
  /** Why no distance is given; null where it is. */
  because: z.string().nullable(),
  /** The rule applied, in words. */
  rule: z.string().nullable(),
  /** How far the focus itself may move, grams: the largest |deviation| accepted less the present one; below 0: beyond it already. */
  room: z.number().nullable(),
  ancestors: z.array(AncestorDistance),
  /** What the focus can still carry as a reference. */
  reach: z.object({
    /** The smallest U (k = 2) of a weight of the same nominal calibrated from it, grams; null without u. */
    bestExpandedU: z.number().nullable(),
    bestText: z.string().nullable(),
    /** Classes with U <= MPE/3 at this nominal, finest first. */
    classes: z.array(WeightClass),
    /** How it is known to drift; null where it is not. */
    drift: Drift.nullable(),
    /** Why no drift is known; null where it is. */
    driftBecause: z.string().nullable(),
    /**
     * U at best on the day of asking, used at its certificate's value; grams, null without u or drift. And, for each
     * class reachable when it was calibrated, the last day on which it can still be reached; null: more than 50 years.
     */
    expandedUToday: z.number().nullable(),
    textToday: z.string().nullable(),
    until: z.array(z.object({ class: WeightClass, last: Day.nullable(), isPast: z.boolean() })),
    /** What stands against relying on it, in sentences: a certificate above it withdrawn, a value that its drift counts doubted. */
    reserves: z.array(z.string()),
  }),
});
export type DistanceResponse = z.infer<typeof DistanceResponse>;
