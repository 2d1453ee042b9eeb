import type { ChainAs, ChainResponse } from '#shared/contracts/chains.ts';
import type { ChainFacts, Question } from '#shared/rules/facts.ts';
import { judgeChain, type ChainJudgement } from '#shared/rules/judge.ts';
import { noticesInForce } from '#shared/notices/in-force.ts';
import { endOfDay } from '#shared/state-at.ts';
import { today, type Context } from '#server/http/context.ts';
import { linkFacts, valueFacts, type FactParts } from './chain-facts.ts';
import { chainNow, type ChainNow } from './chain-now.ts';
import { chainNumbers, type ChainNumbers } from './chain-numbers.ts';
import type { ChainStore, Closure } from './chain-store.ts';
import { noticesOfLinks } from './notice-facts.ts';
import { withNotices } from './noticed-closure.ts';
import { contributionsOf } from './contributions.ts';
import { historyBefore } from './history.ts';
import { improvementsOf } from './improvements.ts';
import { redirectedLinkJudge } from './judge-redirected.ts';
import { sideBySide } from './side-by-side.ts';
import { StepMemory } from './step-memory.ts';
import type { LaboratoryDossier, StandardDossier, StoredValue } from './stored.ts';
import { tiersOf } from './tiers.ts';

/** A chain worked out, before anything is left out for the person who asks. */
export interface Chain {
  question: Question;
  as: ChainAs;
  focus: StoredValue;
  closure: Closure;
  standards: Map<string, StandardDossier>;
  laboratories: Map<string, LaboratoryDossier>;
  numbers: ChainNumbers;
  tiers: Map<string, number>;
  judgement: ChainJudgement;
  contributions: ReturnType<typeof contributionsOf>;
  improvements: ChainResponse['improvements'];
  sideBySide: ReturnType<typeof sideBySide>;
  /** What has changed above it since it was certified; null: nothing. */
  now: ChainNow | null;
}

/** Steps judged already, by question, valid until the next act. */
interface Remembered {
  seq: number;
  steps: Map<string, StepMemory>;
}
/** Values kept under one question. */
const MOST_STEPS = 4_200;
/** Beyond this many under all questions together the memory begins anew with the next question. */
const MOST_BEFORE = 2_000;
const memories = new WeakMap<ChainStore, Remembered>();

/**
 * Works out the chain of a value: numbers, checks, and what would help.
 * @param day in force on (ISO day), `known` as known at the end of (ISO day)
 */
export async function chainOf(
  context: Context,
  store: ChainStore,
  focusId: number,
  asked: { day?: string | undefined; known?: string | undefined; as?: ChainAs | undefined },
): Promise<Chain> {
  await store.catchUp();
  const question: Question = {
    day: asked.day ?? today(context),
    known: asked.known ?? today(context),
    programmeEndedAfterUse: 'said',
  };
  return workOut(store, focusId, stepsOf(memoryOf(store), question), asked.as ?? 'certified');
}

function memoryOf(store: ChainStore): Remembered {
  const memory = memories.get(store);
  if (memory?.seq === store.seq) return memory;
  const fresh = { seq: store.seq, steps: new Map<string, StepMemory>() };
  memories.set(store, fresh);
  return fresh;
}

function stepsOf({ steps }: Remembered, question: Question): StepMemory {
  const key = `${question.day} ${question.known}`;
  const known = steps.get(key);
  if (known) return known;
  const size = [...steps.values()].reduce((sum, memory) => sum + memory.size, 0);
  if (size >= MOST_BEFORE) steps.clear();
  const fresh = new StepMemory(question, MOST_STEPS);
  steps.set(key, fresh);
  return fresh;
}

async function workOut(store: ChainStore, focusId: number, steps: StepMemory, as: ChainAs): Promise<Chain> {
  const { question } = steps;
  const certified = await store.closure([focusId]);
  const inForce = noticesInForce(store.notices, question.day, question.known);
  // Read at once: laboratories do not depend on what has changed since.
  const [now] = await Promise.all([
    chainNow(store, certified, focusOf(certified, focusId), question, inForce),
    store.laboratories(laboratoriesOf(certified)),
  ]);
  const isNow = as === 'now known' && now !== null;
  const closure = isNow ? now.closure : certified;
  const focus = focusOf(closure, focusId);
  // What was done is judged over the links as used, whichever chain is drawn.
  const asUsed = isNow ? await store.closure([focusId, ...idsOf(closure)]) : certified;
  const [standards, laboratories] = await Promise.all([
    store.standards(asUsed.values.map((value) => value.standardId)),
    store.laboratories(laboratoriesOf(asUsed)),
  ]);
  const widened = await store.closure([...idsOf(asUsed), ...earlierThan(asUsed, steps, standards)]);
  const shown = withNotices(closure, inForce);
  const widenedNow = withNotices(widened, inForce);
  const numbersAsUsed = chainNumbers(widened, focus.uid, widenedNow);
  const numbersNow = isNow ? now.numbers : null;
  const numbers = numbersNow ?? numbersAsUsed;
  const contributions = contributionsOf(numbersNow ? shown : widenedNow, numbers.propagation);
  const parts: FactParts = {
    question,
    standards,
    laboratories,
    numbers: numbersAsUsed,
    byId: new Map(widened.values.map((value) => [value.id, value])),
    sources: widened.sources,
    notices: store.notices,
    noticesOfLinks: noticesOfLinks(widened, store.notices, question.known),
  };
  const facts = chainFacts({ closure: shown, focus, parts, contributions, steps, numbers });
  const judgement = judgeChain(facts, isNow ? redirectedLinkJudge(steps, facts, now, parts) : steps);
  return {
    question,
    as,
    focus,
    closure: shown,
    standards,
    laboratories,
    numbers,
    tiers: tiersOf(shown, focus),
    judgement,
    contributions,
    improvements: improvementsOf(
      shown,
      focus,
      numbers.propagation,
      contributions,
      standards,
      endOfDay(question.known),
    ),
    sideBySide: bothKinds(focus, standards.get(focus.standardId)!, question, judgement),
    now,
  };
}

function focusOf(closure: Closure, id: number): StoredValue {
  return closure.values.find((value) => value.id === id)!;
}

function laboratoriesOf(closure: Closure): string[] {
  return closure.values.flatMap((value) => [value.issuerId, value.holderId]);
}

function idsOf(closure: Closure): number[] {
  return closure.values.map((value) => value.id);
}

/** The values that the steps not judged yet are compared with: their covariances are needed. */
export function earlierThan(
  closure: Closure,
  steps: StepMemory,
  standards: Map<string, StandardDossier>,
): number[] {
  const horizon = endOfDay(steps.question.known);
  return closure.values.flatMap((value) => {
    const before = steps.knows(value)
      ? null
      : historyBefore(standards.get(value.standardId)!, value, horizon);
    return before ? [before.id] : [];
  });
}

/** What the rules read of one chain; its steps are assembled once in a memory. */
export function chainFacts(of: {
  closure: Closure;
  focus: StoredValue;
  parts: FactParts;
  contributions: Chain['contributions'];
  steps: StepMemory;
  numbers: ChainNumbers;
}): ChainFacts {
  const { closure, focus, parts, steps } = of;
  const asUsed = (value: StoredValue) => parts.byId.get(value.id)!;
  const values = new Map(
    closure.values.map((value) => [value.id, steps.value(value, () => valueFacts(asUsed(value), parts))]),
  );
  return {
    question: parts.question,
    focusUid: focus.uid,
    values: [...values.values()],
    links: closure.values.flatMap((value) =>
      value.parents.map((link) => {
        const assemble = () => linkFacts(values.get(value.id)!, values.get(link.parentId)!, link, parts);
        // A link read as leading to a successor is no step of the register: it is not kept among those.
        return asUsed(value).parents.includes(link) ? steps.link(value, link, assemble) : assemble();
      }),
    ),
    contributions: contributionFacts(of.contributions, closure),
    // What notices added since is weighed by rules of their own (B-24, B-50).
    varianceNow: of.numbers.varianceAsCertified(focus.uid),
    // The register admits neither: a circle is refused at issue, and a reference is a row or nothing.
    circle: null,
    missingReferences: [],
  };
}

/** The rules ask of each origin only whether it lies at the top: a root's own part, or the scale it rests on. */
function contributionFacts(
  contributions: Chain['contributions'],
  closure: Closure,
): ChainFacts['contributions'] {
  if (!contributions) return null;
  const top = new Set<string>();
  for (const value of closure.values) if (value.rootKind !== null) top.add(value.uid);
  for (const source of closure.sources.values()) if (source.kind === 'scale version') top.add(source.uid);
  return contributions.map(({ label, share, uids }) => ({
    label,
    share,
    isTop: uids.every((uid) => top.has(uid)),
  }));
}

/** Both kinds of mass; none is named to type into a balance while a link of the chain is broken. */
function bothKinds(
  focus: StoredValue,
  dossier: StandardDossier,
  question: Question,
  judgement: ChainJudgement,
): Chain['sideBySide'] {
  const both = sideBySide(focus, dossier, endOfDay(question.known));
  const isBroken = judgement.links.some((link) => link.conduct === 'broken' || link.today === 'broken');
  if (!isBroken) return both;
  return {
    sides: both.sides.map((side) => ({ ...side, isTheOneToType: false })),
    note: 'A link of this chain fails a check: settle that before a value is typed into a balance.',
  };
}
