import type { CalibrationInput, DraftContent, OpenPoint } from '#shared/contracts/calibrations.ts';
import { readRow } from '#server/db/read.ts';
import { today, type Context } from '#server/http/context.ts';
import { completeSources } from './complete-sources.ts';
import { draftSurroundings, type DraftSurroundings } from './draft-facts.queries.ts';
import { draftField, readDraft } from './draft-input.ts';
import { issueFacts } from './issue-facts.queries.ts';
import { issueProblems } from './issue-rules.ts';

export interface JudgedDraft extends DraftSurroundings {
  /** Null while a point keeps the draft from being issued. */
  input: CalibrationInput | null;
  /** Complete enough to be checked, whatever questions and rules are still open. */
  read: CalibrationInput | null;
  points: OpenPoint[];
}

/** Reads a draft and names every point that keeps it from being issued: what the form says, then the rules of issuing. */
export async function judgeDraft(
  context: Context,
  laboratoryId: string,
  content: DraftContent,
): Promise<JudgedDraft> {
  const surroundings = await draftSurroundings(context.database, laboratoryId, content, today(context));
  const { input, points } = readDraft(content, surroundings.facts);
  if (!input) return { ...surroundings, input: null, read: null, points };
  const rules = await rulePoints(context, input);
  // The question of the unit is asked by the reading already, beside the others.
  const asked = new Set(points.map((point) => point.field));
  const all = [...points, ...rules.filter((point) => !asked.has(point.field))];
  return { ...surroundings, input: all.some(isBlocking) ? null : input, read: input, points: all };
}

/** Whether a point keeps the draft from being issued. */
export function isBlocking(point: OpenPoint): boolean {
  return point.kind !== 'note';
}

async function rulePoints(context: Context, input: CalibrationInput): Promise<OpenPoint[]> {
  const facts = await issueFacts(context.database, input, today(context));
  const problems = issueProblems(completeSources(input, facts), facts);
  const points = problems.map(
    ({ field, message, received = null, expected = null, clause = null }): OpenPoint => ({
      field: draftField(field),
      message,
      received,
      expected,
      clause,
      kind: 'wrong',
    }),
  );
  const { issuerId, certificateNo } = input;
  const known = await readRow(
    context.database,
    'SELECT id FROM calibration WHERE laboratory_id = :issuerId AND certificate_no = :certificateNo',
    { issuerId, certificateNo },
  );
  if (!known) return points;
  return [
    {
      field: 'certificateNo',
      message: 'This certificate of this laboratory is already in the register.',
      received: certificateNo,
      expected: 'a certificate that is not entered yet',
      clause: null,
      kind: 'wrong',
    },
    ...points,
  ];
}
