import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { twin } from './complete-sources.ts';
import type { IssueFacts, ReferenceFacts, StandardFacts } from './issue-facts.ts';
import type { IssueProblem } from './issue-problem.ts';

/** What keeps the references of one line from being used as they are named. */
export function referenceProblems(
  line: CalibrationLine,
  path: string,
  input: CalibrationInput,
  facts: IssueFacts,
  standard: StandardFacts,
): IssueProblem[] {
  const problems: IssueProblem[] = [];
  const seen = new Set<string>();
  for (const [at, used] of line.references.entries()) {
    const field = `${path}.references.${at}`;
    const reference = facts.references.get(used.valueUid);
    if (!reference) {
      problems.push({
        field: `${field}.valueUid`,
        message: 'This reference value is not in the register. Keep the sheet as a draft until it is.',
        received: used.valueUid,
        clause: 'ISO/IEC 17025:2017, 6.5.1',
      });
      continue;
    }
    const key = `${used.valueUid} ${used.role}`;
    if (seen.has(key)) {
      problems.push({
        field: `${field}.valueUid`,
        message: `${reference.registryNo}, ${reference.certificateNo} is named twice. Add the two sensitivities.`,
        received: reference.certificateNo,
      });
    }
    seen.add(key);
    problems.push(...useProblems(used, field, input, reference));
    problems.push(...kindProblem(line, `${field}.valueUid`, input, reference, facts, standard));
  }
  return problems;
}

function useProblems(
  used: CalibrationLine['references'][number],
  field: string,
  input: CalibrationInput,
  reference: ReferenceFacts,
): IssueProblem[] {
  const problems: IssueProblem[] = [];
  if (used.usedBegin > used.usedEnd || used.usedEnd > input.issuedOn) {
    problems.push({
      field: `${field}.usedEnd`,
      message: `The use of ${reference.registryNo} ends before it begins, or after the certificate was issued.`,
      received: used.usedEnd,
      expected: `from ${used.usedBegin} to ${input.issuedOn}`,
    });
  }
  if (used.role === 'reference' && used.sensitivity === 0) {
    problems.push({
      field: `${field}.sensitivity`,
      message: 'A reference with sensitivity 0 carries nothing. Give its sensitivity, or leave it out.',
      received: '0',
      expected: '1 for a comparison at equal nominal; 0.5 for 500 g from 1 kg',
    });
  }
  if (used.usedAs === 'class limit' && reference.class === null && used.usedExpandedU === null) {
    problems.push({
      field: `${field}.usedExpandedU`,
      message: `${reference.registryNo} has no class, so it has no class limit to be used by.`,
      received: 'nothing',
      expected: 'the limit that was used, or another way of use',
    });
  }
  return problems;
}

/**
 * Rule B-16: mass and conventional mass differ by 94 mg/kg for platinum-iridium; a change of kind at E1 to F1
 * needs the volume with its uncertainty (OIML D 28).
 */
function kindProblem(
  line: CalibrationLine,
  field: string,
  input: CalibrationInput,
  reference: ReferenceFacts,
  facts: IssueFacts,
  standard: StandardFacts,
): IssueProblem[] {
  const isFine = ['E1', 'E2', 'F1'].includes(line.class ?? standard.class ?? '');
  if (!isFine || reference.quantity === line.quantity || twin(line, input)) return [];
  const converted = line.quantity === 'conventional mass' ? reference.volumeSource : standard.volumeSource;
  if (converted || line.sources.some(({ sourceUid }) => facts.sources.get(sourceUid)?.kind === 'volume')) {
    return [];
  }
  const whose = line.quantity === 'conventional mass' ? reference.registryNo : standard.registryNo;
  return [
    {
      field,
      message: `The reference value is a ${reference.quantity} and the result a ${line.quantity}. Enter the density of ${whose} with its U, so that the conversion and its uncertainty are known.`,
      received: reference.quantity,
      expected: line.quantity,
      clause: 'OIML D 28',
    },
  ];
}
