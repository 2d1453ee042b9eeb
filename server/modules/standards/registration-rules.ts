import type { RegisterSetBody, RegisterStandardBody } from '#shared/contracts/standards.ts';
import type { FieldProblem } from '#shared/errors.ts';

/** A rule that the registration breaks, at a path of the body. */
export type RegistrationProblem = FieldProblem & { field: string };

/** An expanded uncertainty says nothing without its coverage factor (JCGM 100, 6.2.1 and 6.3.1). */
export function densityProblem(
  density: RegisterStandardBody['density'],
  field: string,
): RegistrationProblem | null {
  if (!density?.expandedU || density.k) return null;
  return {
    field: `${field}.k`,
    message: 'Give the coverage factor of the density: without k its U cannot be used.',
    received: 'nothing',
    expected: 'k as printed, usually 2',
    clause: 'JCGM 100:2008, 6.3.1',
  };
}

/** A weight cannot have come into service after today. */
export function inServiceProblem(inServiceFrom: string | null, day: string): RegistrationProblem | null {
  if (inServiceFrom === null || inServiceFrom <= day) return null;
  return {
    field: 'inServiceFrom',
    message: 'The day it came into service lies in the future.',
    received: inServiceFrom,
    expected: `${day} or earlier`,
  };
}

/**
 * Weights of a set that share a nominal must be told apart by their marking (OIML R 111-1:2004, 13; rule
 * B-01, which blocks).
 */
export function duplicateMarkingProblem(members: RegisterSetBody['members']): RegistrationProblem | null {
  const seen = new Map<string, number>();
  for (const [at, member] of members.entries()) {
    const key = `${member.nominal} ${member.marking}`;
    const first = seen.get(key);
    if (first !== undefined) {
      return {
        field: `members.${at}.marking`,
        message: `Weights ${first + 1} and ${at + 1} have the same nominal and the same marking; they could not be told apart.`,
        received: member.marking,
        expected: 'a marking of its own, for example with a dot or a star',
        clause: 'OIML R 111-1:2004, 13',
      };
    }
    seen.set(key, at);
  }
  return null;
}
