import { type z } from 'zod';
import { WhatIfChange } from '#shared/contracts/downstream.ts';
import type { PublishNoticeBody, NoticeKind } from '#shared/contracts/notices.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';

/** Grams in a microgram, in which shifts of the mass scale are spoken of. */
const GRAMS_PER_MICROGRAM = '1e-6';

/** One day of calibration and the shift of what was calibrated then, ug per kg. */
export interface PointEntry {
  on: string;
  shift: string;
}

/** Which values, and what they get, as typed; empty text: any. */
export interface TermEntry {
  quantity: '' | 'mass' | 'conventional mass';
  performedFrom: string;
  performedTo: string;
  nominalFrom: string;
  nominalTo: string;
  points: PointEntry[];
  /** ug per kg, k = 1. */
  addedU: string;
}

/** A notice as it is typed. */
export interface NoticeEntry {
  issuerId: string;
  number: string;
  kind: NoticeKind;
  title: string;
  reason: string;
  fromScaleId: string;
  /** Whether values stand on the same scale version afterwards, on another, or on a new one. */
  leadsTo: 'same' | 'other' | 'new';
  toScaleId: string;
  newName: string;
  newBasis: string;
  effectiveOn: string;
  madeKnownOn: string;
  threshold: string;
  replacesId: string;
  terms: TermEntry[];
}

export const EMPTY_TERM: TermEntry = {
  quantity: '',
  performedFrom: '',
  performedTo: '',
  nominalFrom: '',
  nominalTo: '',
  points: [{ on: '', shift: '0' }],
  addedU: '',
};

/** A form nobody has typed into. */
export function emptyNotice(issuerId: string, day: string): NoticeEntry {
  return {
    issuerId,
    number: '',
    kind: 'unit correction',
    title: '',
    reason: '',
    fromScaleId: '',
    leadsTo: 'same',
    toScaleId: '',
    newName: '',
    newBasis: '',
    effectiveOn: day,
    madeKnownOn: day,
    threshold: '',
    replacesId: '',
    terms: [EMPTY_TERM],
  };
}

/** What a notice may go on from. */
export interface ProposedNotice {
  issuerId: string;
  fromScaleId: string | undefined;
  term: TermEntry;
}

/** What a dry run of a notice supposed, as a form to go on from; null where the address holds none. */
export function noticeOfChange(text: string | null): ProposedNotice | null {
  const parsed = WhatIfChange.safeParse(jsonOf(text));
  if (!parsed.success || parsed.data.kind !== 'notice') return null;
  const { issuerId, fromScaleId, quantity, performedFrom, performedTo, nominalFrom, nominalTo, ...brings } =
    parsed.data;
  return {
    issuerId,
    fromScaleId,
    term: {
      quantity: quantity ?? '',
      performedFrom: performedFrom ?? '',
      performedTo: performedTo ?? '',
      nominalFrom: nominalFrom ?? '',
      nominalTo: nominalTo ?? '',
      points: brings.shiftPerKilogram.map(({ on, shift }) => ({ on, shift: micrograms(shift) })),
      addedU: brings.addedUPerKilogram === 0 ? '' : micrograms(String(brings.addedUPerKilogram)),
    },
  };
}

/** The request that the entries make; what cannot be read is handed on, so that the contract names it. */
export function bodyOf(entry: NoticeEntry, password: string): z.input<typeof PublishNoticeBody> {
  const { leadsTo, newName: name, newBasis: basis, effectiveOn } = entry;
  return {
    issuerId: entry.issuerId,
    number: entry.number,
    kind: entry.kind,
    title: entry.title,
    reason: entry.reason,
    fromScaleId: entry.fromScaleId,
    toScaleId: leadsTo === 'other' ? entry.toScaleId : null,
    newScale: leadsTo === 'new' ? { name, basis, validFrom: effectiveOn } : null,
    effectiveOn,
    madeKnownOn: entry.madeKnownOn === '' ? undefined : entry.madeKnownOn,
    threshold: orNull(entry.threshold),
    replacesId: orNull(entry.replacesId),
    terms: entry.terms.map((term) => ({
      quantity: term.quantity === '' ? null : term.quantity,
      performedFrom: orNull(term.performedFrom),
      performedTo: orNull(term.performedTo),
      nominalFrom: orNull(term.nominalFrom),
      nominalTo: orNull(term.nominalTo),
      shiftPerKilogram: pointsOf(term),
      addedUPerKilogram: term.addedU === '' ? 0 : Number(grams(term.addedU)),
    })),
    password,
  };
}

/** The same as changes of a dry run. */
export function changesOf(body: PublishNoticeBody): WhatIfChange[] {
  return body.terms.map(({ quantity, performedFrom, performedTo, nominalFrom, nominalTo, ...brings }) => ({
    kind: 'notice',
    issuerId: body.issuerId,
    fromScaleId: body.fromScaleId,
    ...(quantity && { quantity }),
    ...(performedFrom && { performedFrom }),
    ...(performedTo && { performedTo }),
    ...(nominalFrom && { nominalFrom }),
    ...(nominalTo && { nominalTo }),
    ...brings,
  }));
}

const FIELDS: readonly (readonly [body: RegExp, entry: string])[] = [
  [/^terms\.(\d+)\.shiftPerKilogram\.(\d+)\.(on|shift)$/, 'terms.$1.points.$2.$3'],
  [/^terms\.(\d+)\.shiftPerKilogram$/, 'terms.$1.points.0.shift'],
  [/^terms\.(\d+)\.addedUPerKilogram$/, 'terms.$1.addedU'],
  [/^newScale\.name$/, 'newName'],
  [/^newScale\.basis$/, 'newBasis'],
  [/^newScale\.validFrom$/, 'effectiveOn'],
];

/** The field of the form that a field of the request stands in. */
export function entryField(path: string): string {
  const known = FIELDS.find(([body]) => body.test(path));
  return known ? path.replace(known[0], known[1]) : path;
}

/** One shift for every day needs no day; the contract asks for one. */
function pointsOf({ points }: TermEntry): { on: string; shift: string }[] {
  const isConstant = points.length === 1 && points[0]!.on === '';
  return points.map(({ on, shift }) => ({ on: isConstant ? '2000-01-01' : on, shift: grams(shift) }));
}

/** Micrograms to grams as plain text; what is no number stays as it was typed. */
function grams(text: string): string {
  return scaled(text, (value) => value.times(GRAMS_PER_MICROGRAM));
}

function micrograms(text: string): string {
  return scaled(text, (value) => value.div(GRAMS_PER_MICROGRAM));
}

function scaled(text: string, by: (value: Decimal) => Decimal): string {
  try {
    return decimalText(by(new Decimal(text)));
  } catch {
    return text;
  }
}

function orNull(text: string): string | null {
  return text.trim() === '' ? null : text.trim();
}

function jsonOf(text: string | null): unknown {
  try {
    return JSON.parse(text ?? '');
  } catch {
    return null;
  }
}
