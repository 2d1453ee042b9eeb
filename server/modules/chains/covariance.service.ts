import type { z } from 'zod';
import type { CovarianceResponse } from '#shared/contracts/chains.ts';
import { chainNumbers } from './chain-numbers.ts';
import type { ChainStore } from './chain-store.ts';
import { closureOn } from './noticed-closure.ts';

/** Covariance (g2) and correlation of two values on a day, notices in force included; null members where an unknown part stands in the way. */
export async function covarianceOf(
  store: ChainStore,
  one: { id: number; uid: string },
  other: { id: number; uid: string },
  day: string,
): Promise<z.infer<typeof CovarianceResponse>> {
  await store.catchUp();
  const numbers = chainNumbers(await closureOn(store, [one.id, other.id], day), one.uid);
  const covariance = numbers.covariance(one.uid, other.uid);
  const variances = [numbers.variance(one.uid), numbers.variance(other.uid)] as const;
  const [a, b] = variances;
  const isComplete = covariance !== null && a !== null && b !== null && a > 0 && b > 0;
  return {
    covariance,
    correlation: isComplete ? covariance / Math.sqrt(a * b) : null,
    standardUncertainties: [a === null ? null : Math.sqrt(a), b === null ? null : Math.sqrt(b)],
  };
}
