import type { z } from 'zod';
import type { AuditFinding, AuditResponse, AuditResult } from '#shared/contracts/audits.ts';
import type { LinkFacts, ValueFacts } from '#shared/rules/facts.ts';
import { isToldInWords } from '#server/modules/chains/index.ts';
import { abilitiesFor } from '#server/policy/permission.ts';
import type { User } from '#server/policy/user.ts';
import { seesHistory, valueView } from '#server/policy/value-view.ts';
import type { AuditJob } from './audit-job.queries.ts';
import type { NamedFinding, NamedValue } from './audit-findings.queries.ts';
import type { AuditRun } from './audit-run.queries.ts';
import type { ReadAudit } from './read-audit.service.ts';
import { readAudit, repeatAuditPermission, stopAuditPermission } from './audits.policy.ts';

/** An audit as its screen shows it. */
export function presentAudit(
  { summary, run, comparison, repeatedBy }: ReadAudit,
  user: User,
  job: AuditJob,
): z.input<typeof AuditResponse> {
  return {
    ...summary,
    asOfAct: job.asOfAct,
    asOf: job.asOf,
    message: job.message,
    result: run && presentRun(run),
    comparison,
    repeatOf: job.repeatOf,
    repeatedBy,
    abilities: abilitiesFor(user, job, [readAudit, repeatAuditPermission, stopAuditPermission]),
  };
}

function presentRun(run: AuditRun): z.input<typeof AuditResult> {
  const { ruleSet, engine, beganAt, endedAt, chains, values, links, findings, counts, rules } = run;
  const { resultSha256, factsSha256, actSeq } = run;
  return {
    ...{ ruleSet, engine, beganAt, endedAt, chains, values, links, findings },
    counts: JSON.parse(counts) as z.input<typeof AuditResult>['counts'],
    rules: JSON.parse(rules) as z.input<typeof AuditResult>['rules'],
    ...{ resultSha256, factsSha256, actSeq },
  };
}

/**
 * A finding as this person may see it. What was audited is theirs, or leans on theirs: so all else is above it. What a
 * rule says of another laboratory's weight from its history and budget stays there; its outcome is shown. Such a weight
 * is named by who calibrated it, not by who holds it.
 */
export function presentFinding(found: NamedFinding, user: User): z.input<typeof AuditFinding> {
  const { row, value, reference, laboratory } = found;
  const sees = { full: isFull(user, value), history: seesHistory(user, value) };
  const isTold = row.subject !== 'value' || isToldInWords(row.rule, sees);
  return {
    n: row.n,
    rule: row.rule,
    verdict: row.verdict,
    outcome: row.outcome,
    severity: row.severity,
    subject: row.subject,
    value: named(value, user),
    reference: reference && named(reference, user),
    focusUid: row.focus_uid,
    laboratory: sees.full
      ? laboratory
      : { id: value.issuerId, code: value.issuerCode, name: value.issuerName },
    sentence: isTold ? row.sentence : null,
    parameters: isTold ? (JSON.parse(row.parameters) as Record<string, string>) : {},
  };
}

/**
 * What the rule saw, as far as it is this person's to see: of a link, what was leaned on shrinks to its statement.
 * @returns null where the value itself is not theirs in full
 */
export function presentFacts(found: NamedFinding, facts: unknown, user: User): unknown {
  if (!isFull(user, found.value)) return null;
  const { row, value, reference } = found;
  if (row.subject === 'chain') return facts;
  if (!reference) return seesHistory(user, value) ? facts : withoutHistory(facts as ValueFacts);
  const { otherValues, ...link } = facts as LinkFacts;
  const child = seesHistory(user, value) ? link.child : withoutHistory(link.child);
  if (seesHistory(user, reference)) return { ...link, child, otherValues };
  if (isFull(user, reference)) return { ...link, child, parent: withoutHistory(link.parent) };
  const { parent } = link;
  const { uid, certificateNo, revisionN, registryNo, quantity, medium, issuer } = parent;
  const { deviation, expandedU, k, performedBegin, performedEnd, issuedOn, ends } = parent;
  return {
    ...{ ...link, child },
    parent: {
      ...{ uid, certificateNo, revisionN, registryNo, quantity, medium, issuer },
      ...{ deviation, expandedU, k, performedBegin, performedEnd, issuedOn, ends },
    },
  };
}

/** What the rule saw of one certificate alone. */
function withoutHistory(facts: ValueFacts): Partial<ValueFacts> {
  const { history: _history, duplicates: _duplicates, nextEpoch: _nextEpoch, ...own } = facts;
  return own;
}

function isFull(user: User, value: NamedValue): boolean {
  return valueView(user, value, 'upstream') === 'full';
}

function named(value: NamedValue, user: User) {
  const { uid, registryNo, certificateNo } = value;
  const nothing = { standardId: null, revisionId: null, holderId: null };
  const { standardId, revisionId, holderId } = isFull(user, value) ? value : nothing;
  return { uid, registryNo, certificateNo, standardId, revisionId, holderId };
}
