import type { AuditCount } from '#shared/contracts/audits.ts';
import type { Check } from '#shared/rules/judge.ts';

/** Counts checks by rule, verdict, outcome and severity; what holds or does not apply is kept as a count only. */
export class AuditTally {
  readonly #counts = new Map<string, AuditCount>();

  add({ rule, verdict, outcome, severity }: Check): void {
    const key = `${rule} ${verdict} ${outcome} ${severity}`;
    const known = this.#counts.get(key);
    if (known) known.count += 1;
    else this.#counts.set(key, { rule, verdict, outcome, severity, count: 1 });
  }

  /** In one order, whatever was met first. */
  counts(): AuditCount[] {
    return [...this.#counts.entries()].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, count]) => count);
  }
}
