/**
 * Every code an `EngineError` may carry. They are stable: a caller may test against them and a message may be
 * translated by them, so a code is never renamed or given another meaning. A code that is not listed does not compile.
 */
export const ENGINE_ERROR_CODES = [
  // numbers and words
  'not-finite',
  'out-of-range',
  'not-whole',
  'unknown-choice',
  'not-a-date',
  'backwards',
  // lists and matrices
  'too-few-values',
  'size-mismatch',
  'not-rectangular',
  'not-square',
  'not-symmetric',
  'not-positive-semidefinite',
  'not-positive-definite',
  'singular',
  // what people type
  'empty',
  'too-long',
  'not-a-number',
  'mixed-separators',
  'repeated-separator',
  'ambiguous-comma',
  'irregular-grouping',
  'too-many-digits',
  'unknown-unit',
  'missing-unit',
  'repeated-unit',
  'unit-mismatch',
  'unreadable-brackets',
  'unreadable-uncertainty',
  'repeated-uncertainty',
  // air, conformity and uncertainty
  'uncertainty-below-volume-part',
  'missing-limit',
  'empty-acceptance',
  'missing-coverage-factor',
  'needless-coverage-factor',
  'conflicting-degrees-of-freedom',
  'model-not-finite',
  // weighing and realization
  'incomplete-cycle',
  'no-response',
  'no-restraint',
  'two-restraints',
  'dependent-restraints',
  'not-determined',
  'two-variances',
  'no-within-standard-deviation',
  'fractions-not-one',
  // time
  'one-date',
  'one-abscissa',
  'no-scatter',
  'crosses-epoch',
  'overlapping-interventions',
  // the network
  'circle',
  'unknown-node',
  'unknown-local',
  'not-a-value',
  'duplicate-id',
  'reserved-id',
  'source-as-child',
  'member-twice',
  'replaced-twice',
  'replaced-in-a-circle',
  'withdrawn-and-replaced',
  // comparisons
  'missing-uncertainties',
  'missing-common-uncertainty',
  'no-visit',
  'not-bracketed',
  'no-link',
] as const;

/** Code of an `EngineError`. */
export type EngineErrorCode = (typeof ENGINE_ERROR_CODES)[number];

/**
 * What every engine function throws for an argument outside its domain. The message always says the field, what was
 * received and what is expected: `temperature: received 12. At least 15 and at most 27 degC are expected.`
 */
export class EngineError extends Error {
  readonly code: EngineErrorCode;
  /** Path of the offending argument, so that a form can show the message beside it. */
  readonly field: string;
  /** What is expected, or the way out, without the field and what was received. */
  readonly expected: string;

  /**
   * @param code stable identifier
   * @param field path of the offending argument, for example `relativeHumidity` or `links[3].child`
   * @param received the value, or a few words for what cannot be printed as one
   * @param expected whole sentences: what is expected, and the way out where it is not plain
   */
  constructor(code: EngineErrorCode, field: string, received: unknown, expected: string) {
    super(`${field}: received ${String(received)}. ${expected}`);
    this.name = 'EngineError';
    this.code = code;
    this.field = field;
    this.expected = expected;
  }
}
