import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { isPositiveSemidefinite } from '#shared/engine/linear/matrix.ts';
import { AppError } from '#server/http/app-error.ts';
import type { IssueFacts, StandardFacts } from './issue-facts.ts';
import type { IssueProblem } from './issue-problem.ts';
import { referenceProblems } from './reference-rules.ts';
import { unitQuestion } from './unit-question.ts';

/** Everything that keeps this calibration from being issued, in the order of the sheet. Empty where nothing does. */
export function issueProblems(input: CalibrationInput, facts: IssueFacts): IssueProblem[] {
  return [
    ...dateProblems(input, facts.today),
    ...partyProblems(input, facts),
    ...input.lines.flatMap((line, at) => lineProblems(line, at, input, facts)),
    ...groupProblems(input),
  ];
}

/**
 * Refuses a calibration that breaks a rule; every problem is named at its field.
 * @throws AppError `unprocessable`
 */
export function refuseProblems(problems: readonly IssueProblem[]): void {
  const first = problems[0];
  if (!first) return;
  const fields = Object.fromEntries(
    problems.toReversed().map(({ field, ...problem }) => [field, problem] as const),
  );
  const more = problems.length > 1 ? ` (and ${problems.length - 1} more)` : '';
  throw new AppError('unprocessable', `${first.message}${more}`, { fields });
}

/** Days in an order that cannot be, or in the future. */
export function dateProblems(
  input: Pick<CalibrationInput, 'performedBegin' | 'performedEnd' | 'issuedOn'>,
  today: string,
): IssueProblem[] {
  const { performedBegin, performedEnd, issuedOn } = input;
  const problems: IssueProblem[] = [];
  if (performedBegin > performedEnd) {
    problems.push({
      field: 'performedEnd',
      message: 'The calibration ends before it begins.',
      received: performedEnd,
      expected: `${performedBegin} or later`,
    });
  }
  if (performedEnd > issuedOn) {
    problems.push({
      field: 'issuedOn',
      message: 'The certificate is issued before the calibration ends.',
      received: issuedOn,
      expected: `${performedEnd} or later`,
      clause: 'ISO/IEC 17025:2017, 7.8.2.1',
    });
  }
  if (issuedOn > today) {
    problems.push({
      field: 'issuedOn',
      message: 'The day of issue lies in the future.',
      received: issuedOn,
      expected: `${today} or earlier`,
    });
  }
  return problems;
}

function partyProblems(input: CalibrationInput, facts: IssueFacts): IssueProblem[] {
  const problems: IssueProblem[] = [];
  for (const field of ['issuerId', 'registeredById'] as const) {
    if (!facts.laboratories.has(input[field])) {
      problems.push({ field, message: 'This laboratory is not in the register.', received: input[field] });
    }
  }
  if (input.documentId !== null && facts.documentLaboratoryId !== input.registeredById) {
    problems.push({
      field: 'documentId',
      message: 'This document is not among those of the laboratory that enters the calibration.',
      received: input.documentId,
    });
  }
  return problems;
}

function lineProblems(
  line: CalibrationLine,
  at: number,
  input: CalibrationInput,
  facts: IssueFacts,
): IssueProblem[] {
  const path = `lines.${at}`;
  const standard = facts.standards.get(line.standardId);
  if (!standard || !isTheirs(standard, input)) {
    return [
      {
        field: `${path}.standardId`,
        message:
          'This weight is not in the register as one of the issuer or of the laboratory that enters it.',
        received: line.standardId,
        expected: 'a weight registered by one of the two',
      },
    ];
  }
  return [
    ...repeatedLine(line, at, input, standard),
    ...uncertaintyProblems(line, path),
    ...rootProblems(line, path, input, facts),
    ...referenceProblems(line, path, input, facts, standard),
    ...sourceProblems(line, path, facts),
    ...unitQuestion(line, standard).map((problem) => ({ ...problem, field: `${path}.deviation` })),
  ];
}

function isTheirs(standard: StandardFacts, input: CalibrationInput): boolean {
  const holders = [standard.ownerId, standard.custodianId, standard.laboratoryId];
  return holders.includes(input.registeredById) || holders.includes(input.issuerId);
}

function repeatedLine(
  line: CalibrationLine,
  at: number,
  input: CalibrationInput,
  standard: StandardFacts,
): IssueProblem[] {
  const first = input.lines.findIndex(
    (other) =>
      other.standardId === line.standardId &&
      other.quantity === line.quantity &&
      other.medium === line.medium &&
      other.stage === line.stage,
  );
  if (first === at) return [];
  return [
    {
      field: `lines.${at}.standardId`,
      message: `Lines ${first + 1} and ${at + 1} give ${standard.registryNo} the same kind of value in the same state. One certificate gives it once.`,
      received: standard.registryNo,
    },
  ];
}

function uncertaintyProblems(line: CalibrationLine, path: string): IssueProblem[] {
  if (line.expandedU === null || line.k !== null) return [];
  return [
    {
      field: `${path}.k`,
      message: 'An expanded uncertainty needs its coverage factor.',
      received: 'nothing',
      expected: 'k as printed on the certificate, usually 2',
      clause: 'JCGM 100:2008, 7.2.3',
    },
  ];
}

function rootProblems(
  line: CalibrationLine,
  path: string,
  input: CalibrationInput,
  facts: IssueFacts,
): IssueProblem[] {
  const leans = line.references.some((reference) => reference.role === 'reference');
  const problems: IssueProblem[] = [];
  if (line.rootKind !== null && leans) {
    problems.push({
      field: `${path}.rootKind`,
      message: `A ${line.rootKind} leans on nothing. Leave its references out, or name them as what informs it.`,
      received: line.rootKind,
    });
  }
  if (line.rootKind === null && !leans && input.issuerId === input.registeredById) {
    problems.push({
      field: `${path}.references`,
      message: 'A result of one’s own names the value of the reference it leaned on.',
      received: 'nothing',
      expected: 'at least one assigned value',
      clause: 'ISO/IEC 17025:2017, 6.5.1',
    });
  }
  if (line.scaleVersionId !== null && !facts.scaleVersionIds.has(line.scaleVersionId)) {
    problems.push({
      field: `${path}.scaleVersionId`,
      message: 'This version of the mass scale is not in the register.',
      received: line.scaleVersionId,
    });
  }
  return problems;
}

function sourceProblems(line: CalibrationLine, path: string, facts: IssueFacts): IssueProblem[] {
  const seen = new Set<string>();
  return line.sources.flatMap(({ sourceUid }, at) => {
    const isKnown = facts.sources.has(sourceUid);
    const isRepeated = seen.has(sourceUid);
    seen.add(sourceUid);
    if (isKnown && !isRepeated) return [];
    const message = isKnown
      ? 'This shared effect is named twice.'
      : 'This shared effect is not in the register.';
    return [{ field: `${path}.sources.${at}.sourceUid`, message, received: sourceUid }];
  });
}

function groupProblems(input: CalibrationInput): IssueProblem[] {
  const { group, lines } = input;
  if (!group) return [];
  const field = 'group.covariance';
  const size = lines.length;
  if (group.covariance.length !== size || group.covariance.some((row) => row.length !== size)) {
    return [
      {
        field,
        message: 'The covariance of the local parts has one row and one column per result.',
        received: `${group.covariance.length} rows`,
        expected: `${size} rows of ${size}`,
      },
    ];
  }
  const { ok, offending } = isPositiveSemidefinite(group.covariance);
  if (ok) return [];
  const pair = offending ? `Results ${offending[0] + 1} and ${offending[1] + 1} contradict each other.` : '';
  return [
    {
      field,
      message:
        `This is not the covariance of anything: it is not symmetric, or a combination of results would have a negative variance. ${pair}`.trim(),
      received: 'a matrix that is not positive semidefinite',
      expected: 'a symmetric, positive semidefinite matrix in g2',
    },
  ];
}
