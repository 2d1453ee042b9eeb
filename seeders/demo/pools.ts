import type { Weight } from './weight.ts';

/** The working standards of the laboratories: what others are calibrated against. */
export interface Pools {
  institute: Weight[];
  heavy: Weight[];
  /** By laboratory. */
  e1: Map<string, Weight[]>;
  e2: Map<string, Weight[]>;
  f1: Map<string, Weight[]>;
  f2: Map<string, Weight[]>;
}

/** Methods and kinds of quantity as the series share them; conventional mass comes first. */
export const SUBSTITUTION = 'Substitution weighing';
export const CONVENTIONAL = ['conventional mass'] as const;
export const BOTH = ['conventional mass', 'mass'] as const;
