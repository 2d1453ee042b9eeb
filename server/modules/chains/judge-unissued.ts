import type { Check } from '#shared/rules/judge.ts';
import { judgeLink, judgeValue } from '#shared/rules/judge.ts';
import { endOfDay } from '#shared/state-at.ts';
import type { Question } from '#shared/rules/facts.ts';
import { today, type Context } from '#server/http/context.ts';
import { linkFacts, valueFacts, type FactParts } from './chain-facts.ts';
import { chainNumbers } from './chain-numbers.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import { storedSources } from './closure.queries.ts';
import { historyBefore } from './history.ts';
import { noticesOfLinks } from './notice-facts.ts';
import { storeOf } from './store-of.ts';
import type { StandardDossier, StoredValue } from './stored.ts';

/**
 * The checks that results would get if they were issued as they stand: the same rules over the same facts, with
 * the results laid on top of what the register holds. Nothing is stored.
 * @param values results of one calibration that is not issued; ids below zero, parents by the register's ids
 * @returns checks in the order of the values
 */
export async function judgeUnissued(context: Context, values: readonly StoredValue[]): Promise<Check[][]> {
  const [first] = values;
  if (!first) return [];
  const store = storeOf(context.database);
  await store.catchUp();
  const question: Question = {
    day: today(context),
    known: today(context),
    programmeEndedAfterUse: 'said',
  };
  const parts = await partsFor(context, store, question, values);
  // What lies above an earlier value is there for its variance only; its weights were not asked for.
  const judged = new Set(
    values.flatMap((value) => [value.id, ...value.parents.map((link) => link.parentId)]),
  );
  const facts = new Map(
    [...parts.byId.values()]
      .filter(({ id }) => judged.has(id))
      .map((value) => [value.id, valueFacts(value, parts)]),
  );
  return values.map((value) => {
    const own = facts.get(value.id)!;
    const links = value.parents
      .filter((link) => link.role === 'reference')
      .map((link) => linkFacts(own, facts.get(link.parentId)!, link, parts));
    return [...judgeValue(own, question), ...links.flatMap((link) => judgeLink(link, question))];
  });
}

async function partsFor(
  context: Context,
  store: ChainStore,
  question: Question,
  values: readonly StoredValue[],
): Promise<FactParts> {
  const parentIds = values.flatMap((value) => value.parents.map((link) => link.parentId));
  const above = await store.closure(parentIds);
  const involved = [...above.values, ...values];
  const known = await store.standards(involved.map((value) => value.standardId));
  const laboratories = await store.laboratories(
    involved.flatMap((value) => [value.issuerId, value.holderId, value.registeredById]),
  );
  const earlier = involved.flatMap((value) => {
    const before = historyBefore(known.get(value.standardId)!, value, endOfDay(question.known));
    return before ? [before.id] : [];
  });
  const widened = await store.closure([...parentIds, ...earlier]);
  const closure = await withValues(context, widened, values);
  return {
    question,
    laboratories,
    standards: withHistory(known, values),
    numbers: chainNumbers(closure, values[0]!.uid),
    byId: new Map(closure.values.map((value) => [value.id, value])),
    sources: closure.sources,
    notices: store.notices,
    noticesOfLinks: noticesOfLinks(closure, store.notices, question.known),
  };
}

async function withValues(
  context: Context,
  closure: Closure,
  values: readonly StoredValue[],
): Promise<Closure> {
  const wanted = new Set(values.flatMap((value) => value.sources.map((link) => link.sourceId)));
  const missing = [...wanted].filter((id) => !closure.sources.has(id));
  const sources = new Map(closure.sources);
  for (const source of await storedSources(context.database, missing)) sources.set(source.id, source);
  return { values: [...closure.values, ...values], sources, groups: closure.groups };
}

/** The dossiers with the results among their histories: both kinds of one weight on one sheet find each other. */
function withHistory(
  known: ReadonlyMap<string, StandardDossier>,
  values: readonly StoredValue[],
): Map<string, StandardDossier> {
  const standards = new Map(known);
  for (const value of values) {
    const dossier = standards.get(value.standardId)!;
    standards.set(value.standardId, { ...dossier, history: [...dossier.history, { ...value, ends: [] }] });
  }
  return standards;
}
