/** Where a rule comes from. */
export interface Clause {
  /** Days of issue from which this edition applies; null: from the beginning of the register. */
  from: string | null;
  clause: string;
  edition: string;
  /** `memory`: not seen in print, to be presented with that reserve; `practice`: common practice, no source. */
  evidence: 'memory' | 'practice';
}

const ISO_17025 = 'ISO/IEC 17025:2017';
const R_111 = 'OIML R 111-1:2004';
const D_28 = 'OIML D 28:2004';
const VIM = 'JCGM 200:2012';
const GUM = 'JCGM 100:2008';
const P10 = 'ILAC P10:07/2020';
const P14 = 'ILAC P14:09/2020';

function memory(clause: string, ...editions: string[]): Clause[] {
  return [{ from: null, clause, edition: `${editions.join('; ')} (clause from memory)`, evidence: 'memory' }];
}

function practice(edition = 'common practice, no source'): Clause[] {
  return [{ from: null, clause: 'none', edition, evidence: 'practice' }];
}

/**
 * Clauses and editions by rule, newest last: a new edition is a further row, no new release of a rule. Clause
 * numbers and edition marks are from memory unless a row says otherwise.
 */
export const CLAUSES: Readonly<Record<string, readonly Clause[]>> = {
  'B-01': memory('ISO/IEC 17025, 7.4.2 and 7.8.2.1 g; R 111-1, 13', ISO_17025, R_111),
  'B-02': memory('4', R_111),
  'B-03': memory('10; 15.2', R_111, D_28),
  'B-04': memory('10, Table 5', R_111),
  'B-06': memory('9.1, Tables 3 and 4', R_111),
  'B-08': memory('6.4.9; 6.4.13 h', ISO_17025),
  'B-09': memory('6; 7', R_111),
  'B-10': memory('6.5.1; A.2', ISO_17025),
  'B-11': memory('7.5.1', ISO_17025),
  'B-12': memory('2.40', VIM),
  'B-13': memory('6.4.4', ISO_17025),
  'B-14': memory('6.4.6 to 6.4.8; 6.4.13 e', ISO_17025),
  'B-15': memory('7.8.8; 6.4.11', ISO_17025),
  'B-16': memory('4; 5', D_28),
  'B-17': practice(),
  'B-18': practice(),
  'B-19': memory('7.7.1; 7.10', ISO_17025),
  'B-20': memory('4; 5', D_28),
  'B-21': memory('VIM 2.40 note 1; GUM 5.2', VIM, GUM),
  'B-22': memory('GUM 4.3.3', GUM, P14),
  'B-23': memory('R 111-1, C.6; EA-4/02, S2', R_111, 'EA-4/02 M:2022'),
  'B-24': memory(
    'effective value: certificate with the notices since',
    'Notices of the CCM on the mass scale',
  ),
  'B-25': memory('10.2; C.5', R_111),
  'B-26': memory('best measurement capability', P14),
  'B-27': memory('5.3; 8.1', ISO_17025),
  'B-28': memory('GUM 7.2.6', P14, GUM),
  'B-29': memory('5.2', R_111),
  'B-30': memory('R 111-1, 5.3; JCGM 106, 8.2.3', R_111, 'JCGM 106:2012'),
  'B-31': memory('7.8.6', ISO_17025),
  'B-32': memory('G.4; G.6.6', GUM),
  'B-36': memory('7.8.4.1 d', ISO_17025),
  'B-38': memory('6.2.6; 7.8.2.1 o', ISO_17025),
  'B-40': memory('7.8.8', ISO_17025),
  'B-42': memory('15.2.2', R_111),
  'B-43': memory('VIM 2.41 to 2.43; ISO/IEC 17025, 6.5', VIM, ISO_17025),
  'B-44': memory('2.40', VIM),
  'B-45': memory('P10, routes 1 to 3b; ISO/IEC 17025, A.3', P10, ISO_17025),
  'B-46': memory('VIM 2.40 note 1; GUM 5.2', VIM, GUM),
  'B-47': memory('critical parameter above 25 %', 'NIST GMP 11'),
  'B-48': memory('5.2', GUM),
  'B-49': memory('intervals of the chain; longest interval', P10, 'NIST GMP 11'),
  'B-50': memory('scale version of each value', 'Notices of the CCM on the mass scale'),
  'B-52': memory('2.41 note 4', VIM),
  'B-53': memory('6.4.7', ISO_17025, 'ILAC G24:2022 (OIML D 10)'),
  'B-54': memory('longest interval; extension of intervals', 'ILAC G24:2022 (OIML D 10)', 'NIST GMP 11'),
  'B-81': memory('6.4.11', ISO_17025),
  'X-01': practice('a question of our own: common practice, no source'),
};

/**
 * The clause of a rule in the edition that applied on a day.
 * @throws Error for a rule without a row
 */
export function clauseOn(rule: string, day: string): Clause {
  const clause = CLAUSES[rule]?.findLast((row) => row.from === null || row.from <= day);
  if (!clause) throw new Error(`Rule ${rule} has no clause for ${day}: add a row to CLAUSES.`);
  return clause;
}
