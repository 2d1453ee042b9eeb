import type { z } from 'zod';
import { CalibrationInput, type CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { CorrectBody } from '#shared/contracts/calibrations.ts';
import { Decimal } from '#shared/decimal.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { AppError, fieldError, notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { confirmSignature } from './confirm-signature.ts';
import { reviseCalibration } from './revise-calibration.service.ts';

/** Decimal places that a unit has in grams. */
const POWER_OF_GRAM = { kg: 3, g: 0, mg: -3, ug: -6 } as const;

interface Standing {
  calibrationId: string;
  latestId: string;
  isWithdrawn: number;
  content: string | null;
}

/**
 * Corrects results of an issued calibration under the signatory's hand: its content is taken from the record as it
 * was signed, the lines named are changed, and the whole is issued as the next revision (ISO/IEC 17025:2017, 7.8.8).
 * @throws AppError `not-found`; `unprocessable` on password, on a line that is not of this calibration, where a later
 * revision or a withdrawal stands, or by the rules of issuing; `too-many-requests`
 */
export async function correctCalibration(
  context: SignedInContext,
  revisionId: string,
  { password, lines, ...head }: z.infer<typeof CorrectBody>,
): Promise<{ revisionId: string; valueUids: string[]; actSeq: number }> {
  await confirmSignature(context, password, 'Nothing was corrected.');
  const standing = await standingOf(context, revisionId);
  const input = contentOf(standing);
  const uids = await readRows<{ uid: string }>(
    context.database,
    'SELECT uid FROM assigned_value WHERE revision_id = :revisionId ORDER BY line',
    { revisionId },
  );
  const corrected = input.lines.map((line, at) => {
    const asked = lines.find(({ valueUid }) => valueUid === uids[at]?.uid);
    return asked ? correctedLine(line, asked) : line;
  });
  lines.forEach(({ valueUid }, at) => {
    if (uids.some(({ uid }) => uid === valueUid)) return;
    throw fieldError(`lines.${at}.valueUid`, {
      message: 'This value is not a result of this calibration.',
      received: valueUid,
    });
  });
  const issued = await reviseCalibration(
    context,
    {
      ...input,
      ...head,
      calibrationId: standing.calibrationId,
      lines: corrected,
      group: input.group && correctedGroup(input.group, input.lines, corrected),
    },
    context.user.accountId,
  );
  const act = await readRow<{ actSeq: number }>(
    context.database,
    'SELECT act_seq AS actSeq FROM revision WHERE id = :id',
    { id: issued.revisionId },
  );
  return { revisionId: issued.revisionId, valueUids: issued.valueUids, actSeq: act!.actSeq };
}

async function standingOf(context: SignedInContext, revisionId: string): Promise<Standing> {
  const row = await readRow<Standing>(
    context.database,
    `SELECT r.calibration_id AS calibrationId,
       (SELECT x.id FROM revision x WHERE x.calibration_id = r.calibration_id ORDER BY x.n DESC LIMIT 1) AS latestId,
       EXISTS (SELECT 1 FROM value_end e JOIN assigned_value v ON v.id = e.value_id
               WHERE v.revision_id = r.id AND e.kind = 'withdrawn') AS isWithdrawn,
       (SELECT a.content FROM act a WHERE a.seq = r.act_seq) AS content
     FROM revision r WHERE r.id = :revisionId`,
    { revisionId },
  );
  if (!row) throw notFound('This calibration');
  if (row.latestId !== revisionId) {
    throw new AppError(
      'unprocessable',
      'A later revision has replaced this one. Correct the one that stands.',
      {
        members: { latestRevisionId: row.latestId },
      },
    );
  }
  if (row.isWithdrawn === 1) {
    throw new AppError('unprocessable', 'This calibration is withdrawn. A new calibration takes its place.');
  }
  return row;
}

/** What was signed, as the act's record holds it. @throws AppError `unprocessable` where it holds none */
function contentOf({ content }: Standing): CalibrationInput {
  const act = content === null ? null : (JSON.parse(content) as { after?: { content?: unknown } });
  const {
    calibrationId: _id,
    n: _n,
    reason: _reason,
    signatoryId: _signatory,
    ...signed
  } = (act?.after?.content ?? {}) as Record<string, unknown>;
  const parsed = CalibrationInput.safeParse(signed);
  if (parsed.success) return parsed.data;
  throw new AppError(
    'unprocessable',
    'The record does not hold this certificate in a form from which it can be issued again. Enter its correction as a calibration of its own.',
  );
}

/**
 * A line with a corrected deviation or U, and the decimals that they need to be printed. Where a budget stands behind
 * its U, what U grows by joins the budget: the local part comes from there.
 */
function correctedLine(
  line: CalibrationLine,
  asked: { deviation?: string | undefined; expandedU?: string | undefined },
): CalibrationLine {
  const deviation = asked.deviation ?? line.deviation;
  const expandedU = asked.expandedU ?? line.expandedU;
  return {
    ...line,
    deviation,
    reportedDecimals: decimalsFor(deviation, line.reportedDecimals, line.reportedUnit),
    expandedU,
    reportedUDecimals:
      expandedU === null
        ? line.reportedUDecimals
        : decimalsFor(expandedU, line.reportedUDecimals ?? 0, line.reportedUnit),
    // The question about the unit was answered for the value that stood here before.
    unitConfirmed: asked.deviation === undefined ? line.unitConfirmed : true,
    components: [...line.components, ...addedComponent(line, expandedU)],
  };
}

function addedComponent(line: CalibrationLine, expandedU: string | null): CalibrationLine['components'] {
  const added = line.components.length === 0 ? null : addedVariance(line, expandedU);
  if (added === null) return [];
  return [
    {
      name: 'Added by the correction',
      evaluation: 'B',
      distribution: 'normal',
      standardUncertainty: added.sqrt().toNumber(),
      sensitivity: 1,
      degreesOfFreedom: null,
      estimate: null,
    },
  ];
}

/** What U grows by is a result's own: it joins the diagonal of a design's covariance. */
function correctedGroup(
  group: NonNullable<CalibrationInput['group']>,
  lines: readonly CalibrationLine[],
  corrected: readonly CalibrationLine[],
): CalibrationInput['group'] {
  const covariance = group.covariance.map((row, i) =>
    row.map((entry, j) => {
      const added = i === j ? addedVariance(lines[i]!, corrected[i]!.expandedU) : null;
      return entry + (added?.toNumber() ?? 0);
    }),
  );
  return { ...group, covariance };
}

/** By how much u squared grows, g2; null where it does not. */
function addedVariance(line: CalibrationLine, expandedU: string | null): Decimal | null {
  if (expandedU === null || line.expandedU === null || line.k === null) return null;
  const variance = (u: string) => new Decimal(u).div(line.k!).pow(2);
  const added = variance(expandedU).minus(variance(line.expandedU));
  return added.gt(0) ? added : null;
}

function decimalsFor(grams: string, printed: number, unit: CalibrationLine['reportedUnit']): number {
  return Math.max(printed, new Decimal(grams).decimalPlaces() + POWER_OF_GRAM[unit], 0);
}
