import { Decimal } from '#shared/decimal.ts';
import { amountText, certificateText, halfDigitOfU } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';

/** The standard uncertainty of the reference is its U divided by the k of its own certificate, not by an assumed 2. */
export const uOfReference: LinkRule = {
  id: 'B-22',
  title: 'Uncertainty of the reference taken with its own k',
  scope: 'link',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    'as stated': 'The reference was used with U/k of certificate {reference} (k = {k}).',
    larger:
      'The reference was used with u {used}; certificate {reference} gives {stated} (U/k, k = {k}). More than stated does no harm.',
    smaller:
      'The reference was used with u {used}, but certificate {reference} gives {stated} (U/k with its own k = {k}).',
    'not the certificate': 'The reference was used as {usedAs}, not with the U of its certificate.',
    'no uncertainty': 'Certificate {reference} states no U.',
    'no k': 'Certificate {reference} states U without k.',
  },
  judge({ parent, usedAs, usedExpandedU, usedK }) {
    const known = { reference: certificateText(parent), usedAs, k: parent.k ?? '' };
    if (usedAs === 'class limit' || usedAs === 'fit' || usedAs === 'bracketing')
      return doesNotApply('not the certificate', known);
    if (parent.expandedU === null) return cannotBeJudged('no uncertainty', known);
    if (parent.k === null) return cannotBeJudged('no k', known);
    const stated = new Decimal(parent.expandedU).div(parent.k);
    const statedText = amountText(stated, parent);
    const isAsStated =
      (usedExpandedU ?? parent.expandedU) === parent.expandedU && (usedK ?? parent.k) === parent.k;
    if (isAsStated) return holds('as stated', { ...known, stated: statedText, used: statedText });
    const used = new Decimal(usedExpandedU ?? parent.expandedU).div(usedK ?? parent.k);
    const rounding = halfDigitOfU(parent).div(parent.k);
    const parameters = { ...known, stated: statedText, used: amountText(used, parent) };
    if (used.lt(stated.minus(rounding))) return fails('smaller', parameters);
    return used.gt(stated.plus(rounding))
      ? holds('larger', parameters, 'information')
      : holds('as stated', parameters);
  },
};
