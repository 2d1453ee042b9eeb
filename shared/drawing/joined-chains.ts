import type { ChainResponse } from '#shared/contracts/chains.ts';
import { linkKey } from './drawing-question.ts';
import { drawnWhole, tiersOf, type DrawnChain } from './drawn-chain.ts';

/** Plates up to which the second weight's own part is drawn beside the first's. */
const MOST_PLATES = 80;

/**
 * The chain of one weight with what it shares with a second one. The second's own part stands beside it, as lines
 * without flow, where both are small enough to be read; else only what both lean on is marked.
 */
export function joinChains(chain: ChainResponse, other: ChainResponse): DrawnChain {
  const whole = drawnWhole(chain);
  const own = new Set(chain.nodes.map((node) => node.uid));
  const shared = new Set(other.nodes.map((node) => node.uid).filter((uid) => own.has(uid)));
  const added = other.nodes.filter((node) => !own.has(node.uid));
  const second = { focusUid: other.focusUid, beside: new Set<string>(), shared };
  if (own.size + added.length > MOST_PLATES) return { ...whole, second };
  const known = new Set(chain.links.map(linkKey));
  const links = [
    ...whole.links,
    ...drawnWhole(other)
      .links.filter((link) => !known.has(linkKey(link)))
      .map((link) => ({ ...link, flow: null })),
  ];
  const nodes = [...whole.nodes, ...added.map((node) => ({ ...node, share: null }))];
  const tiers = tiersOf(
    nodes.map((node) => node.uid),
    links,
  );
  return {
    ...whole,
    nodes: nodes.map((node) => ({ ...node, tier: tiers.get(node.uid)! })),
    links,
    checks: [...chain.checks, ...other.checks.filter((check) => isAbout(check, added))],
    rules: joinedRules(chain.rules, other.rules),
    second: { ...second, beside: new Set(added.map((node) => node.uid)) },
  };
}

/** Each reply tells the sentences that are said in it: together they tell both. */
function joinedRules(one: ChainResponse['rules'], other: ChainResponse['rules']): ChainResponse['rules'] {
  const joined = new Map(one.map((rule) => [rule.id, rule]));
  for (const rule of other) {
    const sentences = { ...joined.get(rule.id)?.sentences, ...rule.sentences };
    joined.set(rule.id, { ...rule, sentences });
  }
  return [...joined.values()];
}

/** The second's checks of values that the first's chain does not hold; its links bring their own standing. */
function isAbout({ subject }: ChainResponse['checks'][number], added: readonly { uid: string }[]): boolean {
  return subject.type === 'value' && added.some(({ uid }) => uid === subject.uid);
}
