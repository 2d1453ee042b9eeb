import type { NoticeRow, NoticeOwnRow, NoticeSummary } from '#shared/contracts/notices.ts';
import { Decimal } from '#shared/decimal.ts';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import type { State } from '#shared/states.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { usePreferences, type Preferences } from '#src/lib/preferences.ts';

const STATES: Record<NoticeSummary['state'], State> = {
  'in force': 'sound',
  'not yet in force': 'caution',
  replaced: 'does not apply',
};

/** How a notice stands today. */
export function NoticeStateMark({ state }: { state: NoticeSummary['state'] }) {
  return <StateMark state={STATES[state]}>{state}</StateMark>;
}

/** A computed shift, three digits, signed; "none" for zero. */
export function ShiftText({ grams }: { grams: number }) {
  if (grams === 0) return <span className="text-ink-3">none</span>;
  return <Quantity value={threeDigits(grams)} kind="deviation" shownIn="ug" />;
}

/** A standard uncertainty that is added; "none" for zero. */
export function AddedUText({ grams }: { grams: number }) {
  if (grams === 0) return <span className="text-ink-3">none</span>;
  return <Quantity value={threeDigits(grams)} kind="value" shownIn="ug" />;
}

/** From scale to scale, or the one that stays. */
export function ScalesText({
  notice: { fromScale, toScale },
}: {
  notice: Pick<NoticeSummary, 'fromScale' | 'toScale'>;
}) {
  return toScale ? (
    <>
      {fromScale.name} to {toScale.name}
    </>
  ) : (
    <>{fromScale.name} stays</>
  );
}

const WORDS: Record<NoticeRow['word'], State> = {
  none: 'does not apply',
  material: 'caution',
  'verdict changes': 'broken',
};

/** The word for a weight of others. */
export function WordMark({ word }: { word: NoticeRow['word'] }) {
  return <StateMark state={WORDS[word]}>{word === 'none' ? 'no action needed' : word}</StateMark>;
}

/** What is to be done about a value of one's own, and why. */
export function WhatToDo({ row }: { row: NoticeOwnRow }) {
  const preferences = usePreferences();
  return (
    <StateMark state={WORDS[row.word]}>
      <span className="text-ink">{whatToDo(row, preferences)}</span>
    </StateMark>
  );
}

function whatToDo(row: NoticeOwnRow, { decimalMark }: Preferences): string {
  if (row.word === 'verdict changes') {
    return row.classAfter === 'keeps'
      ? `It keeps class ${row.class} with this notice, and did not before. State the class anew.`
      : `With this notice it does not keep class ${row.class}. Use the value after, and state the class anew.`;
  }
  const { ratio, expandedUBefore, expandedUAfter } = row;
  if (ratio === null || expandedUBefore === null || expandedUAfter === null) {
    return 'Judge it: its certificate states no U to weigh it by.';
  }
  const all = Math.abs(ratio) * Number(row.expandedU);
  const isCumulative = Math.abs(all - Math.abs(Number(row.shift))) > 1e-3 * all;
  const growth = expandedUAfter / Number(row.expandedU) - 1;
  const reasons = [
    ratio === 0
      ? 'the value does not move'
      : `the shift${isCumulative ? ', with earlier notices,' : ''} is ${percent(Math.abs(ratio), decimalMark)} of U`,
    ...(growth > 0 ? [`U grows by ${percent(growth, decimalMark)}`] : []),
  ];
  if (row.word === 'none') return `No action needed, because ${reasons.join(' and ')}.`;
  return `Material: ${reasons.join(' and ')}. Use the value after.`;
}

function percent(fraction: number, decimalMark: Preferences['decimalMark']): string {
  if (fraction === 0) return '0\u2009%';
  if (fraction < 0.001) return `below 0${decimalMark}1\u2009%`;
  const digits = new Decimal(fraction).times(100).toSignificantDigits(2);
  return `${formatDecimal(digits.toFixed(), { decimalMark })}\u2009%`;
}

function threeDigits(grams: number): string {
  return new Decimal(grams).toSignificantDigits(3).toFixed();
}
