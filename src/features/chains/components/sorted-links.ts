import type { ChainResponse } from '#shared/contracts/chains.ts';
import { countingChecks } from '#shared/drawing/counting-checks.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import type { ChainQuestion } from '../question.ts';

type Link = ChainResponse['links'][number];

/** What the table of links can be sorted by. */
export type SortColumn = 'link' | 'used' | 'flow' | 'judged';

/** The order in force; null: from the weight upwards. */
export interface LinkOrder {
  by: SortColumn;
  isDescending: boolean;
}

const WORST_FIRST = ['broken', 'not judged', 'caution', 'sound'];

/** The next order when a head is pressed: first the order one looks for, then the other way, then the chain's own. */
export function nextOrder(order: LinkOrder | null, by: SortColumn): LinkOrder | null {
  const isFirstDescending = by === 'flow' || by === 'used';
  if (order?.by !== by) return { by, isDescending: isFirstDescending };
  return order.isDescending === isFirstDescending ? { by, isDescending: !isFirstDescending } : null;
}

/** Links in the order asked for; equal ones keep the chain's own. Links without a day, flow or judgement come last. */
export function sortedLinks(
  links: readonly Link[],
  order: LinkOrder | null,
  names: ReadonlyMap<string, string>,
  verdict: ChainQuestion['verdict'],
): readonly Link[] {
  if (!order) return links;
  const key = (link: Link): string | number | null => {
    if (order.by === 'link') return names.get(link.parentUid) ?? '';
    if (order.by === 'used') return link.usedEnd;
    if (order.by === 'flow')
      return link.flow === null || link.role === 'informs' ? null : Math.abs(link.flow);
    return link.role === 'reference' ? WORST_FIRST.indexOf(link[verdict]) : null;
  };
  return links.toSorted((a, b) => compare(key(a), key(b), order.isDescending ? -1 : 1));
}

function compare(a: string | number | null, b: string | number | null, way: 1 | -1): number {
  if (a === b) return 0;
  if (a === null) return 1;
  if (b === null) return -1;
  return a < b ? -way : way;
}

/** Rules by what they found at a link, each list in order. */
export interface RulesFound {
  fails: string[];
  notJudged: string[];
}

/** Rules that each link fails, and those that cannot be judged there: of the step itself and of the value it made. */
export function rulesOfLinks(
  chain: ChainResponse,
  verdict: ChainQuestion['verdict'],
): Map<string, RulesFound> {
  const fails = rulesWith('fails', chain, verdict);
  const notJudged = rulesWith('cannot be judged', chain, verdict);
  return new Map(
    [...fails].map(([key, failed]) => [
      key,
      { fails: failed, notJudged: notJudged.get(key)!.filter((rule) => !failed.includes(rule)) },
    ]),
  );
}

/** What was found at a link, in a line: "fails B-17; not judged B-06 B-32". Empty where nothing was. */
export function rulesText({ fails, notJudged }: RulesFound): string {
  return [
    ...(fails.length > 0 ? [`fails ${fails.join(' ')}`] : []),
    ...(notJudged.length > 0 ? [`not judged ${notJudged.join(' ')}`] : []),
  ].join('; ');
}

function rulesWith(
  wanted: ChainResponse['checks'][number]['outcome'],
  chain: ChainResponse,
  verdict: ChainQuestion['verdict'],
): Map<string, string[]> {
  const ofLink = new Map<string, string[]>();
  const ofValue = new Map<string, string[]>();
  for (const { rule, subject, outcome } of countingChecks(chain, verdict)) {
    if (outcome !== wanted) continue;
    if (subject.type === 'link') add(ofLink, linkKey(subject), rule);
    if (subject.type === 'value') add(ofValue, subject.uid, rule);
  }
  return new Map(
    chain.links
      .filter((link) => link.role === 'reference')
      .map((link) => [
        linkKey(link),
        [
          ...new Set([...(ofLink.get(linkKey(link)) ?? []), ...(ofValue.get(link.childUid) ?? [])]),
        ].toSorted(),
      ]),
  );
}

function add(rules: Map<string, string[]>, key: string, rule: string): void {
  rules.set(key, [...(rules.get(key) ?? []), rule]);
}
