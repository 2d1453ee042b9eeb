import { certificateText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type LinkRule } from './rule.ts';
import type { WeightClass } from '#shared/contracts/common.ts';

const COARSE: readonly WeightClass[] = ['M1', 'M1-2', 'M2', 'M2-3', 'M3'];

/**
 * Reference and result are of one kind (mass or conventional mass), or the density with its U is on record, so that
 * the conversion can be followed. For steel the kinds differ by about 1 mg/kg, for Pt-Ir by 94 mg/kg (OIML D 28).
 */
export const quantityKind: LinkRule = {
  id: 'B-16',
  title: 'Kind of quantity of the reference fits',
  scope: 'link',
  severity: 'critical',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    same: 'Certificate {reference} and its use are both {kind}.',
    converted:
      'Certificate {reference} states {referenceKind}, {certificate} {kind}; the density of {registryNo} with its U is on record for the conversion.',
    'class limit': 'Only the class of {registryNo} was used, and the class speaks of conventional mass.',
    mixed:
      'Certificate {reference} states {referenceKind}, {certificate} {kind}, and no density of {registryNo} is on record; enter the density with its U.',
    'no uncertainty':
      'Certificate {reference} states {referenceKind}, {certificate} {kind}; the density of {registryNo} has no stated U, which the conversion needs.',
  },
  judge({ child, parent, usedAs }) {
    const parameters = {
      reference: certificateText(parent),
      referenceKind: parent.quantity,
      certificate: certificateText(child),
      kind: child.quantity,
      registryNo: parent.registryNo,
    };
    if (usedAs === 'class limit' && child.quantity === 'conventional mass')
      return doesNotApply('class limit', parameters);
    if (child.quantity === parent.quantity) return holds('same', parameters);
    if (parent.density === null) {
      const isCoarse = child.class !== null && COARSE.includes(child.class);
      return fails('mixed', parameters, isCoarse ? 'minor' : 'critical');
    }
    return parent.density.expandedU === null
      ? cannotBeJudged('no uncertainty', parameters)
      : holds('converted', parameters);
  },
};
