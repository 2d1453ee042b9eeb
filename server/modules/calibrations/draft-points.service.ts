import type { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import type { DraftContent, OpenPoint } from '#shared/contracts/drafts.ts';
import { today, type Context } from '#server/http/context.ts';
import { completeSources } from './complete-sources.ts';
import { dayPoints, repeatedCertificate } from './draft-early-points.ts';
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
  const { input, points: typed } = readDraft(content, surroundings.facts);
  const points = added(typed, [
    ...dayPoints(content, today(context)),
    ...(await repeatedCertificate(context.database, content)),
  ]);
  if (!input) return { ...surroundings, input: null, read: null, points };
  // The question of the unit is asked by the reading already, beside the others.
  const all = added(points, await rulePoints(context, input));
  return { ...surroundings, input: all.some(isBlocking) ? null : input, read: input, points: all };
}

/** The points, and those further ones whose field has none that blocks yet. */
function added(points: readonly OpenPoint[], further: readonly OpenPoint[]): OpenPoint[] {
  const asked = new Set(points.filter(isBlocking).map((point) => point.field));
  return [...points, ...further.filter((point) => !asked.has(point.field))];
}

/** Whether a point keeps the draft from being issued. */
export function isBlocking(point: OpenPoint): boolean {
  return point.kind !== 'note';
}

async function rulePoints(context: Context, input: CalibrationInput): Promise<OpenPoint[]> {
  const facts = await issueFacts(context.database, input, today(context));
  const problems = issueProblems(completeSources(input, facts), facts);
  return problems.map(({ field, message, received = null, expected = null, clause = null }): OpenPoint => ({
    field: draftField(field),
    message,
    received,
    expected,
    clause,
    kind: 'wrong',
  }));
}
