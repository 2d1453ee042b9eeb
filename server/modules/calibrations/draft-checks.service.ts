import type { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import type { DraftCheck } from '#shared/contracts/drafts.ts';
import type { z } from 'zod';
import { clauseOn } from '#shared/rules/clauses.ts';
import type { Check } from '#shared/rules/judge.ts';
import { RULES } from '#shared/rules/rule-set.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { today, type Context } from '#server/http/context.ts';
import { judgeUnissued, type StoredValue } from '#server/modules/chains/index.ts';
import { completeSources } from './complete-sources.ts';
import { epochOn } from './epoch-on.ts';
import type { IssueFacts } from './issue-facts.ts';
import { issueFacts } from './issue-facts.queries.ts';
import { carriedByLine, valueColumns } from './write-revision.ts';

type DraftCheckRow = z.infer<typeof DraftCheck>;

/** What stands for the parts of a value that only issuing gives. */
const NOT_YET = 'draft';

/**
 * The checks each line would get if the draft were issued as it stands, so that a doubtful link shows while it is
 * written and not afterwards. Rules that do not apply are left out, and so is what a draft has no place for: a missing
 * datum that is worth no more than information.
 */
export async function draftChecks(context: Context, read: CalibrationInput): Promise<DraftCheckRow[]> {
  const facts = await issueFacts(context.database, read, today(context));
  const input = completeSources(read, facts);
  const carried = await carriedByLine(context, input, facts);
  const values = input.lines.map((_, at) => unissued(context, input, at, facts, carried[at] ?? null));
  const judged = await judgeUnissued(context, values);
  return judged.flatMap((checks, line) =>
    checks
      .filter((check) => check.outcome !== 'does not apply' && !isLeftOpen(check))
      .map((check) => inWords(check, line, context)),
  );
}

function isLeftOpen({ outcome, severity }: Check): boolean {
  return outcome === 'cannot be judged' && severity === 'information';
}

/** A line as the register would hold it; its id lies below zero, where the register gives none. */
function unissued(
  context: Context,
  input: CalibrationInput,
  at: number,
  facts: IssueFacts,
  carried: number | null,
): StoredValue {
  const line = input.lines[at]!;
  const standard = facts.standards.get(line.standardId)!;
  const columns = valueColumns(line, at, input, facts, carried);
  const epoch = epochOn(standard.epochs, line.stage, input.performedBegin, input.performedEnd);
  return {
    ...columns,
    id: -1 - at,
    uid: `${NOT_YET}-${at}`,
    calibrationId: NOT_YET,
    revisionId: NOT_YET,
    revisionN: 1,
    certificateNo: input.certificateNo,
    registeredById: input.registeredById,
    registryNo: standard.registryNo,
    marking: standard.marking,
    standardKind: 'weight',
    setId: null,
    epochN: epoch.n,
    epochBeginsOn: epoch.beginsOn,
    uStated: columns.u,
    scaleVersion: null,
    underAccreditation: line.underAccreditation,
    unitConfirmed: line.unitConfirmed,
    changed: 'new',
    decisionRule: input.decisionRule,
    method: input.method,
    signatoryId: null,
    amendmentReason: null,
    components: line.components.map(({ name }) => name),
    performedBegin: input.performedBegin,
    issuedOn: input.issuedOn,
    recordedAt: context.clock.now().toISOString().replace('Z', '000Z'),
    parents: line.references.map(({ valueUid, ...used }) => ({
      ...used,
      parentId: facts.references.get(valueUid)!.id,
    })),
    sources: line.sources.map(({ sourceUid, sensitivity }) => ({
      sourceId: facts.sources.get(sourceUid)!.id,
      sensitivity,
    })),
    siblingLinesWithReferences: input.lines.filter(
      (other, place) => place !== at && other.references.some((used) => used.role === 'reference'),
    ).length,
    groupId: null,
  };
}

function inWords(check: Check, line: number, context: Context): DraftCheckRow {
  const rule = RULES.find((one) => one.id === check.rule)!;
  const { clause, edition } = clauseOn(check.rule, today(context));
  return {
    line,
    referenceUid: check.subject.type === 'link' ? check.subject.parentUid : null,
    rule: check.rule,
    clause: clause === 'none' ? edition : `${edition}, ${clause}`,
    severity: check.severity,
    verdict: check.verdict,
    outcome: check.outcome,
    sentence:
      check.sentence === null ? rule.title : fillSentence(rule.sentences[check.sentence]!, check.parameters),
  };
}
