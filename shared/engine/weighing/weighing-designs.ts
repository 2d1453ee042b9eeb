/** A published weighing design: nominals in units of the smallest, one row for each weighing. */
export type PublishedDesign = {
  nominals: number[];
  design: number[][];
  restraint: number[];
  check?: number[];
  source: string;
};

/** Rows written as + - 0, one sign for each weight. */
function rows(...signs: string[]): number[][] {
  return signs.map((row) => [...row].map((sign) => (sign === '+' ? 1 : sign === '-' ? -1 : 0)));
}

/**
 * Published designs as presets. `restraint` and `check` are combinations of the weights: the known sum and the
 * check standard. In design 1-1-1-1 the restraint is the sum of the two references, not their mean.
 * Source of all: NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1, page named in each entry.
 */
export const weighingDesigns: Record<string, PublishedDesign> = {
  '1-1-1': {
    nominals: [1, 1, 1],
    design: rows('+-0', '+0-', '0+-'),
    restraint: [1, 0, 0],
    check: [0, 1, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc3411; seen in a reproduction)',
  },
  '1-1-1 each pair twice': {
    nominals: [1, 1, 1],
    design: rows('+-0', '+0-', '0+-', '0-+', '-0+', '-+0'),
    restraint: [0, 0, 1],
    check: [1, 0, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc341j)',
  },
  '1-1-1-1': {
    nominals: [1, 1, 1, 1],
    design: rows('+-00', '+0-0', '+00-', '0+-0', '0+0-', '00+-'),
    restraint: [1, 1, 0, 0],
    check: [1, -1, 0, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc3412)',
  },
  '1-1-1-1-1': {
    nominals: [1, 1, 1, 1, 1],
    design: rows('+-000', '+0-00', '+00-0', '+000-', '0+-00', '0+0-0', '0+00-', '00+-0', '00+0-', '000+-'),
    restraint: [1, 1, 0, 0, 0],
    check: [1, -1, 0, 0, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc3413; seen in a reproduction)',
  },
  '2-2-2-1-1': {
    nominals: [2, 2, 2, 1, 1],
    design: rows('+-000', '+0-00', '0+-00', '+00--', '0+0--', '00+--', '000+-'),
    restraint: [1, 1, 0, 0, 0],
    check: [0, 0, 1, 0, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc3417)',
  },
  '5-3-2-1-1-1': {
    nominals: [5, 3, 2, 1, 1, 1],
    design: rows(
      '+--+-0',
      '+--0+-',
      '+---0+',
      '+--000',
      '+0----',
      '0+-+--',
      '0+--+-',
      '0+---+',
      '00+--0',
      '00+-0-',
      '00+0--',
    ),
    restraint: [1, 1, 1, 0, 0, 0],
    check: [0, 0, 0, 1, 0, 0],
    source:
      'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc341a; seen in a reproduction, signs recovered from the printed solution)',
  },
  '5-3-2-2-1-1-1': {
    nominals: [5, 3, 2, 2, 1, 1, 1],
    design: rows(
      '+--0000',
      '+-0-000',
      '+0---00',
      '+0--0-0',
      '+0--00-',
      '0+0--00',
      '0+0-0-0',
      '0+0-00-',
      '0+00---',
      '0000+-0',
      '00000+-',
      '0000-0+',
    ),
    restraint: [1, 1, 1, 0, 0, 0, 0],
    check: [0, 0, 0, 0, 1, 0, 0],
    source: 'NIST/SEMATECH e-Handbook of Statistical Methods, 2.3.4.1 (mpc341c)',
  },
};
