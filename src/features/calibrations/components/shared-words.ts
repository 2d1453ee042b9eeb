import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';

type Line = CalibrationResponse['lines'][number];

/** What every line of a certificate shares, and so is said once above the table. */
export interface SharedFacts {
  quantity: boolean;
  accreditation: boolean;
}

/** Which facts all lines share. */
export function sharedFacts(lines: readonly Line[]): SharedFacts {
  const isShared = (fact: (line: Line) => unknown): boolean =>
    new Set(lines.map((line) => String(fact(line)))).size < 2;
  return {
    quantity: isShared(({ quantity, medium, stage }) => [quantity, medium, stage].join()),
    accreditation: isShared(({ underAccreditation }) => underAccreditation),
  };
}

/** The shared facts in words: "conventional mass, in air, under accreditation". */
export function sharedWords(lines: readonly Line[]): string {
  const [first] = lines;
  if (!first) return '';
  const shared = sharedFacts(lines);
  return [
    ...(shared.quantity ? quantityWords(first) : []),
    shared.accreditation && (first.underAccreditation ? 'under accreditation' : 'outside accreditation'),
  ]
    .filter(Boolean)
    .join(', ');
}

/** Kind, medium and stage of one line. */
export function quantityWords({ quantity, medium, stage }: Line): string[] {
  return [quantity, `in ${medium}`, ...(stage ? [stage] : [])];
}
