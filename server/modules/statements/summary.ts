import type { ChainResponse } from '#shared/contracts/chains.ts';
import { askedTodayOnly } from '#shared/drawing/asked-today-only.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { isZero, shiftWords, uncertaintyWords } from './words.ts';

/** The whole in a few sentences: how far it goes, how it was judged, what is uncertain and why. */
export function summaryOf(chain: ChainResponse): string[] {
  return [
    extentSentence(chain),
    ...judgedSentences(chain),
    uncertaintySentence(chain),
    rootSentence(chain),
    changeSentence(chain),
  ].filter((sentence) => sentence !== '');
}

function extentSentence(chain: ChainResponse): string {
  const values = chain.nodes.filter((node) => node.type === 'value').length;
  if (chain.links.every((link) => link.role !== 'reference'))
    return 'The value is itself a root: it leans on no other.';
  const steps = Math.max(0, ...chain.nodes.map((node) => (node.type === 'value' ? node.tier : 0)));
  const links = chain.links.filter((link) => link.role !== 'source').length;
  return `The chain holds ${values} values and ${links} ${links === 1 ? 'link' : 'links'} between them; the longest way up has ${steps} ${steps === 1 ? 'step' : 'steps'}.`;
}

function judgedSentences(chain: ChainResponse): string[] {
  const { summary } = chain;
  if (summary.links === 0) return [];
  const counted = (counts: ChainResponse['summary']['today']) =>
    [
      `${counts.sound} ${counts.sound === 1 ? 'holds its checks' : 'hold their checks'}`,
      ...(counts.broken > 0 ? [`${counts.broken} ${counts.broken === 1 ? 'fails' : 'fail'} a check`] : []),
      ...(counts.caution > 0
        ? [`${counts.caution} ${counts.caution === 1 ? 'calls' : 'call'} for caution`]
        : []),
      ...(counts.notJudged > 0 ? [`${counts.notJudged} cannot be judged`] : []),
    ].join(', ');
  const { rules, links } = askedTodayOnly(chain);
  const unasked =
    links === 0
      ? ''
      : ` At ${links} of them ${rules.join(', ')} ${rules.length === 1 ? 'was' : 'were'} not asked at use: only what is known now tells of ${rules.length === 1 ? 'it' : 'them'}.`;
  return [
    `Judged by what was known at use, of ${summary.links} links ${counted(summary.conduct)}.${unasked}`,
    `Judged by what is known now, of ${summary.links} links ${counted(summary.today)}.`,
  ];
}

function uncertaintySentence({ uncertainty }: ChainResponse): string {
  const { standard, k, stated, missing } = uncertainty;
  if (standard === null)
    return `The uncertainty over the whole chain is not known, because ${missing.map((row) => row.because).join('; ')}. What is not stated is not invented.`;
  const now = `Over the whole chain the standard uncertainty is ${uncertaintyWords(standard, 1)}, expanded ${uncertaintyWords(standard * k, k)} at k = ${k}`;
  return stated === null
    ? `${now}; the certificate states none.`
    : `${now}; the certificate states a standard uncertainty of ${uncertaintyWords(stated, 1)}.`;
}

function rootSentence({ rootShares, nodes }: ChainResponse): string {
  const named = rootShares.flatMap(({ uid, share }) => {
    const node = nodes.find((candidate) => candidate.uid === uid);
    return node?.type === 'value' && node.tier > 0 ? [`${node.registryNo} (${shareText(share)})`] : [];
  });
  if (named.length === 0) return '';
  return `What reaches the weight through its ${named.length === 1 ? 'root' : 'roots'}, as a share of its variance: ${named.join(', ')}.`;
}

function changeSentence({ asNowKnown }: ChainResponse): string {
  if (asNowKnown === null) return 'Nothing that the weight rests on has changed since it was certified.';
  const causes = [
    ...asNowKnown.replaced.map(
      (row) => `certificate ${row.certificateNo} for ${row.registryNo} is no longer the current word`,
    ),
    ...asNowKnown.notices.map((row) => `notice ${row.number} applies from ${row.effectiveOn}`),
  ].join('; ');
  if (asNowKnown.shift === null)
    return `What the weight would be as now known cannot be worked out: ${asNowKnown.because ?? 'a value is missing'} (${causes}).`;
  if (isZero(asNowKnown.shift))
    return `Something that the weight rests on has changed, and the weight does not move: ${causes}.`;
  return `As now known the weight lies ${shiftWords(asNowKnown.shift)} from what was certified: ${causes}.`;
}
