import type { ChainResponse } from '#shared/contracts/chains.ts';
import { stateAt, type ValueEnd, type ValueStanding } from '#shared/state-at.ts';
import type { Chain } from './chain.service.ts';
import { fateOf } from './fate.ts';

/** How a value stands on the day asked about, as known on the knowledge day. */
export function standingOn(
  { question }: Chain,
  value: { issuedOn: string; recordedAt: string },
  ends: readonly ValueEnd[],
): ValueStanding {
  const { day, known } = question;
  return stateAt({ effectiveFrom: value.issuedOn, recordedAt: value.recordedAt }, ends, day, known);
}

/** What stood of this weight in the focus's kind while the focus did not yet: the latest determined. */
export function inForceInstead(chain: Chain): ChainResponse['inForceInstead'] {
  const { focus } = chain;
  const { state } = standingOn(chain, focus, []);
  if (state === 'in force') return null;
  // The history is in the order of determination.
  const stood = chain.standards
    .get(focus.standardId)!
    .history.findLast(
      (row) => row.quantity === focus.quantity && standingOn(chain, row, row.ends).state === 'in force',
    );
  return stood ? { uid: stood.uid, certificateNo: stood.certificateNo } : null;
}

/** The latest determined of this weight in the focus's kind, where it and the focus stand beside each other. */
export function newerInForce(chain: Chain): ChainResponse['newerInForce'] {
  const { focus } = chain;
  const { history } = chain.standards.get(focus.standardId)!;
  const ends = history.find((row) => row.id === focus.id)?.ends ?? [];
  if (standingOn(chain, focus, ends).state !== 'in force') return null;
  const newest = history.findLast(
    (row) =>
      row.quantity === focus.quantity &&
      row.performedEnd > focus.performedEnd &&
      standingOn(chain, row, row.ends).state === 'in force',
  );
  return newest ? { uid: newest.uid, certificateNo: newest.certificateNo } : null;
}

/** Both kinds are the certificate's: said where what they rest on has moved since. */
export function noteOf({ sideBySide, now, focus }: Chain): string | null {
  const hasMoved = now !== null && (now.focus.isTouched || now.notices.has(focus.uid));
  if (sideBySide.note !== null || !hasMoved || sideBySide.sides.length === 0) return sideBySide.note;
  return 'As certified: how far the value has moved since stands above.';
}

/** The end of the way from one revision of the focus to the next. */
export function succeededBy({ focus, standards, question }: Chain): ChainResponse['succeededBy'] {
  const dossier = standards.get(focus.standardId)!;
  const fate = fateOf(focus, dossier, question);
  const row = fate.kind === 'replaced' && dossier.history.find(({ id }) => id === fate.byId);
  return row ? { uid: row.uid, certificateNo: row.certificateNo, revisionN: row.revisionN } : null;
}
