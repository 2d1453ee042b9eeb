import type { Check } from './judge.ts';

/** Where a finding is mended. */
export type MendingPlace =
  /** A new calibration of the weight, leaning on a value of the reference that stands. */
  | 'new calibration'
  /** A new calibration of the reference, before it is leaned on again. */
  | 'calibration of the reference'
  /** The programme that the laboratory keeps for the reference. */
  | 'programme'
  /** The certificate: a further revision of it. */
  | 'certificate'
  /** The certificate of the reference. */
  | 'certificate of the reference'
  /** What is on record of the weight. */
  | 'weight'
  /** What is on record of the reference's weight. */
  | 'weight of the reference'
  /** What is on record of the laboratory: recognitions, scope, authorisations. */
  | 'laboratory'
  /** Further up or down the chain: no one place. */
  | 'chain';

/** What would mend a finding: the next step, and where it is taken. */
export interface Mending {
  step: string;
  place: MendingPlace;
}

type Asked = Pick<Check, 'rule' | 'sentence' | 'outcome'> & { subject: { type: Check['subject']['type'] } };

const mend = (place: MendingPlace, step: string): Mending => ({ place, step });

const LEAN_ANEW = mend(
  'new calibration',
  'Calibrate the weight again, leaning on a value of the reference that stands.',
);
const USE_NEWER = mend(
  'new calibration',
  'Calibrate the weight again with the newest value of the reference.',
);
const CALIBRATE_REFERENCE = mend(
  'calibration of the reference',
  'Have the reference calibrated again before it is leaned on.',
);
const STATE_PROGRAMME = mend(
  'programme',
  'State the programme for the reference: interval, method and reason.',
);
const CORRECT = mend('certificate', 'Correct the certificate by a further revision.');
const LOOK_AND_CORRECT = mend(
  'certificate',
  'Look at the certificate and what was weighed; where it is wrong, a further revision corrects it.',
);
const LINK_REFERENCE = mend('certificate', 'Link the reference to the result by a further revision.');
const ABOUT_REFERENCE = mend('certificate of the reference', 'Look at the certificate of the reference.');
const ABOUT_WEIGHT = mend('weight', 'Enter what is missing of the weight, or correct what is on record.');
const ABOUT_REFERENCES_WEIGHT = mend(
  'weight of the reference',
  'Enter what is missing of the reference’s weight: its density with its U.',
);
const ABOUT_LABORATORY = mend(
  'laboratory',
  'Record what held on that day: recognition, scope or authorisation; else the certificate needs a further revision.',
);

/** By rule, and where one rule finds different things, by its sentence. What is not here is mended where it was found. */
const MENDINGS: Readonly<Record<string, Mending | Readonly<Record<string, Mending>>>> = {
  'B-01': ABOUT_WEIGHT,
  'B-02': ABOUT_WEIGHT,
  'B-03': ABOUT_WEIGHT,
  'B-04': ABOUT_WEIGHT,
  'B-06': ABOUT_WEIGHT,
  'B-08': LEAN_ANEW,
  'B-09': ABOUT_WEIGHT,
  'B-10': LINK_REFERENCE,
  'B-11': LINK_REFERENCE,
  'B-12': { later: LEAN_ANEW, 'bracketing too late': LEAN_ANEW, '': ABOUT_REFERENCE },
  'B-13': { later: LEAN_ANEW, '': ABOUT_REFERENCE },
  'B-14': {
    late: LEAN_ANEW,
    'ran over': LEAN_ANEW,
    'ended since': CALIBRATE_REFERENCE,
    'no programme': STATE_PROGRAMME,
    'not relied on': STATE_PROGRAMME,
    '': ABOUT_REFERENCE,
  },
  'B-15': {
    superseded: USE_NEWER,
    withdrawn: LEAN_ANEW,
    'superseded since': USE_NEWER,
    'withdrawn since': LEAN_ANEW,
    '': ABOUT_REFERENCE,
  },
  'B-16': ABOUT_REFERENCES_WEIGHT,
  'B-17': LOOK_AND_CORRECT,
  'B-18': LOOK_AND_CORRECT,
  'B-19': LOOK_AND_CORRECT,
  'B-20': LOOK_AND_CORRECT,
  'B-21': { 'reference without uncertainty': USE_NEWER, '': CORRECT },
  'B-22': { smaller: CORRECT, larger: CORRECT, '': ABOUT_REFERENCE },
  'B-24': mend('new calibration', 'Calibrate the weight again with the value as the notice corrects it.'),
  'B-26': ABOUT_LABORATORY,
  'B-27': ABOUT_LABORATORY,
  'B-38': ABOUT_LABORATORY,
  'B-45': ABOUT_LABORATORY,
  'B-53': STATE_PROGRAMME,
  'B-54': STATE_PROGRAMME,
  'B-81': USE_NEWER,
  'X-01': LOOK_AND_CORRECT,
};

const ALONG_THE_CHAIN = mend('chain', 'Walk the chain: the step named above is where it is mended.');

/**
 * What would mend a finding, as the next step and the place where it is taken; null where nothing is amiss. A rule
 * without an entry is answered by what it is about, so that a new rule never leaves the reader without a way on.
 */
export function mendingOf({ rule, sentence, outcome, subject }: Asked): Mending | null {
  if (outcome === 'holds' || outcome === 'does not apply') return null;
  const entry = MENDINGS[rule];
  if (entry === undefined) return subject.type === 'chain' ? ALONG_THE_CHAIN : CORRECT;
  if ('place' in entry) return entry as Mending;
  return entry[sentence ?? ''] ?? entry[''] ?? CORRECT;
}

/** The rules with an entry of their own, with the sentences that it tells apart. */
export const MENDED_RULES: ReadonlyMap<string, readonly string[]> = new Map(
  Object.entries(MENDINGS).map(([rule, entry]) => [
    rule,
    'place' in entry ? [] : Object.keys(entry).filter((sentence) => sentence !== ''),
  ]),
);
