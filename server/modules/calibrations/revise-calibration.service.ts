import type { z } from 'zod';
import { RevisionInput, type CalibrationInput } from '#shared/contracts/calibration-input.ts';
import { inAct } from '#server/db/act.ts';
import { insertRows } from '#server/db/base-model.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { notFound } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';
import { validate } from '#server/http/validate.ts';
import { ancestorNetwork } from './ancestor-network.queries.ts';
import { completeNotices } from './complete-notices.ts';
import { completeSources } from './complete-sources.ts';
import { valueEndModel } from './graph.model.ts';
import type { IssueFacts } from './issue-facts.ts';
import { issueFacts } from './issue-facts.queries.ts';
import type { IssuedCalibration } from './issue-calibration.service.ts';
import type { IssueProblem } from './issue-problem.ts';
import { issueProblems, refuseProblems } from './issue-rules.ts';
import { matchLines, type ReplacedLine } from './match-lines.ts';
import { writeRevision } from './write-revision.ts';

interface Previous {
  calibrationId: string;
  certificateNo: string;
  issuerId: string;
  registeredById: string;
  revisionId: string;
  n: number;
  issuedOn: string;
}

/**
 * Supersedes the latest revision of a calibration: every line is issued again and says whether its value, U,
 * kind or scale changed, so that correcting an address breaks no chain below (ISO/IEC 17025:2017, 7.8.8).
 * @throws AppError `not-found`, `malformed`, `unprocessable` naming every field (a circle names itself)
 */
export async function reviseCalibration(
  context: Context,
  asked: z.input<typeof RevisionInput>,
  signatoryId: string | null = context.user?.accountId ?? null,
): Promise<IssuedCalibration> {
  const { calibrationId, reason, effectiveOn, ...parsed } = validate(RevisionInput, asked, 'body');
  const description = { kind: 'calibration.revise', laboratoryId: parsed.registeredById, reason } as const;
  return inAct(context, description, async (act) => {
    const previous = await latestRevision(context, calibrationId);
    const replaced = await replacedLines(context, previous.revisionId);
    const facts = await issueFacts(context.database, parsed, today(context));
    const input = await completeNotices(context, completeSources(parsed, facts), facts);
    const { matches, problems } = matchLines(replaced, input.lines);
    refuseProblems([
      ...identityProblems(input, previous),
      ...problems,
      ...issueProblems(input, facts),
      ...(await circleProblems(context, input, facts, previous)),
    ]);
    const changed = input.lines.map((_, at) => matches.find((match) => match.at === at)?.changed ?? 'new');
    const head = { calibrationId, n: previous.n + 1, reason, signatoryId, changed };
    const written = await writeRevision(context, input, facts, head);
    await insertRows(
      valueEndModel(context.database),
      matches.map((match) => ({
        valueId: match.replaced.id,
        kind: 'superseded' as const,
        effectiveOn,
        madeKnownOn: input.issuedOn,
        replacedBy: written.values[match.at]?.id ?? null,
        changed: match.changed,
        reason,
      })),
    );
    const valueUids = written.values.map((value) => value.uid);
    act.record({
      subject: { type: 'calibration', id: calibrationId },
      before: { revisionId: previous.revisionId, valueUids: replaced.map((line) => line.uid) },
      after: {
        revisionId: written.revisionId,
        valueUids,
        effectiveOn,
        contentSha256: written.contentSha256,
        content: written.content,
      },
    });
    return { calibrationId, revisionId: written.revisionId, valueUids };
  });
}

async function latestRevision(context: Context, calibrationId: string): Promise<Previous> {
  const row = await readRow<Previous>(
    context.database,
    `SELECT c.id AS calibrationId, c.certificate_no AS certificateNo, c.laboratory_id AS issuerId,
            c.registered_by_id AS registeredById, r.id AS revisionId, r.n, r.issued_on AS issuedOn
     FROM calibration c JOIN revision r ON r.calibration_id = c.id
     WHERE c.id = :calibrationId ORDER BY r.n DESC LIMIT 1`,
    { calibrationId },
  );
  if (!row) throw notFound('This calibration');
  return row;
}

async function replacedLines(context: Context, revisionId: string): Promise<ReplacedLine[]> {
  return readRows<ReplacedLine>(
    context.database,
    `SELECT v.id, v.uid, v.standard_id AS standardId, s.registry_no AS registryNo, v.quantity, v.medium,
            v.stage, v.deviation, v.expanded_u AS expandedU, v.k, v.scale_version_id AS scaleVersionId
     FROM assigned_value v JOIN standard s ON s.id = v.standard_id
     WHERE v.revision_id = :revisionId ORDER BY v.line`,
    { revisionId },
  );
}

/** A revision keeps the number and the parties; what tells it apart is its own number and reason. */
function identityProblems(input: CalibrationInput, previous: Previous): IssueProblem[] {
  const kept = ['certificateNo', 'issuerId', 'registeredById'] as const;
  const problems: IssueProblem[] = kept.flatMap((field) =>
    input[field] === previous[field]
      ? []
      : [
          {
            field,
            message: 'A revision keeps this as it was; another certificate is another calibration.',
            received: input[field],
            expected: previous[field],
          },
        ],
  );
  if (input.issuedOn < previous.issuedOn) {
    problems.push({
      field: 'issuedOn',
      message: 'The revision is issued before the one it replaces.',
      received: input.issuedOn,
      expected: `${previous.issuedOn} or later`,
    });
  }
  return problems;
}

/**
 * No event depends on itself (rule B-44): a revision may not lean on a value that stands on this calibration.
 * Only a revision can close a circle, since a first issue has nothing below it.
 */
async function circleProblems(
  context: Context,
  input: CalibrationInput,
  facts: IssueFacts,
  previous: Previous,
): Promise<IssueProblem[]> {
  const problems: IssueProblem[] = [];
  for (const [at, line] of input.lines.entries()) {
    for (const [place, used] of line.references.entries()) {
      const reference = facts.references.get(used.valueUid);
      if (!reference) continue;
      const { ancestors } = await ancestorNetwork(context.database, [reference.id], []);
      const own = ancestors.find((ancestor) => ancestor.calibrationId === previous.calibrationId);
      if (!own) continue;
      problems.push({
        field: `lines.${at}.references.${place}.valueUid`,
        message:
          own.id === reference.id
            ? `${reference.registryNo}, ${reference.certificateNo} is a result of this calibration itself.`
            : `A circle: ${reference.registryNo}, ${reference.certificateNo} leans on ${own.registryNo}, ${own.certificateNo}, which this revision replaces.`,
        received: reference.certificateNo,
        expected: 'a value that does not stand on this calibration',
        clause: 'JCGM 200:2012, 2.40',
      });
    }
  }
  return problems;
}
