import { Decimal } from '#shared/decimal.ts';
import type { CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { DraftLine, OpenPoint } from '#shared/contracts/drafts.ts';
import type { DraftFacts, DraftStandardFacts } from './draft-facts.ts';
import { unitQuestion } from './unit-question.ts';

interface ReadLine {
  deviation: string;
  expandedU: string | null;
  reportedUnit: CalibrationLine['reportedUnit'];
  quantity: CalibrationLine['quantity'];
}

/** The questions of unit and sign, asked of each line as soon as its value can be read; they wait for an answer. */
export function draftQuestions(
  typed: readonly DraftLine[],
  read: readonly (ReadLine | null)[],
  facts: DraftFacts,
): OpenPoint[] {
  return typed.flatMap((line, at) => {
    const standard = line.standardId === null ? undefined : facts.standards.get(line.standardId);
    const value = read[at];
    if (!standard || !value) return [];
    const field = `lines.${at}.value`;
    return [...unitPoints(line, value, standard, field), ...signPoints(line, value, standard, field)];
  });
}

function unitPoints(
  line: DraftLine,
  value: ReadLine,
  standard: DraftStandardFacts,
  field: string,
): OpenPoint[] {
  const question = unitQuestion(
    { ...value, class: line.class, unitConfirmed: line.unitConfirmed },
    { ...standard, lastConventional: standard.lastValues['conventional mass'] ?? null },
  );
  return question.map(({ message, expected = null, clause = null }) => ({
    field,
    message,
    received: line.value,
    expected,
    clause,
    kind: 'question' as const,
    asks: 'unit' as const,
  }));
}

/**
 * Rule B-17 (common practice, no source): the value differs from the last one by more than both uncertainties
 * together, and with the other sign it would not. Was the sign of the correction taken for that of the error?
 */
function signPoints(
  line: DraftLine,
  value: ReadLine,
  standard: DraftStandardFacts,
  field: string,
): OpenPoint[] {
  const last = standard.lastValues[line.quantity];
  if (line.signConfirmed || !last || value.expandedU === null || last.expandedU === null) return [];
  const U = new Decimal(value.expandedU).pow(2).plus(new Decimal(last.expandedU).pow(2)).sqrt();
  const now = new Decimal(value.deviation);
  const isFar = now.minus(last.deviation).abs().gt(U);
  const isNearReversed = now.plus(last.deviation).abs().lte(U);
  if (!isFar || !isNearReversed) return [];
  return [
    {
      field,
      message: `The last value of ${standard.registryNo} had the other sign (${last.deviation} g). The register keeps value minus nominal; a correction has the opposite sign. Confirm the value if it is right.`,
      received: line.value,
      expected: 'value minus nominal, or confirmed',
      clause: null,
      kind: 'question',
      asks: 'sign',
    },
  ];
}
