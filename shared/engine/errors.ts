/**
 * What every engine function throws for an argument outside its domain. `code` is stable and may be tested
 * against; `field` names the offending argument by its path, so that a form can show the message beside it.
 */
export class EngineError extends Error {
  readonly code: string;
  readonly field: string;

  /**
   * @param code stable identifier in kebab case, for example `out-of-range`
   * @param field path of the offending argument, for example `relativeHumidity`
   * @param message a sentence with the value received and what is expected
   */
  constructor(code: string, field: string, message: string) {
    super(message);
    this.name = 'EngineError';
    this.code = code;
    this.field = field;
  }
}
