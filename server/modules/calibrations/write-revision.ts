import { Decimal } from '#shared/decimal.ts';
import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { ENGINE_VERSION } from '#shared/engine/version.ts';
import { canonicalJson } from '#shared/canonical-json.ts';
import { sha256 } from '#server/db/act.ts';
import { insertRow, insertRows } from '#server/db/base-model.ts';
import { readRow } from '#server/db/read.ts';
import { newId, type Context } from '#server/http/context.ts';
import { ancestorNetwork } from './ancestor-network.queries.ts';
import { assignedValueModel, revisionModel, type AssignedValueColumns } from './calibrations.model.ts';
import { carriedVariances, classLimit, needsAncestors } from './carried-variance.ts';
import { epochOn } from './epoch-on.ts';
import {
  componentModel,
  groupCovarianceModel,
  sourceLinkModel,
  valueGroupModel,
  valueLinkModel,
  type ValueLinkColumns,
} from './graph.model.ts';
import type { IssueFacts } from './issue-facts.ts';
import { frozenUncertainty } from './local-part.ts';

/** What a revision is, beside its content. */
export interface RevisionHead {
  calibrationId: string;
  n: number;
  reason: string | null;
  signatoryId: string | null;
  /** Per line, against the line it replaces. */
  changed: readonly ('new' | 'text' | 'value')[];
}

export interface WrittenRevision {
  revisionId: string;
  values: { id: number; uid: string }[];
  /** The canonical content and its hash, for the act's record. */
  content: unknown;
  contentSha256: string;
}

/** SQRT(3) as the column of k holds it: a class limit is a rectangular distribution. */
const SQRT_3 = '1.7321';

/**
 * Writes one revision with all its lines, links, groups and components, inside the open act and in one
 * statement per table. The input has passed the rules. Ids are given out here: acts are serialised.
 */
export async function writeRevision(
  context: Context,
  input: CalibrationInput,
  facts: IssueFacts,
  head: RevisionHead,
): Promise<WrittenRevision> {
  const { database } = context;
  const { changed, ...identity } = head;
  const content = { ...identity, ...input };
  const contentSha256 = sha256(canonicalJson(content));
  const revisionId = newId(context);
  await insertRow(revisionModel(database), {
    id: revisionId,
    ...identity,
    issuedOn: input.issuedOn,
    performedBegin: input.performedBegin,
    performedEnd: input.performedEnd,
    datePrecision: input.datePrecision,
    method: input.method,
    decisionRule: input.decisionRule,
    documentId: input.documentId,
    contentSha256,
  });
  const last = await readRow<{ value: number | null; valueGroup: number | null }>(
    database,
    `SELECT (SELECT MAX(id) FROM assigned_value) AS value,
            (SELECT MAX(id) FROM value_group) AS valueGroup`,
  );
  const carried = await carriedByLine(context, input, facts);
  const values = input.lines.map((line, at) => ({
    ...valueColumns(line, at, input, facts, carried[at] ?? null),
    id: (last?.value ?? 0) + 1 + at,
    uid: newId(context),
    revisionId,
    changed: changed[at] ?? 'new',
  }));
  await insertRows(assignedValueModel(database), values);
  const ids = values.map(({ id, uid }) => ({ id, uid }));
  await writeParts(context, input, facts, { ids, revisionId, groupId: (last?.valueGroup ?? 0) + 1 });
  return { revisionId, values: ids, content, contentSha256 };
}

export async function carriedByLine(
  context: Context,
  input: CalibrationInput,
  facts: IssueFacts,
): Promise<(number | null)[]> {
  if (!needsAncestors(input.lines, facts)) return carriedVariances(input.lines, facts, null);
  const { network } = await ancestorNetwork(
    context.database,
    [...facts.references.values()].map((reference) => reference.id),
    [...facts.sources.values()].map((source) => source.id),
  );
  return carriedVariances(input.lines, facts, network);
}

export function valueColumns(
  line: CalibrationLine,
  at: number,
  input: CalibrationInput,
  facts: IssueFacts,
  carried: number | null,
): Omit<AssignedValueColumns, 'id' | 'uid' | 'revisionId' | 'changed'> {
  const standard = facts.standards.get(line.standardId);
  if (!standard) throw new Error('A line passed the rules without its standard');
  const frozen = frozenUncertainty(line, at, input.group, carried);
  return {
    line: at + 1,
    standardId: standard.id,
    epochId: epochOn(standard.epochs, line.stage, input.performedBegin, input.performedEnd).id,
    quantity: line.quantity,
    medium: line.medium,
    stage: line.stage,
    nominal: standard.nominal,
    deviation: line.deviation,
    reportedUnit: line.reportedUnit,
    reportedDecimals: line.reportedDecimals,
    expandedU: line.expandedU,
    reportedUDecimals: line.reportedUDecimals,
    k: line.k,
    coverage: line.coverage,
    nuEff: line.degreesOfFreedom,
    u: frozen.u,
    localU: frozen.local,
    localOrigin: frozen.origin,
    localDegreesOfFreedom: frozen.degreesOfFreedom,
    localEstimate: frozen.estimate,
    rootKind: line.rootKind,
    scaleVersionId: line.scaleVersionId,
    class: line.class,
    underAccreditation: Number(line.underAccreditation),
    unitConfirmed: Number(line.unitConfirmed),
    performedEnd: input.performedEnd,
    datePrecision: input.datePrecision,
    effectiveFrom: input.issuedOn,
    issuerId: input.issuerId,
    holderId: standard.ownerId,
    decade: decadeOf(standard.nominal),
    engineVersion: ENGINE_VERSION,
  };
}

/** floor(log10(nominal in g)), by its digits and not by a logarithm that may round. */
function decadeOf(nominal: string): number {
  return new Decimal(nominal).e;
}

async function writeParts(
  context: Context,
  input: CalibrationInput,
  facts: IssueFacts,
  written: { ids: { id: number }[]; revisionId: string; groupId: number },
): Promise<void> {
  const { database } = context;
  const idOf = (at: number): number => written.ids[at]?.id ?? 0;
  await insertRows(
    valueLinkModel(database),
    input.lines.flatMap((line, at) => line.references.map((used) => linkColumns(used, idOf(at), facts))),
  );
  await insertRows(
    sourceLinkModel(database),
    input.lines.flatMap((line, at) =>
      line.sources.map(({ sourceUid, sensitivity }) => ({
        childId: idOf(at),
        sourceId: facts.sources.get(sourceUid)?.id ?? 0,
        sensitivity,
      })),
    ),
  );
  await insertRows(
    componentModel(database),
    input.lines.flatMap((line, at) =>
      line.components.map(({ standardUncertainty, ...component }, n) => ({
        valueId: idOf(at),
        n: n + 1,
        ...component,
        u: standardUncertainty,
      })),
    ),
  );
  if (!input.group) return;
  const { covariance, degreesOfFreedom, estimate } = input.group;
  const { groupId, revisionId } = written;
  await insertRow(valueGroupModel(database), { id: groupId, revisionId, degreesOfFreedom, estimate });
  await insertRows(
    groupCovarianceModel(database),
    covariance.flatMap((row, i) =>
      row.slice(i).map((cell, j) => ({ groupId, rowId: idOf(i), columnId: idOf(i + j), covariance: cell })),
    ),
  );
}

/** A use by class limit says which limit, even where the input left it to the class. */
function linkColumns(
  { valueUid, ...used }: CalibrationLine['references'][number],
  childId: number,
  facts: IssueFacts,
): ValueLinkColumns {
  const reference = facts.references.get(valueUid);
  if (!reference) throw new Error('A line passed the rules without its reference');
  const limit = used.usedAs === 'class limit' && used.usedExpandedU === null ? classLimit(reference) : null;
  return {
    childId,
    parentId: reference.id,
    ...used,
    ...(limit ? { usedDeviation: '0', usedExpandedU: limit.toFixed(), usedK: SQRT_3 } : {}),
  };
}
