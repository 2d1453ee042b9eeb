import type { Clock } from './context.ts';
import { AppError } from './app-error.ts';

/**
 * Counts failures by key in a sliding window, in the memory of one process: enough to make guessing a
 * password dull, and gone at a restart.
 */
export class FailureLimit {
  readonly #clock: Clock;
  readonly #maximum: number;
  readonly #windowMilliseconds: number;
  readonly #failures = new Map<string, number[]>();

  constructor(clock: Clock, maximum: number, windowMilliseconds: number) {
    this.#clock = clock;
    this.#maximum = maximum;
    this.#windowMilliseconds = windowMilliseconds;
  }

  /** @throws AppError `too-many-requests` with the number of minutes to wait */
  check(key: string): void {
    const recent = this.#recent(key);
    if (recent.length < this.#maximum) return;
    const wait = (recent[0] ?? 0) + this.#windowMilliseconds - this.#clock.now().getTime();
    const minutes = Math.max(1, Math.ceil(wait / 60_000));
    throw new AppError('too-many-requests', `Too many failed attempts. Try again in ${minutes} min.`);
  }

  /** Notes one failure. */
  note(key: string): void {
    if (this.#failures.size > 10_000) this.#failures.clear();
    this.#failures.set(key, [...this.#recent(key), this.#clock.now().getTime()]);
  }

  /** Takes the newest failure back: the attempt that was noted turned out well. */
  takeBack(key: string): void {
    this.#failures.set(key, this.#recent(key).slice(0, -1));
  }

  /** Forgets a key after success. */
  clear(key: string): void {
    this.#failures.delete(key);
  }

  #recent(key: string): number[] {
    const from = this.#clock.now().getTime() - this.#windowMilliseconds;
    return (this.#failures.get(key) ?? []).filter((time) => time > from);
  }
}
