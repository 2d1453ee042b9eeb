import { noticesInForce } from '#shared/notices/in-force.ts';
import type { ChainFacts } from '#shared/rules/facts.ts';
import { chainFacts, earlierThan } from './chain.service.ts';
import type { FactParts } from './chain-facts.ts';
import { chainNumbers } from './chain-numbers.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import { contributionsOf, originsByKey } from './contributions.ts';
import { noticesOfLinks } from './notice-facts.ts';
import { withNotices } from './noticed-closure.ts';
import { StepMemory } from './step-memory.ts';
import type { StoredValue } from './stored.ts';

/** Values that a memory of steps holds without forgetting one. */
const SURELY_KEPT = 2_000;

/** Several chains over one closure and one compiled network: what they share above is worked out once. */
export interface ChainBatch {
  /** In the order asked for. */
  focuses: StoredValue[];
  /** The values of one chain, each after all it leans on. */
  valuesOf(focus: StoredValue): StoredValue[];
  /** What the rules read of one chain, links as used. */
  factsOf(focus: StoredValue): ChainFacts;
}

/**
 * Makes several chains ready to be judged, of the question that `steps` is for. Nothing is looked up of acts that came
 * in since the store caught up: facts hold what was recorded by the question's knowledge only.
 */
export async function chainBatch(
  store: ChainStore,
  steps: StepMemory,
  focusIds: readonly number[],
): Promise<ChainBatch> {
  const { question } = steps;
  const closure = await store.closure(focusIds);
  const [standards, laboratories] = await Promise.all([
    store.standards(closure.values.map((value) => value.standardId)),
    store.laboratories(closure.values.flatMap((value) => [value.issuerId, value.holderId])),
  ]);
  const ids = closure.values.map((value) => value.id);
  // Steps known now may be forgotten before a wide batch comes to them: then they are assembled anew.
  const isWide = closure.values.length > SURELY_KEPT;
  const earlier = earlierThan(closure, isWide ? new StepMemory(question) : steps, standards);
  const widened = await store.closure([...ids, ...earlier]);
  const byId = new Map(widened.values.map((value) => [value.id, value]));
  const focuses = focusIds.map((id) => byId.get(id)!);
  const noticed = withNotices(widened, noticesInForce(store.notices, question.day, question.known));
  const numbers = chainNumbers(widened, focuses[0]!.uid, noticed);
  const origins = originsByKey(noticed);
  const parts: FactParts = {
    question,
    standards,
    laboratories,
    numbers,
    byId,
    sources: widened.sources,
    notices: store.notices,
    noticesOfLinks: noticesOfLinks(widened, store.notices, question.known),
  };
  return {
    focuses,
    valuesOf: (focus) => partAbove(byId, focus),
    factsOf: (focus) => {
      const values = partAbove(byId, focus);
      const part: Closure = { values, sources: noticed.sources, groups: noticed.groups };
      const contributions = contributionsOf(noticed, numbers.propagationOf(focus.uid), origins);
      return chainFacts({ closure: part, focus, parts, contributions, steps, numbers });
    },
  };
}

/** A value and all it leans on, parents before children: the order of a chain asked for by itself. */
function partAbove(byId: ReadonlyMap<number, StoredValue>, focus: StoredValue): StoredValue[] {
  const done = new Set<number>();
  const ordered: StoredValue[] = [];
  const visit = (value: StoredValue): void => {
    if (done.has(value.id)) return;
    done.add(value.id);
    for (const { parentId } of value.parents) visit(byId.get(parentId)!);
    ordered.push(value);
  };
  visit(focus);
  return ordered;
}
