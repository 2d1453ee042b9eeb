import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { AskedTodayOnly } from '#shared/drawing/asked-today-only.ts';

type Counts = ChainResponse['summary']['today'];

/** What the verdict at use counts, and at how many links it was not asked what is found today. */
export function atUseWords({ rules, links }: AskedTodayOnly): string {
  const counted = 'What had been made known by each day of use.';
  if (links === 0) return counted;
  return `${counted} ${links} ${links === 1 ? 'link was' : 'links were'} not asked at use what ${rules.join(' ')} ${rules.length === 1 ? 'asks' : 'ask'}.`;
}

/** What it means that the two verdicts differ. A question asked today only tells of no change. */
export function meaningOf({ conduct, today }: ChainResponse['summary'], unasked: AskedTodayOnly): string {
  const findings = (counts: Counts) => counts.broken + counts.caution + counts.notJudged;
  const isSoundAtUse = findings(conduct) === 0;
  if (unasked.isAllThatDiffers) {
    const asked = `${unasked.rules.join(' ')} ${unasked.rules.length === 1 ? 'is' : 'are'} asked today only: what is found there may have been so all along.`;
    return isSoundAtUse
      ? `${asked} Nothing that is asked at use has come out otherwise since.`
      : `Some findings were there when the work was done. ${asked}`;
  }
  if (isSoundAtUse && unasked.rules.length === 0)
    return 'The work was sound when it was done; something that it rests on has changed since.';
  if (isSoundAtUse)
    return `Nothing that is asked at use was amiss; something that it rests on has changed since. ${unasked.rules.join(' ')} ${unasked.rules.length === 1 ? 'is' : 'are'} asked today only.`;
  if (findings(today) === 0)
    return 'Something was not in order when the work was done; what is on record now shows no flaw that lasts.';
  return 'Some findings were there when the work was done, others came to light or changed since.';
}
