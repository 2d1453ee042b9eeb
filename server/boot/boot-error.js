/**
 * A failure that a person can act on: the message says what is wrong and why, `next` what to do about it.
 * Anything else that is thrown is a defect and is shown with its stack.
 */
export class BootError extends Error {
  /**
   * @param {string} message
   * @param {string} [next]
   */
  constructor(message, next) {
    super(message);
    this.name = 'BootError';
    this.next = next;
  }
}

/**
 * @param {unknown} error
 * @returns {string} what a person needs: the message and the way out, or the stack of a defect
 */
export function errorText(error) {
  if (error instanceof BootError) return error.next ? `${error.message}\n${error.next}` : error.message;
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
