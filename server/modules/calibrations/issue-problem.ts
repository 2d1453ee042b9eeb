import type { FieldProblem } from '#shared/errors.ts';

/** A rule of the domain that the calibration breaks, at a path of the input. */
export type IssueProblem = FieldProblem & { field: string };
