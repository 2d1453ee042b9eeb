import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { Decimal } from '#shared/decimal.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { isSignOdd } from '#shared/rules/odd-one-out.ts';
import { predictValue } from '#shared/engine/time/predict-value.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { today, type Context } from '#server/http/context.ts';
import { chainNumbers, storeOf, type Closure, type StoredValue } from '#server/modules/chains/index.ts';

/** How a weight drifts, or why that is not known. */
export type KnownDrift =
  | {
      drift: NonNullable<DistanceResponse['reach']['drift']>;
      because: null;
      /** Certificates whose value it counts although its sign does not fit the others. */
      doubted: string[];
    }
  | { drift: null; because: string; doubted: [] };

interface Point {
  id: number;
  uid: string;
  deviation: string;
  performedEnd: string;
  u: number | null;
}

/**
 * How fast the weight of a value changes: the rate that its laboratory declares as a source, else a line through the
 * calibrations of the same kind, in the same medium, within the same epoch, that stand today, with the covariance that
 * they have through what they share.
 */
export async function driftOf(context: Context, focus: StoredValue): Promise<KnownDrift> {
  const declared = await readRow<{ u: number }>(
    context.database,
    `SELECT u FROM source WHERE standard_id = :standardId AND kind = 'drift'
     ORDER BY determined_on DESC, id DESC LIMIT 1`,
    { standardId: focus.standardId },
  );
  if (declared) {
    return {
      drift: { perYear: 0, u: declared.u, from: 'declared rate', calibrations: 0 },
      because: null,
      doubted: [],
    };
  }
  const points = (await pointsOf(context, focus)).filter((point) => point.u !== null);
  const days = new Set(points.map((point) => point.performedEnd));
  if (days.size < 2) {
    return {
      drift: null,
      because: 'No drift known: its epoch holds fewer than two calibrations that stand.',
      doubted: [],
    };
  }
  const history = points.map(({ deviation, performedEnd, u }) => ({
    date: performedEnd,
    value: new Decimal(deviation).toNumber(),
    standardUncertainty: u!,
  }));
  try {
    const closure = await storeOf(context.database).closure(points.map((point) => point.id));
    const covariance = covarianceOf(closure, points);
    const fit = predictValue(history, focus.performedEnd, covariance ? { covariance } : {});
    const { slope, slopeUncertainty } = fit;
    const drift = {
      perYear: slope,
      u: slopeUncertainty,
      from: 'calibrations',
      calibrations: points.length,
    } as const;
    const counted = new Set(points.map((point) => point.id));
    const values = closure.values.filter((value) => counted.has(value.id));
    return { drift, because: null, doubted: doubtedOf(values) };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { drift: null, because: 'No drift known: its calibrations do not give a line.', doubted: [] };
  }
}

async function pointsOf(context: Context, focus: StoredValue): Promise<Point[]> {
  return readRows<Point>(
    context.database,
    `SELECT v.id, v.uid, v.deviation, v.performed_end AS performedEnd, v.u
     FROM assigned_value v JOIN epoch e ON e.id = v.epoch_id
     WHERE v.standard_id = :standardId AND v.quantity = :quantity AND v.medium = :medium AND e.n = :epochN
       AND NOT EXISTS (SELECT 1 FROM value_end x WHERE x.value_id = v.id AND x.kind = 'withdrawn'
                       AND x.effective_on <= :day)
       AND NOT EXISTS (SELECT 1 FROM value_end x WHERE x.value_id = v.id AND x.kind = 'superseded'
                       AND x.replaced_by IS NOT NULL AND x.effective_on <= :day)
     ORDER BY v.performed_end, v.id`,
    {
      standardId: focus.standardId,
      quantity: focus.quantity,
      medium: focus.medium,
      epochN: focus.epochN,
      day: today(context),
    },
  );
}

/** Certificates whose value is the odd one by its sign (B-17). */
function doubtedOf(values: readonly StoredValue[]): string[] {
  return values
    .filter((value) => {
      const others = values.filter(({ id }) => id !== value.id);
      const earlier = others.filter(({ performedEnd }) => performedEnd <= value.performedEnd);
      const later = others.filter(({ performedEnd }) => performedEnd > value.performedEnd);
      return isSignOdd(value, earlier, later);
    })
    .map(({ certificateNo }) => certificateNo);
}

/** Covariance of the calibrations through what they share; null where some of it is not known. */
function covarianceOf(closure: Closure, points: readonly Point[]): number[][] | null {
  const numbers = chainNumbers(closure, points[0]!.uid);
  const entries = points.map((one) =>
    points.map((other) =>
      one === other ? numbers.variance(one.uid) : numbers.covariance(one.uid, other.uid),
    ),
  );
  return entries.flat().includes(null) ? null : (entries as number[][]);
}
