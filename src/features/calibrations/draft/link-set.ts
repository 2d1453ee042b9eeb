import { Decimal } from '#shared/decimal.ts';
import type { DraftLine, ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import type { KnownStandard } from './known.ts';
import { plainName } from './read-paste.ts';

/**
 * The piece of a set that a weight is compared with: the one of the same nominal; among several of it the one
 * with the same marking. A weight is no reference of its own. Null where there is none, or more than one fits.
 */
export function partnerOf(standard: KnownStandard, pieces: readonly StandardRow[]): StandardRow | null {
  const alike = pieces.filter(
    ({ id, nominal }) => id !== standard.id && new Decimal(nominal).eq(standard.nominal),
  );
  if (alike.length <= 1) return alike[0] ?? null;
  const [found, another] = alike.filter(({ marking }) => plainName(marking) === plainName(standard.marking));
  return found && !another ? found : null;
}

/** The value in force of a piece, as a reference; null where it has none of this kind. */
export function referenceOfPiece(
  piece: StandardRow,
  quantity: DraftLine['quantity'],
): ReferenceChoice | null {
  const { value, registryNo, marking, nominal, holder } = piece;
  if (value?.quantity !== quantity) return null;
  const { uid, deviation, expandedU, k, certificateNo, performedEnd } = value;
  return {
    valueUid: uid,
    ...{ registryNo, marking, nominal, holder, quantity },
    ...{ deviation, expandedU, k, certificateNo, performedEnd },
    state: 'in force',
    isNewest: true,
  };
}
