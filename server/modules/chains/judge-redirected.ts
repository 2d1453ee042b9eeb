import type { ChainFacts, LinkFacts } from '#shared/rules/facts.ts';
import { judgeLink, type Check, type StepJudges } from '#shared/rules/judge.ts';
import { linkFacts, valueFacts, type FactParts } from './chain-facts.ts';
import type { ChainNow } from './chain-now.ts';
import { standsFor } from './redirected.ts';
import type { StepMemory } from './step-memory.ts';

/**
 * How the links of a chain as now known are judged. Conduct is about what was done: a link that is read as leading to
 * a successor keeps the conduct of the link as it was used, and only what holds today is judged of the successor.
 */
export function redirectedLinkJudge(
  steps: StepMemory,
  chain: ChainFacts,
  now: ChainNow,
  parts: FactParts,
): StepJudges {
  const asUsed = usedLinks(chain, now, parts, steps);
  return {
    judgeValue: steps.judgeValue,
    judgeLink: (link, question) => {
      const used = asUsed.get(link);
      return used ? judgedApart(used, link, question) : steps.judgeLink(link);
    },
  };
}

function judgedApart(used: LinkFacts, link: LinkFacts, question: ChainFacts['question']): Check[] {
  const subject = { type: 'link', childUid: link.child.uid, parentUid: link.parent.uid } as const;
  return [
    ...judgeLink(used, question).filter((check) => check.verdict === 'conduct'),
    ...judgeLink(link, question).filter((check) => check.verdict === 'today'),
  ].map((check) => ({ ...check, subject }));
}

/** For each redirected link the link as it was used. */
function usedLinks(
  chain: ChainFacts,
  now: ChainNow,
  parts: FactParts,
  steps: StepMemory,
): Map<LinkFacts, LinkFacts> {
  const byUid = new Map([...parts.byId.values()].map((value) => [value.uid, value]));
  const found = new Map<LinkFacts, LinkFacts>();
  for (const facts of chain.links) {
    const [child, by] = [byUid.get(facts.child.uid)!, byUid.get(facts.parent.uid)!];
    const link = child.parents.find(
      (each) => each.parentId !== by.id && standsFor(each, now.fates) === by.id,
    );
    if (!link || child.parents.some((each) => each.parentId === by.id)) continue;
    const used = parts.byId.get(link.parentId)!;
    const usedFacts = steps.value(used, () => valueFacts(used, parts));
    found.set(facts, linkFacts(facts.child, usedFacts, link, parts));
  }
  return found;
}
