import { createHash } from 'node:crypto';

/**
 * SHA-256 of everything the rules were given, a line of JSON each: members of a fact by name, rows within it as the
 * assembly writes them. A canonical spelling throughout would cost as much as the judging: a laboratory's scope alone is
 * spelled for each of its values.
 */
export class FactsDigest {
  readonly #hash = createHash('sha256');

  add(facts: object): void {
    for (const [name, member] of Object.entries(facts).sort(byName)) {
      if (member !== undefined) this.#hash.update(`${name}:${JSON.stringify(member)}\n`, 'utf8');
    }
    this.#hash.update('\n');
  }

  end(): string {
    return this.#hash.digest('hex');
  }
}

function byName([a]: [string, unknown], [b]: [string, unknown]): number {
  return a < b ? -1 : 1;
}
