import type { z } from 'zod';
import type { AuditFinding, AuditResponse, AuditResult } from '#shared/contracts/audits.ts';
import type { LinkFacts } from '#shared/rules/facts.ts';
import { abilitiesFor } from '#server/policy/permission.ts';
import type { User } from '#server/policy/user.ts';
import { valueView } from '#server/policy/value-view.ts';
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
 * rule says of another laboratory's weight from its history and budget stays there; its outcome is shown.
 */
export function presentFinding(found: NamedFinding, user: User): z.input<typeof AuditFinding> {
  const { row, value, reference, laboratory } = found;
  const isTold = row.subject !== 'value' || isFull(user, value);
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
    laboratory,
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
  if (!found.reference || isFull(user, found.reference)) return facts;
  const { otherValues: _others, parent, ...link } = facts as LinkFacts;
  const { uid, certificateNo, revisionN, registryNo, quantity, medium, issuer } = parent;
  const { deviation, expandedU, k, performedBegin, performedEnd, issuedOn, ends } = parent;
  return {
    ...link,
    parent: {
      ...{ uid, certificateNo, revisionN, registryNo, quantity, medium, issuer },
      ...{ deviation, expandedU, k, performedBegin, performedEnd, issuedOn, ends },
    },
  };
}

function isFull(user: User, value: NamedValue): boolean {
  return valueView(user, value, 'upstream') === 'full';
}

function named(value: NamedValue, user: User) {
  const { uid, registryNo, certificateNo } = value;
  const { standardId, revisionId } = isFull(user, value) ? value : { standardId: null, revisionId: null };
  return { uid, registryNo, certificateNo, standardId, revisionId };
}
