import { countingChecks, type CountedChain } from './counting-checks.ts';

/** What of today's findings was never asked for the day of use. */
export interface AskedTodayOnly {
  /** Rules with such a finding, in order. */
  rules: string[];
  /** How many links such a finding counts at. */
  links: number;
  /** Whether all of today's findings that the use does not share are of this kind: nothing came out otherwise since. */
  isAllThatDiffers: boolean;
}

/**
 * Today's findings by questions that are not asked at use, as those about the value itself: they tell of no change,
 * and that the use shows none of them tells nothing either.
 */
export function askedTodayOnly(chain: CountedChain): AskedTodayOnly {
  const place = ({ rule, subject }: CountedChain['checks'][number]) => `${rule} ${JSON.stringify(subject)}`;
  const atUse = new Map(
    chain.checks.filter(({ verdict }) => verdict === 'conduct').map((check) => [place(check), check.outcome]),
  );
  const findings = countingChecks(chain, 'today').filter(
    ({ outcome, severity }) =>
      outcome === 'fails' || (outcome === 'cannot be judged' && GRAVE.includes(severity)),
  );
  const unasked = findings.filter((check) => !atUse.has(place(check)));
  const links = chain.links.filter(
    (link) =>
      link.role === 'reference' &&
      unasked.some(({ subject }) =>
        subject.type === 'link'
          ? subject.childUid === link.childUid && subject.parentUid === link.parentUid
          : subject.type === 'value' && subject.uid === link.childUid,
      ),
  ).length;
  return {
    rules: [...new Set(unasked.map(({ rule }) => rule))].toSorted(),
    links,
    isAllThatDiffers:
      unasked.length > 0 &&
      findings.every((check) => [undefined, check.outcome].includes(atUse.get(place(check)))),
  };
}

const GRAVE = ['block', 'critical', 'major'];
