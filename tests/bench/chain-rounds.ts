/** Milliseconds of one request after another, sorted. */
export interface Round {
  chain: number[];
  baseline: number[];
  bytes: number[];
}

/** A route that asks the database for one row through the same session and middleware, and answers nothing else. */
const BASELINE = '/api/health/session';

/**
 * Asks for each value's chain as the screen does and, before each, the baseline: what slows the machine meanwhile
 * slows both.
 * @param uids values, each asked once
 */
export async function chainRound(ask: Ask, uids: readonly string[]): Promise<Round> {
  const round: Round = { chain: [], baseline: [], bytes: [] };
  for (const uid of uids) {
    round.baseline.push((await ask(BASELINE)).milliseconds);
    const { milliseconds, bytes } = await ask(`/api/chains/${uid}?checks=packed`);
    round.chain.push(milliseconds);
    round.bytes.push(bytes);
  }
  return {
    chain: round.chain.toSorted(ascending),
    baseline: round.baseline.toSorted(ascending),
    bytes: round.bytes.toSorted(ascending),
  };
}

export type Ask = (path: string) => Promise<{ milliseconds: number; bytes: number }>;

/** Requests of one signed-in person over kept connections; the whole reply is read. */
export function asker(baseUrl: string, cookie: string): Ask {
  return async (path) => {
    const start = performance.now();
    const reply = await fetch(baseUrl + path, { headers: { cookie } });
    const body = await reply.arrayBuffer();
    const milliseconds = performance.now() - start;
    if (!reply.ok) throw new Error(`${path} gave ${reply.status}: ${Buffer.from(body).toString('utf8')}`);
    return { milliseconds, bytes: body.byteLength };
  };
}

/** The value below which this fraction of sorted numbers lies. */
export function quantile(sorted: readonly number[], fraction: number): number {
  return sorted[Math.min(sorted.length - 1, Math.ceil(sorted.length * fraction) - 1)] ?? NaN;
}

/** One line: median and p95 of both, and their ratios. */
export function roundInWords(name: string, { chain, baseline, bytes }: Round): string {
  const figures = [0.5, 0.95].map((fraction) => {
    const [a, b] = [quantile(chain, fraction), quantile(baseline, fraction)];
    return `${a.toFixed(1).padStart(8)} ms ${b.toFixed(1).padStart(9)} ms ${(a / b).toFixed(2).padStart(7)}`;
  });
  return `${name.padEnd(24)}${figures.join('   ')}   ${(quantile(bytes, 0.5) / 1000).toFixed(0)} kB`;
}

/** Heads of the columns of `roundInWords`. */
export const ROUND_HEAD = `${''.padEnd(24)}   chain median, select 1, ratio    chain p95, select 1, ratio   reply`;

function ascending(a: number, b: number): number {
  return a - b;
}
