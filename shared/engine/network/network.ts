import { requireWhole } from '../quantity/domain.ts';

/**
 * A network of assigned values, as the callers write it. One unit throughout: uncertainties are standard
 * uncertainties, covariances are in the square of that unit, sensitivities bring a parent's unit to its child's.
 *
 * A value is `x_a = sum c_ap x_p + sum c_as s + d_a` (JCGM 102 6.2, linear model). `d_a` is its local part.
 */
export type Network = {
  values: NetworkValue[];
  /** Effects shared by several values: roots with value 0. */
  sources?: NetworkSource[];
  /** Correlated local parts of the values of one calibration; they replace the members' `local`. */
  groups?: NetworkGroup[];
  /** What a value leaned on. Two links between the same pair add. */
  links: NetworkLink[];
};

/** An assigned value. `local` is the standard uncertainty of its local part, null where it is not known. */
export type NetworkValue = {
  id: string;
  local: number | null;
  /** Degrees of freedom of the local part; left out = infinite. */
  degreesOfFreedom?: number;
  /** Name of the variance estimate behind the local part; equal names count once. */
  estimate?: string;
};

/** A shared effect: one volume determination, one barometer, one mass-scale version. */
export type NetworkSource = {
  id: string;
  standardUncertainty: number;
  degreesOfFreedom?: number;
  estimate?: string;
};

/** Local parts with a covariance, for example of one weighing design without its restraint. */
export type NetworkGroup = {
  members: string[];
  covariance: number[][];
  degreesOfFreedom?: number;
  estimate?: string;
};

/**
 * A child leaned on a parent. With `classLimit` the child used the parent's nominal value: what flows is then the
 * limit's own standard uncertainty, independent of the parent's value, and a shift of the parent stops there.
 */
export type NetworkLink = {
  child: string;
  parent: string;
  sensitivity: number;
  classLimit?: { standardUncertainty: number };
};

/**
 * The key under which a group's variance appears among the contributions: `group:` and its place in the list.
 * @throws EngineError `not-whole` or `out-of-range`
 */
export function groupKey(index: number): string {
  return `group:${requireWhole(index, 'index', { min: 0 })}`;
}
