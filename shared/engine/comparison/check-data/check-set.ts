/** A set of results with what independent programs make of it. `expanded` is U at k = 2. */
export type CheckSet = {
  id: string;
  source: string;
  values: number[];
  uncertainties: number[];
  covariance?: number[][];
  weightedMean: {
    value: number;
    u: number;
    chiSquared: number;
    degreesOfFreedom: number;
    pValue: number;
    critical: number;
    birgeRatio: number;
    birgeLimits: number[];
    coefficients: number[];
  };
  degrees: { difference: number[]; expanded: number[]; en: number[] };
  arithmetic: { value: number; uScatter: number; uPropagated: number };
  median: { value: number; mad: number; u: number };
  derSimonianLaird: RandomEffects;
  pauleMandel: RandomEffects;
  subset: {
    members: number[];
    value: number;
    u: number;
    chiSquared: number;
    count: number;
    runnerUp: number | null;
    difference: number[];
    expanded: number[];
  };
  /** First place, second place, difference, U. */
  pairs?: number[][];
};

type RandomEffects = { tau2: number; value: number; u: number; withTau: number[]; withoutTau: number[] };
