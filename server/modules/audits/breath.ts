import { setImmediate as nextTurn } from 'node:timers/promises';

/** Longest stretch of work before requests get their turn, ms. */
const STRETCH = 15;

/** Long work in the server's own thread: between its parts, requests that wait get their turn. */
export class Breath {
  #since = performance.now();

  async taken(): Promise<void> {
    if (performance.now() - this.#since < STRETCH) return;
    await nextTurn();
    this.#since = performance.now();
  }
}
