import { createHash } from 'node:crypto';
import type { AuditCount } from '#shared/contracts/audits.ts';
import { canonicalJson } from '#shared/canonical-json.ts';
import type { AuditQuestion } from './audit-question.ts';
import type { FindingRow } from './audits.model.ts';

/** What stands at the head of a result: the question, and by what it was answered. */
export interface ResultHead extends AuditQuestion {
  ruleSet: string;
  engine: string;
}

/** What stands at its foot. */
export interface ResultFoot {
  chains: number;
  values: number;
  links: number;
  counts: AuditCount[];
}

/**
 * SHA-256 of an audit's canonical result, line by line: head, findings in their order, foot. Neither who asked nor
 * when counts, nor the number of the run: a repeated audit that finds the same gives the same digest.
 */
export class ResultDigest {
  readonly #hash = createHash('sha256');

  constructor({ scope, valueUid, laboratoryId, day, known, asOf, asOfAct, ruleSet, engine }: ResultHead) {
    this.#line({ scope, valueUid, laboratoryId, day, known, asOf, asOfAct, ruleSet, engine });
  }

  finding({ run_id: _run, facts_n: _facts, parameters, ...row }: FindingRow): void {
    this.#line({ ...row, parameters: JSON.parse(parameters) as unknown });
  }

  /** The digest, once all findings are in. */
  end({ chains, values, links, counts }: ResultFoot): string {
    this.#line({ chains, values, links, counts });
    return this.#hash.digest('hex');
  }

  #line(content: unknown): void {
    this.#hash.update(canonicalJson(content), 'utf8').update('\n');
  }
}
