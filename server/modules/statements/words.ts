import type { ChainLink, ChainResponse, ChainValue } from '#shared/contracts/chains.ts';
import { Decimal } from '#shared/decimal.ts';
import { datedTo } from '#shared/numbers/dated-to.ts';
import { quantitySpans } from '#shared/numbers/ink-spans.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { twoDigits } from '#shared/numbers/small-amount.ts';

const STANDING = {
  sound: 'holds its checks',
  caution: 'calls for caution',
  broken: 'fails a check',
  'not judged': 'cannot be judged',
} as const;

const ROOTS: Readonly<Record<NonNullable<ChainValue['rootKind']>, string>> = {
  'realization run': 'a run of a realization of the definition',
  'consensus value': 'the consensus value of the kilogram, agreed from a comparison of realizations',
  'recognized certificate': 'a certificate that is recognized under an arrangement, where the chain may stop',
  'earlier definition': 'the earlier definition of the kilogram',
  'accepted stop': 'a stop that was accepted with evidence',
};

const USED_AS: Readonly<Record<NonNullable<ChainLink['usedAs']>, string>> = {
  certificate: 'with the value of its certificate',
  'by notice': 'with its value as corrected by a notice',
  'class limit': 'with the limit of its class',
  fit: 'with a value predicted from its history',
  bracketing: 'with the mean of the values before and after',
};

/** A number with its U and unit, in one line of text. */
export function quantityWords(value: string, expandedU: string | null, k: string | null): string {
  return plain({
    value,
    expandedUncertainty: expandedU,
    coverageFactor: k,
    kind: 'deviation',
    shownIn: 'auto',
  });
}

/** An uncertainty given as a number of grams. */
export function uncertaintyWords(grams: number, k: number): string {
  return plain({ value: grams.toFixed(15), kind: 'uncertainty', coverageFactor: k, shownIn: 'auto' });
}

/** Whether a shift in grams moves nothing. */
export function isZero(grams: string): boolean {
  return new Decimal(grams).isZero();
}

/** A shift in grams, with its sign, to two significant digits. */
export function shiftWords(grams: string): string {
  const value = twoDigits(grams);
  return value === null ? 'less than 0.01\u2009µg' : plain({ value, kind: 'deviation', shownIn: 'auto' });
}

function plain(input: Parameters<typeof quantitySpans>[0]): string {
  return quantitySpans(input)
    .map(({ text }) => text)
    .join('');
}

/** The weight in a line: registry number, nominal, class. */
export function weightWords(value: Pick<ChainValue, 'registryNo' | 'nominal' | 'class'>): string {
  return `${value.registryNo}, ${nominalText(value.nominal)}${value.class ? `, class ${value.class}` : ''}`;
}

/** The question in a sentence. */
export function askedWords({ day, known, as, ruleSet, engine }: ChainResponse['question']): string {
  const links = as === 'now known' ? 'links as now known' : 'links as certified';
  return `In force on ${day}, as known on ${known}; ${links}; rule set ${ruleSet}, engine ${engine}.`;
}

/** The definition that the roots were determined under. */
export function definitionWords(definition: ChainResponse['definition']): string {
  const planck =
    'the Planck constant, h = 6.626\u2009070\u200915 × 10⁻³⁴ J s exactly, in force since 2019-05-20';
  const prototype = 'the mass of the international prototype, the definition until 2019-05-20';
  if (definition === 'planck constant') return planck;
  return definition === 'international prototype' ? prototype : `${prototype}; and ${planck}`;
}

interface StepContext {
  names: ReadonlyMap<string, string>;
  /** What failed at this step, in sentences. */
  failing: readonly string[];
  isFocus: boolean;
}

/** One step of the chain as a calm paragraph: who, when, what, on what, and how that stands. */
export function stepWords(
  value: ChainValue,
  links: readonly ChainLink[],
  { names, failing, isFocus }: StepContext,
): string {
  const references = links.filter((link) => link.role === 'reference');
  const informing = links.filter((link) => link.role === 'informs');
  return [
    calibrationSentence(value, isFocus),
    value.rootKind === null ? '' : `Here the chain stands on ${ROOTS[value.rootKind]}.`,
    value.scaleVersion === null ? '' : `It is given on the mass scale ${value.scaleVersion}.`,
    ...references.map((link) => linkSentence(link, names)),
    informing.length === 0 ? '' : `${namesIn(informing, names)} informed it; nothing flows.`,
    ...failing,
    standingSentence(value),
    nowSentence(value),
  ]
    .filter((sentence) => sentence !== '')
    .join(' ');
}

function calibrationSentence(value: ChainValue, isFocus: boolean): string {
  const day = datedTo(value.performedEnd, value.datePrecision);
  const on = value.datePrecision === 'day' ? `on ${day}` : `in ${day}`;
  const what = `${value.quantity}, deviation from nominal ${quantityWords(value.deviation, value.expandedU, value.k)}`;
  const k = value.k === null ? ' (U not stated)' : ` (k = ${value.k})`;
  const subject = isFocus ? `The weight ${value.registryNo}` : value.registryNo;
  const held = value.holder && value.holder.id !== value.issuer.id ? `, held by ${value.holder.name},` : '';
  return (
    `${subject}, ${nominalText(value.nominal)}${held} was calibrated by ${value.issuer.name} ${on}; ` +
    `certificate ${value.certificateNo} of ${value.issuedOn} states ${what}${k}.`
  );
}

function linkSentence(link: ChainLink, names: ReadonlyMap<string, string>): string {
  const used = usedWords(link);
  const as = link.usedAs === null ? '' : ` ${USED_AS[link.usedAs]}`;
  const flow =
    link.flow === null
      ? 'its share of the variance cannot be worked out'
      : `${shareText(link.flow)} of the weight\u2019s variance flows through this link`;
  const standing =
    link.conduct === link.today
      ? `judged by what was known at use and by what is known now it ${STANDING[link.today]}`
      : `judged by what was known at use it ${STANDING[link.conduct]}, by what is known now it ${STANDING[link.today]}`;
  return `It leaned on ${names.get(link.parentUid)}${used}${as}: ${flow}; ${standing}.`;
}

/** When a reference was used. */
export function usedWords({ usedBegin, usedEnd }: Pick<ChainLink, 'usedBegin' | 'usedEnd'>): string {
  if (usedBegin === null) return '';
  return usedEnd === null || usedEnd === usedBegin
    ? `, used on ${usedBegin}`
    : `, used from ${usedBegin} to ${usedEnd}`;
}

function standingSentence({ state, stateSince }: ChainValue): string {
  if (state === 'in force') return '';
  const since = stateSince === null ? '' : ` since ${stateSince}`;
  return `The value is ${state}${since}.`;
}

function nowSentence({ now }: ChainValue): string {
  if (now === null) return '';
  if (now.shift === null)
    return `What it would be as now known cannot be worked out: ${now.because ?? 'a value is missing'}.`;
  return isZero(now.shift)
    ? 'Something it rests on has changed since; the value itself does not move.'
    : `As now known it lies ${shiftWords(now.shift)} from what was certified.`;
}

function namesIn(links: readonly ChainLink[], names: ReadonlyMap<string, string>): string {
  return links.map((link) => names.get(link.parentUid)).join(', ');
}
