import type { Sequelize } from 'sequelize';
import { canonicalJson } from '#shared/canonical-json.ts';
import { ENGINE_VERSION } from '#shared/engine/version.ts';
import { groupBy } from '#shared/group-by.ts';
import type { ChainFacts, LinkFacts, ValueFacts } from '#shared/rules/facts.ts';
import { judgeWhole, type Check } from '#shared/rules/judge.ts';
import { RULE_SET_VERSION } from '#shared/rules/rule-set.ts';
import { chainBatch, ChainStore, StepMemory, type StoredValue } from '#server/modules/chains/index.ts';
import type { AuditQuestion } from './audit-question.ts';
import { AuditTally } from './audit-tally.ts';
import type { FindingRow } from './audits.model.ts';
import { Breath } from './breath.ts';
import { FactsDigest } from './facts-digest.ts';
import { focusCount, focusIds } from './focus-values.queries.ts';
import { PackedList } from './packed-list.ts';
import { ResultDigest, type ResultFoot } from './result-digest.ts';
import { SeenIds } from './seen-ids.ts';

/** Chains over one compiled network. */
const BATCH = 32;
/**
 * Findings that cannot be judged and are kept; further ones are counted only. A laboratory's are some ten thousand; of a
 * million values they would fill the memory. What fails is always kept.
 */
const MOST_NOT_JUDGED = 100_000;
/** Subjects whose facts are packed together: they are alike, and shrink to a tenth. */
export const FACTS_PER_BLOCK = 100;

/** What an audit found, before it is stored. */
export interface PerformedAudit extends ResultFoot {
  ruleSet: string;
  engine: string;
  findings: PackedList<Finding>;
  facts: PackedList<unknown>;
  resultSha256: string;
  /** Of every fact the rules were given, not only of those that are kept. */
  factsSha256: string;
}

/** A finding before it belongs to a run. */
export type Finding = Omit<FindingRow, 'run_id'>;

/**
 * Judges every step of the chains asked about once, and every chain as a whole. What fails or cannot be judged is kept
 * with the facts the rule saw; the rest is counted.
 * @param onProgress told after each batch; false ends the work
 * @param signal ends the work between two chains
 * @returns null where it was ended
 */
export async function performAudit(
  database: Sequelize,
  question: AuditQuestion,
  onProgress: (done: number, total: number) => Promise<boolean>,
  signal?: AbortSignal,
): Promise<PerformedAudit | null> {
  const total = await focusCount(database, question);
  const audit = new Audit(question);
  const breath = new Breath();
  const { store, steps } = await ownMemory(database, question);
  let done = 0;
  if (signal?.aborted || !(await onProgress(0, total))) return null;
  for await (const ids of focusIds(database, question)) {
    for (let from = 0; from < ids.length; from += BATCH) {
      const batch = await chainBatch(store, steps, ids.slice(from, from + BATCH));
      for (const focus of batch.focuses) {
        audit.chain(focus, batch.valuesOf(focus), batch.factsOf(focus), steps);
        await breath.taken();
        if (signal?.aborted) return null;
      }
      done += batch.focuses.length;
      if (!(await onProgress(done, total))) return null;
    }
  }
  return audit.end(done);
}

/** A memory of the audit's own: what it walks over does not push out what visitors ask about. */
async function ownMemory(database: Sequelize, question: AuditQuestion) {
  const store = new ChainStore(database);
  await store.catchUp();
  const { day, asOf } = question;
  return { store, steps: new StepMemory({ day, known: asOf, programmeEndedAfterUse: 'said' }) };
}

/** Where a finding belongs. */
type Place = Pick<Finding, 'subject' | 'value_uid' | 'parent_uid' | 'focus_uid' | 'laboratory_id'>;

class Audit {
  readonly #tally = new AuditTally();
  readonly #judged = new SeenIds();
  readonly #findings = new PackedList<Finding>(1_000);
  readonly #facts = new PackedList<unknown>(FACTS_PER_BLOCK);
  readonly #seenFacts = new FactsDigest();
  readonly #digest: ResultDigest;
  #values = 0;
  #links = 0;
  #notJudged = 0;

  constructor(question: AuditQuestion) {
    this.#digest = new ResultDigest({ ...question, ruleSet: RULE_SET_VERSION, engine: ENGINE_VERSION });
  }

  chain(focus: StoredValue, values: readonly StoredValue[], facts: ChainFacts, steps: StepMemory): void {
    const linksOf = groupBy(facts.links, (link) => link.child.uid);
    facts.values.forEach((value, index) => {
      if (!this.#judged.add(values[index]!.id)) return;
      this.#value(focus, value, steps);
      for (const link of linksOf.get(value.uid) ?? []) this.#link(focus, link, steps);
    });
    this.#seenFacts.add(chainDigested(facts));
    const place = {
      subject: 'chain',
      value_uid: focus.uid,
      parent_uid: null,
      focus_uid: focus.uid,
      laboratory_id: focus.holderId,
    } as const;
    this.#keep(judgeWhole(facts), place, () => chainSeen(facts));
  }

  end(chains: number): PerformedAudit {
    const counts = this.#tally.counts();
    const foot = { chains, values: this.#values, links: this.#links, counts };
    return {
      ...foot,
      ruleSet: RULE_SET_VERSION,
      engine: ENGINE_VERSION,
      findings: this.#findings,
      facts: this.#facts,
      resultSha256: this.#digest.end(foot),
      factsSha256: this.#seenFacts.end(),
    };
  }

  #value(focus: StoredValue, facts: ValueFacts, steps: StepMemory): void {
    this.#values += 1;
    this.#seenFacts.add(facts);
    const place = {
      subject: 'value',
      value_uid: facts.uid,
      parent_uid: null,
      focus_uid: focus.uid,
      laboratory_id: facts.issuer.id,
    } as const;
    this.#keep(steps.judgeValue(facts), place, () => facts);
  }

  /** A link that only informs is not judged: nothing flows through it. */
  #link(focus: StoredValue, facts: LinkFacts, steps: StepMemory): void {
    if (facts.role !== 'reference') return;
    this.#links += 1;
    this.#seenFacts.add({ ...facts, child: facts.child.uid, parent: facts.parent.uid });
    const place = {
      subject: 'link',
      value_uid: facts.child.uid,
      parent_uid: facts.parent.uid,
      focus_uid: focus.uid,
      laboratory_id: facts.child.issuer.id,
    } as const;
    this.#keep(steps.judgeLink(facts), place, () => facts);
  }

  #isKept(outcome: Check['outcome']): outcome is Finding['outcome'] {
    if (outcome === 'fails') return true;
    if (outcome !== 'cannot be judged' || this.#notJudged === MOST_NOT_JUDGED) return false;
    this.#notJudged += 1;
    return true;
  }

  #keep(checks: readonly Check[], place: Place, facts: () => unknown): void {
    let factsN: number | null = null;
    for (const check of checks) {
      this.#tally.add(check);
      const { rule, verdict, outcome, severity, parameters } = check;
      if (!this.#isKept(outcome)) continue;
      factsN ??= this.#facts.add(facts());
      const finding: Finding = {
        ...place,
        n: this.#findings.length,
        rule,
        verdict,
        outcome,
        severity,
        sentence: check.sentence!,
        parameters: canonicalJson(parameters),
        facts_n: factsN,
      };
      this.#findings.add(finding);
      this.#digest.finding({ run_id: '', ...finding });
    }
  }
}

/** What a chain's facts hold beside its steps, which are digested by themselves. */
function chainDigested({ question: _question, values, links, ...whole }: ChainFacts): object {
  return { ...whole, values: values.map((value) => value.uid).join(' '), links: links.length };
}

/** A chain's facts with its steps by name: what those hold is told with them. */
function chainSeen(facts: ChainFacts): unknown {
  return {
    ...facts,
    values: facts.values.map((value) => value.uid),
    links: facts.links.map((link) => `${link.child.uid} ${link.parent.uid}`),
  };
}
