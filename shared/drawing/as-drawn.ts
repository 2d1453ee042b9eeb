import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DrawingQuestion } from './drawing-question.ts';
import { drawnPart } from './drawn-part.ts';
import { drawnWhole, type DrawnChain } from './drawn-chain.ts';
import { failingPart } from './failing-part.ts';
import { foldChain, groupsOf } from './fold-chain.ts';
import type { FoldBy } from './fold-kind.ts';
import { joinChains } from './joined-chains.ts';

/** Plates up to which a chain is drawn one by one. */
export const MOST_PLATES_ONE_BY_ONE = 300;

/** What of a chain is drawn, and how. */
export interface AsDrawn {
  chain: DrawnChain;
  /** How plates are merged; null: they are drawn one by one. */
  foldedBy: FoldBy | null;
  /** Groups that are drawn open: their names by their keys. */
  opened: ReadonlyMap<string, string>;
  /** Plates left out because all is sound there. */
  soundLeftOut: number;
}

/**
 * The chain as the question wants it drawn: with a second weight, without small effects, only what fails, folded.
 * More than 300 plates are folded unasked.
 */
export function asDrawn(
  answer: ChainResponse,
  question: DrawingQuestion,
  second: ChainResponse | null = null,
): AsDrawn {
  const part = drawnPart(answer, question.effects).chain;
  const whole = second ? joinChains(part, drawnPart(second, question.effects).chain) : drawnWhole(part);
  const shown = question.only === 'fails' ? failingPart(whole, question.verdict) : whole;
  const soundLeftOut = whole.nodes.length - shown.nodes.length;
  const foldedBy = foldWanted(shown, question);
  if (foldedBy === null) return { chain: shown, foldedBy, opened: new Map(), soundLeftOut };
  const fold = { by: foldedBy, opened: openedGroups(question), verdict: question.verdict };
  return { chain: foldChain(shown, fold), foldedBy, opened: namesOfOpened(shown, fold), soundLeftOut };
}

function namesOfOpened(chain: DrawnChain, fold: Parameters<typeof foldChain>[1]): Map<string, string> {
  const all = groupsOf(chain, { ...fold, opened: new Set() });
  return new Map(
    [...all].flatMap(([key, members]) =>
      fold.opened.has(key) ? [[key, `${members[0]!.issuer.name} (${members.length})`]] : [],
    ),
  );
}

function foldWanted(chain: DrawnChain, question: DrawingQuestion): FoldBy | null {
  if (question.fold) return 'laboratory';
  return chain.nodes.length > MOST_PLATES_ONE_BY_ONE ? 'laboratory, class and nominal' : null;
}

/** Keys of the groups that the question wants opened. */
export function openedGroups(question: DrawingQuestion): ReadonlySet<string> {
  return new Set((question.open ?? '').split(',').filter((key) => key !== ''));
}
