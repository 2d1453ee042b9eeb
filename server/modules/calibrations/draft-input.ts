import type { z } from 'zod';
import { decimalText } from '#shared/decimal.ts';
import { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import { type DraftContent, type DraftLine, type OpenPoint } from '#shared/contracts/drafts.ts';
import { Day } from '#shared/contracts/common.ts';
import { convertDecimals, convertUnit } from '#shared/engine/quantity/units.ts';
import type { DraftFacts } from './draft-facts.ts';
import { draftQuestions } from './draft-questions.ts';
import { readReferences } from './draft-references.ts';
import { missing, wrong } from './open-points.ts';
import { readCoverage, readFactor, readMass, type Reading } from './read-typed.ts';

export interface DraftReading {
  /** Complete enough for the rules of issuing; null while something is missing or cannot be read. */
  input: CalibrationInput | null;
  points: OpenPoint[];
}

type LineInput = z.input<typeof CalibrationInput>['lines'][number];

/**
 * Reads a draft as it was typed into the calibration it describes. Pure: what cannot be read, is missing or asks
 * a question becomes an open point at its field, with what was received, what is expected and the clause.
 */
export function readDraft(content: DraftContent, facts: DraftFacts): DraftReading {
  const points: OpenPoint[] = [...headPoints(content, facts)];
  const lines = content.lines.map((line, at) => readLine(line, at, content, facts, points));
  if (content.lines.length === 0) {
    points.push(missing('lines', 'Enter at least one result.', 'a weight with its value'));
  }
  points.push(...draftQuestions(content.lines, lines, facts));
  if (points.some((point) => point.kind === 'missing' || point.kind === 'wrong'))
    return { input: null, points };
  const parsed = CalibrationInput.safeParse({
    issuerId: content.issuerId,
    registeredById: facts.laboratoryId,
    certificateNo: content.certificateNo,
    issuedOn: content.issuedOn.trim(),
    performedBegin: content.performedBegin.trim(),
    performedEnd: content.performedEnd.trim(),
    datePrecision: content.datePrecision,
    method: content.method,
    decisionRule: content.decisionRule,
    documentId: content.documentId,
    lines: lines.filter((line) => line !== null),
  });
  if (parsed.success) return { input: parsed.data, points };
  for (const issue of parsed.error.issues) {
    points.push(wrong(draftField(issue.path.join('.')), issue.message, null, null));
  }
  return { input: null, points };
}

/** The field of the draft that a field of the calibration was read from. */
export function draftField(field: string): string {
  return field
    .replace(/^(lines\.\d+)\.deviation$/, '$1.value')
    .replace(/^(lines\.\d+)\.rootKind$/, '$1.references');
}

function headPoints(content: DraftContent, facts: DraftFacts): OpenPoint[] {
  const points: OpenPoint[] = [];
  if (content.issuerId === null) {
    points.push(
      missing('issuerId', 'Say which laboratory issued the certificate.', 'a laboratory of the register'),
    );
  } else if (facts.issuer === null) {
    points.push(
      wrong(
        'issuerId',
        'This laboratory is not in the register.',
        content.issuerId,
        'a laboratory of the register',
      ),
    );
  }
  if (content.certificateNo.trim() === '') {
    points.push(
      missing(
        'certificateNo',
        'Copy the number of the certificate.',
        'the number as printed',
        'ISO/IEC 17025:2017, 7.8.2.1',
      ),
    );
  } else if (content.certificateNo.trim().length > 60) {
    points.push(
      wrong('certificateNo', 'The number is too long.', content.certificateNo, 'at most 60 characters'),
    );
  }
  if (content.method.trim() === '') {
    points.push(
      missing(
        'method',
        'Name the method as the certificate does.',
        'for example "substitution weighing"',
        'ISO/IEC 17025:2017, 7.8.2.1',
      ),
    );
  } else if (content.method.trim().length > 120) {
    points.push(
      wrong('method', 'The name of the method is too long.', content.method, 'at most 120 characters'),
    );
  }
  for (const [field, name] of DAYS) {
    const text = content[field].trim();
    if (text === '')
      points.push(
        missing(field, `Enter the day ${name}.`, 'a day such as 2025-02-20', 'ISO/IEC 17025:2017, 7.8.2.1'),
      );
    else if (!Day.safeParse(text).success)
      points.push(wrong(field, 'This is no day of the calendar.', text, 'a day such as 2025-02-20'));
  }
  return points;
}

const DAYS = [
  ['performedBegin', 'the calibration began'],
  ['performedEnd', 'the calibration ended'],
  ['issuedOn', 'the certificate was issued'],
] as const;

/** One line; null where a part of it is missing or cannot be read. Its points are added to `points`. */
function readLine(
  line: DraftLine,
  at: number,
  content: DraftContent,
  facts: DraftFacts,
  points: OpenPoint[],
): LineInput | null {
  const path = `lines.${at}`;
  const before = points.length;
  const take = <T>(reading: Reading<T>): T | null => {
    if ('point' in reading) points.push(reading.point);
    return 'point' in reading ? null : reading.value;
  };
  const standard = line.standardId === null ? undefined : facts.standards.get(line.standardId);
  if (line.standardId === null) {
    points.push(
      missing(
        `${path}.standardId`,
        'Choose the weight.',
        'a weight of the register',
        'ISO/IEC 17025:2017, 7.8.2.1',
      ),
    );
  } else if (!standard) {
    points.push(
      wrong(
        `${path}.standardId`,
        'This weight is not in the register, or not yours to calibrate.',
        line.standardId,
        'a weight of the register',
      ),
    );
  }
  const value = take(
    readMass(line.value, line.unit, `${path}.value`, 'Copy the value from the certificate.'),
  );
  const expanded = line.uNotStated
    ? null
    : take(
        readMass(
          line.expandedU,
          line.uUnit,
          `${path}.expandedU`,
          'Copy the expanded uncertainty, or say that none is stated.',
          'ISO/IEC 17025:2017, 7.8.4.1',
        ),
      );
  const k = line.uNotStated ? null : take(readFactor(line.k, `${path}.k`));
  const coverage = line.uNotStated ? null : take(readCoverage(line.coverage, `${path}.coverage`));
  const references = readReferences(line, path, content, facts, standard, points);
  if (points.length > before && points.slice(before).some((point) => point.kind !== 'note')) return null;
  if (!value || !standard || line.standardId === null) return null;
  const grams = convertUnit(value.value, value.unit, 'g');
  const deviation = line.valueIs === 'deviation' ? grams : grams.minus(standard.nominal);
  return {
    standardId: line.standardId,
    quantity: line.quantity,
    medium: line.medium,
    stage: line.stage,
    deviation: decimalText(deviation),
    reportedUnit: value.unit,
    reportedDecimals: value.decimals,
    expandedU: expanded && decimalText(convertUnit(expanded.value, expanded.unit, 'g')),
    reportedUDecimals: expanded && convertDecimals(expanded.decimals, expanded.unit, value.unit),
    k,
    coverage,
    class: line.class,
    underAccreditation: line.underAccreditation,
    unitConfirmed: line.unitConfirmed,
    rootKind: references.length === 0 ? 'recognized certificate' : null,
    references,
  };
}
