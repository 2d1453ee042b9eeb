import type { LinkFacts, Question, ValueFacts } from '#shared/rules/facts.ts';
import { judgeLink, judgeValue, type Check } from '#shared/rules/judge.ts';
import { RecentMap } from './recent-map.ts';
import type { StoredLink, StoredValue } from './stored.ts';

/** Values whose facts and checks are kept unless told, with those of about two links each: some 30 kB a value. */
const MOST_VALUES = 1_500;

/**
 * Facts and checks of single values and links under one question, until the next act. What is true of a value does
 * not depend on which chain it is met in, and chains share their upper ends: a step met often is judged once.
 */
export class StepMemory {
  readonly question: Question;
  readonly #values: RecentMap<number, ValueFacts>;
  readonly #links: RecentMap<string, LinkFacts>;
  readonly #checks = new WeakMap<ValueFacts | LinkFacts, Check[]>();

  /** @param mostValues kept; steps unused for longest are forgotten */
  constructor(question: Question, mostValues = MOST_VALUES) {
    this.question = question;
    this.#values = new RecentMap(mostValues);
    this.#links = new RecentMap(2 * mostValues);
  }

  /** Values remembered. */
  get size(): number {
    return this.#values.size;
  }

  knows(value: StoredValue): boolean {
    return this.#values.has(value.id);
  }

  /** The value's facts, assembled where it is met for the first time. */
  value(value: StoredValue, assemble: () => ValueFacts): ValueFacts {
    return remembered(this.#values, value.id, assemble);
  }

  /** The link's facts, assembled where it is met for the first time. */
  link(child: StoredValue, link: StoredLink, assemble: () => LinkFacts): LinkFacts {
    return remembered(this.#links, `${child.id} ${link.parentId} ${link.role}`, assemble);
  }

  /** The checks of a value, judged once. */
  readonly judgeValue = (facts: ValueFacts): Check[] =>
    remembered(this.#checks, facts, () => judgeValue(facts, this.question));

  /** The checks of a link, judged once. */
  readonly judgeLink = (facts: LinkFacts): Check[] =>
    remembered(this.#checks, facts, () => judgeLink(facts, this.question));
}

function remembered<Key, Value>(
  memory: { get(key: Key): Value | undefined; set(key: Key, value: Value): unknown },
  key: Key,
  make: () => Value,
): Value {
  const known = memory.get(key);
  if (known !== undefined) return known;
  const made = make();
  memory.set(key, made);
  return made;
}
