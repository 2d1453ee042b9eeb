import { WhatIfChange } from '#shared/contracts/downstream.ts';
import type { DecimalMark } from '#shared/engine/quantity/read-number.ts';
import { readAmount } from './read-amount.ts';

/** A notice as it is typed. */
export interface NoticeEntry {
  issuerId: string;
  /** Empty: of either kind. */
  quantity: string;
  performedFrom: string;
  performedTo: string;
  nominalFrom: string;
  nominalTo: string;
  points: { on: string; shift: string }[];
  /** Empty: none. */
  addedU: string;
}

export const EMPTY_NOTICE: NoticeEntry = {
  issuerId: '',
  quantity: '',
  performedFrom: '',
  performedTo: '',
  nominalFrom: '',
  nominalTo: '',
  points: [{ on: '', shift: '' }],
  addedU: '',
};

/** The notice that was typed, or what is wrong with it, by field; `whole` for what no field shows. */
export interface ReadNotice {
  change: WhatIfChange | null;
  problems: Record<string, string | undefined>;
}

/** Reads a notice. A shift of "0" needs no unit; every other mass names its own. */
export function noticeFrom(entry: NoticeEntry, mark: DecimalMark): ReadNotice {
  const problems: Record<string, string | undefined> = {};
  const mass = (field: string, text: string, sign: 'any' | 'positive'): string | undefined => {
    if (/^[-+]?0([.,]0*)?$/.test(text.trim()) && sign === 'any') return '0';
    const read = readAmount(text, mark);
    if (read.kind === 'unreadable') problems[field] = read.why;
    if (read.kind !== 'amount') return undefined;
    if (sign === 'positive' && read.grams.startsWith('-')) problems[field] = 'Write an amount above zero.';
    return read.grams;
  };
  const points = entry.points.map(({ on, shift }, at) => {
    if (on.trim() === '') problems[`points.${at}.on`] = 'Write a day, such as 2025-02-20.';
    if (shift.trim() === '') problems[`points.${at}.shift`] = 'Write a shift with its unit, or 0.';
    return { on: on.trim(), shift: mass(`points.${at}.shift`, shift, 'any') };
  });
  const addedU = mass('addedU', entry.addedU, 'positive');
  const asked = {
    kind: 'notice',
    issuerId: entry.issuerId,
    quantity: entry.quantity || undefined,
    performedFrom: entry.performedFrom.trim() || undefined,
    performedTo: entry.performedTo.trim() || undefined,
    nominalFrom: mass('nominalFrom', entry.nominalFrom, 'positive'),
    nominalTo: mass('nominalTo', entry.nominalTo, 'positive'),
    shiftPerKilogram: points,
    addedUPerKilogram: addedU === undefined ? 0 : Number(addedU),
  };
  if (Object.keys(problems).length > 0) return { change: null, problems };
  const parsed = WhatIfChange.safeParse(withoutMissing(asked));
  if (parsed.success) return { change: parsed.data, problems };
  for (const { path, message } of parsed.error.issues) {
    const field = path.join('.').replace('shiftPerKilogram', 'points');
    problems[field in entry && field !== 'points' ? field : field.startsWith('points.') ? field : 'whole'] ??=
      message;
  }
  return { change: null, problems };
}

function withoutMissing(asked: object): object {
  return Object.fromEntries(Object.entries(asked).filter(([, value]) => value !== undefined));
}
