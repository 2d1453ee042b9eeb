/**
 * @param {number} milliseconds
 * @returns {string} such as "0.3 s" or "2 min 05 s"
 */
export function duration(milliseconds) {
  const seconds = milliseconds / 1000;
  if (seconds < 59.95) return `${seconds.toFixed(1)} s`;
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, '0')} s`;
}

/**
 * @param {string} text one line for the person at the terminal
 * @returns {void}
 */
export function say(text) {
  process.stdout.write(`${text}\n`);
}

/**
 * Says what a long step does before it begins and how long it took after it ended. Two lines rather than one
 * that is rewritten: a log file must read like the terminal did.
 * @template T
 * @param {string} what begins with a verb in -ing
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function step(what, work) {
  const begin = performance.now();
  say(`- ${what} ...`);
  const result = await work();
  say(`  done in ${duration(performance.now() - begin)}`);
  return result;
}
