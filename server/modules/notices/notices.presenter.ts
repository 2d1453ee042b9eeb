import type { z } from 'zod';
import type { NoticeResponse, NoticeRow, NoticeSummary } from '#shared/contracts/notices.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { noticeOn, type NoticeState } from '#shared/notices/in-force.ts';
import type { Notice } from '#shared/notices/notice.ts';
import {
  fullRow,
  SIGHT,
  warningRow,
  WORDS,
  type NoticeEffects,
  type NoticeFound,
} from '#server/modules/downstream/index.ts';
import type { NoticeHead } from './notices.queries.ts';
import type { Notices, ShownNotice } from './show-notice.service.ts';

type Summary = z.input<typeof NoticeSummary>;

/** Every notice as published, with how it stands on a day. */
export function presentNotices({ heads, recorded }: Notices, day: string): Summary[] {
  return heads.map((head) => summaryOf(head, { heads, recorded }, day));
}

/** One notice with its terms, and the rows that this person gets to see. */
export function presentNotice(
  shown: ShownNotice,
  day: string,
  abilities: Record<string, boolean>,
): z.input<typeof NoticeResponse> {
  const head = shown.heads.find(({ id }) => id === shown.notice.id)!;
  const { words, fullWords, warned, rows, nextCursor } = shown.effects;
  const [none, material, verdictChanges] = words;
  return {
    ...summaryOf(head, shown, day),
    reason: head.reason,
    threshold: head.threshold,
    terms: shown.notice.terms.map(({ shifts, addedU, ...term }) => ({
      ...term,
      shiftPerKilogram: [...shifts],
      addedUPerKilogram: addedU,
    })),
    total: {
      count: none + material + verdictChanges,
      warned,
      words: { none, material, verdictChanges },
      fullWords: { none: fullWords[0], material: fullWords[1], verdictChanges: fullWords[2] },
    },
    rows: rows.map((row) => presentRow(row, shown.effects.laboratories)),
    nextCursor,
    abilities,
  };
}

function summaryOf(head: NoticeHead, { heads, recorded }: Notices, day: string): Summary {
  const notice = recorded.find(({ id }) => id === head.id)!;
  const state = noticeOn(notice, recorded, day, day);
  return {
    id: head.id,
    number: head.number,
    kind: head.kind,
    title: head.title,
    issuer: { id: head.issuerId, code: head.issuerCode, name: head.issuerName },
    fromScale: { id: head.fromScaleId, name: head.fromScaleName },
    toScale: head.toScaleId && head.toScaleName ? { id: head.toScaleId, name: head.toScaleName } : null,
    effectiveOn: head.effectiveOn,
    madeKnownOn: head.madeKnownOn,
    isBackDated: head.effectiveOn < head.madeKnownOn,
    state: stateOf(state),
    replaces: nameOf(heads.find(({ id }) => id === head.replacesId)),
    replacedBy: nameOf(heads.find(({ replacesId }) => replacesId === head.id)),
    ...largestOf(notice),
  };
}

/** What was recorded later today is known today: nothing here is unknown. */
function stateOf(state: NoticeState): Summary['state'] {
  return state === 'unknown' ? 'not yet in force' : state;
}

function nameOf(head: NoticeHead | undefined): Summary['replaces'] {
  return head ? { id: head.id, number: head.number, title: head.title } : null;
}

/** Of all terms the largest |shift|, with its sign, and the largest added uncertainty. */
function largestOf({ terms }: Notice): Pick<Summary, 'largestShift' | 'largestAddedU'> {
  const shifts = terms.flatMap((term) => term.shifts.map(({ shift }) => Number(shift)));
  return {
    largestShift: shifts.reduce(
      (largest, shift) => (Math.abs(shift) > Math.abs(largest) ? shift : largest),
      0,
    ),
    largestAddedU: Math.max(...terms.map((term) => term.addedU)),
  };
}

function presentRow(
  row: NoticeFound,
  laboratories: NoticeEffects['laboratories'],
): z.input<typeof NoticeRow> {
  const { details, sight, shift } = row;
  const word = WORDS[row.word]!;
  if (sight !== SIGHT.full) {
    const named = sight === SIGHT.issued ? details.holderId : details.issuerId;
    return { ...warningRow(details, laboratories.get(named)!), shift: movedText('0', shift), word };
  }
  const isUKnown = details.expandedU !== null;
  const moved = row.shiftBefore + shift;
  return {
    ...fullRow(details, laboratories),
    shift: movedText('0', shift),
    addedU: row.addedU,
    deviationBefore: movedText(details.deviation, row.shiftBefore),
    deviationAfter: movedText(details.deviation, moved),
    expandedUBefore: isUKnown ? row.expandedUBefore : null,
    expandedUAfter: isUKnown ? row.expandedUAfter : null,
    ratio: isUKnown ? moved / row.expandedU : null,
    classBefore: row.classBefore,
    classAfter: row.classAfter,
    word,
  };
}

/** Deviation plus shift, to the register's picogram. */
function movedText(deviation: string, shift: number): string {
  return decimalText(new Decimal(deviation).plus(shift).toDecimalPlaces(12));
}
