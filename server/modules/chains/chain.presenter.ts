import type { z } from 'zod';
import type { ChainLink, ChainResponse, ChainSource, ChainValue } from '#shared/contracts/chains.ts';
import { ENGINE_VERSION } from '#shared/engine/version.ts';
import { RULE_SET_VERSION } from '#shared/rules/rule-set.ts';
import { readsInFull, type User } from '#server/policy/user.ts';
import { seesHistory, valueView } from '#server/policy/value-view.ts';
import type { Chain } from './chain.service.ts';
import type { ChainSubject } from './chains.policy.ts';
import { redactCheck, rulesTold } from './checks.presenter.ts';
import { inForceInstead, newerInForce, noteOf, standingOn, succeededBy } from './focus.presenter.ts';
import { becauseLost, nowOf, presentAsNowKnown } from './chain-now.presenter.ts';
import type { StoredSource, StoredValue } from './stored.ts';

/** The day on which the kilogram was redefined (26th CGPM, Resolution 1). */
const REDEFINITION = '2019-05-20';

/** The chain as this person may see it: what is not theirs to know is left out here, before anything is sent. */
export function presentChain(chain: Chain, user: User, subject: ChainSubject): ChainResponse {
  const views = new Map(
    chain.closure.values.map((value) => {
      const isFocus = value.id === chain.focus.id;
      return [value.uid, isFocus ? subject.view : valueView(user, value, 'upstream')] as const;
    }),
  );
  const isFull = (uid: string) => views.get(uid) === 'full';
  const withHistory = new Set(
    chain.closure.values.filter((value) => seesHistory(user, value)).map((value) => value.uid),
  );
  const shares = sharesOf(chain);
  const { propagation } = chain.numbers;
  const u = propagation.standardUncertainty;
  const k = Number(chain.focus.k ?? '2');
  const carried = chain.numbers.carried(chain.focus).variance;
  const nodeUids = new Set(views.keys());
  const checks = chain.judgement.checks.map((check) =>
    redactCheck(check, { full: isFull, history: (uid) => withHistory.has(uid) }),
  );
  return {
    question: {
      valueUid: chain.focus.uid,
      day: chain.question.day,
      known: chain.question.known,
      as: chain.as,
      ruleSet: RULE_SET_VERSION,
      engine: ENGINE_VERSION,
    },
    focusUid: chain.focus.uid,
    inForceInstead: withHistory.has(chain.focus.uid) ? inForceInstead(chain) : null,
    succeededBy: isFull(chain.focus.uid) ? succeededBy(chain) : null,
    newerInForce: withHistory.has(chain.focus.uid) ? newerInForce(chain) : null,
    nodes: [
      ...chain.closure.values.map((value) => presentValue(value, chain, isFull(value.uid), shares)),
      ...[...chain.closure.sources.values()].map((source) => presentSource(source, chain, user, shares)),
    ],
    links: presentLinks(chain, shares),
    asNowKnown: presentAsNowKnown(chain, k),
    definition: definitionOf(chain),
    uncertainty: {
      standard: u,
      expanded: u === null ? null : u * k,
      k,
      stated: chain.focus.uStated,
      carried: carried !== null && isFull(chain.focus.uid) ? Math.sqrt(carried) : null,
      degreesOfFreedom: Number.isFinite(propagation.degreesOfFreedom) ? propagation.degreesOfFreedom : null,
      missing: missingOf(chain),
    },
    rootShares: rootShares(chain, shares),
    contributions: (chain.contributions ?? []).map((row) => ({
      ...row,
      uids: row.uids.filter((uid) => nodeUids.has(uid) || row.kind === 'source'),
    })),
    improvements: isFull(chain.focus.uid) ? chain.improvements : [],
    sideBySide: isFull(chain.focus.uid) ? chain.sideBySide.sides : [],
    sideBySideNote: isFull(chain.focus.uid) ? noteOf(chain) : null,
    rules: rulesTold(chain.judgement.rules, checks),
    checks,
    summary: summaryOf(chain),
    abilities: { 'chain:read': true },
  };
}

/** Shares of the focus's variance, by node and by link; empty where its uncertainty is not computable. */
interface Shares {
  total: number | null;
  link: Map<string, number>;
  local: Map<string, number>;
  through: Map<string, number>;
}

function sharesOf(chain: Chain): Shares {
  const { propagation } = chain.numbers;
  const total = propagation.standardUncertainty === null ? null : propagation.standardUncertainty ** 2;
  const shares: Shares = { total, link: new Map(), local: new Map(), through: new Map() };
  if (!total) return shares;
  for (const [uid, variance] of Object.entries(propagation.localFlows))
    shares.local.set(uid, variance / total);
  shares.through.set(chain.focus.uid, 1);
  for (const { child, parent, variance } of propagation.flows) {
    shares.link.set(`${child} ${parent}`, variance / total);
    shares.through.set(parent, (shares.through.get(parent) ?? 0) + variance / total);
  }
  return shares;
}

function presentValue(
  value: StoredValue,
  chain: Chain,
  isFull: boolean,
  shares: Shares,
): z.input<typeof ChainValue> {
  const { numbers, standards, laboratories } = chain;
  const ends = standards.get(value.standardId)!.history.find((row) => row.id === value.id)?.ends ?? [];
  const standing = standingOn(chain, value, ends);
  const carried = numbers.carried(value).variance;
  const variance = numbers.variance(value.uid);
  const isKnown = shares.total !== null;
  return {
    type: 'value',
    uid: value.uid,
    view: isFull ? 'full' : 'statement',
    registryNo: value.registryNo,
    standardId: value.standardId,
    revisionId: isFull ? value.revisionId : null,
    marking: value.marking,
    nominal: value.nominal,
    class: value.class as z.input<typeof ChainValue>['class'],
    holder: isFull ? nameOf(laboratories.get(value.holderId)!) : null,
    issuer: nameOf(laboratories.get(value.issuerId)!),
    certificateNo: value.certificateNo,
    revisionN: value.revisionN,
    quantity: value.quantity,
    medium: value.medium,
    stage: value.stage,
    deviation: value.deviation,
    expandedU: value.expandedU,
    k: value.k,
    performedEnd: value.performedEnd,
    datePrecision: value.datePrecision,
    issuedOn: value.issuedOn,
    // A value recorded after the knowledge day stands below none that was: it cannot be met here as unknown.
    state: standing.state === 'unknown' ? 'not yet in force' : standing.state,
    stateSince: standing.since,
    rootKind: value.rootKind,
    scaleVersion: value.scaleVersion,
    uStated: value.uStated,
    uCarried: isFull && carried !== null ? Math.sqrt(carried) : null,
    uNow: isFull && variance !== null ? Math.sqrt(variance) : null,
    uOrigin: originOf(value),
    tier: chain.tiers.get(value.uid) ?? 0,
    localShare: isKnown && value.localU !== null ? (shares.local.get(value.uid) ?? 0) : null,
    share: isKnown ? (shares.through.get(value.uid) ?? 0) : null,
    now: nowOf(value, chain),
  };
}

function originOf(value: StoredValue): z.input<typeof ChainValue>['uOrigin'] {
  if (value.uStated === null) return 'unknown';
  if (value.rootKind === 'earlier definition') return 'by definition';
  if (value.rootKind === 'consensus value' || value.localOrigin === 'agreed') return 'agreed';
  if (value.localOrigin === 'inferred') return 'inferred';
  return value.localOrigin === 'unknown' ? 'unknown' : 'recomputed';
}

function presentSource(
  source: StoredSource,
  chain: Chain,
  user: User,
  shares: Shares,
): z.input<typeof ChainSource> {
  const leaning = chain.closure.values.filter((value) =>
    value.sources.some((link) => link.sourceId === source.id),
  );
  const isOpen =
    source.isPublished === true ||
    (source.laboratoryId !== null && readsInFull(user, source.laboratoryId)) ||
    leaning.some(
      (value) => value.standardId === source.standardId && valueView(user, value, 'upstream') === 'full',
    );
  return {
    type: 'source',
    uid: source.uid,
    kind: source.kind,
    name: source.name,
    registryNo: source.registryNo,
    u: isOpen ? source.u : null,
    unit: source.unit,
    tier: chain.tiers.get(source.uid) ?? 1,
    share: shares.total === null ? null : (shares.through.get(source.uid) ?? 0),
  };
}

function presentLinks(chain: Chain, shares: Shares): z.input<typeof ChainLink>[] {
  const byId = new Map(chain.closure.values.map((value) => [value.id, value]));
  const verdicts = new Map(chain.judgement.links.map((link) => [`${link.childUid} ${link.parentUid}`, link]));
  const flow = (key: string) => (shares.total === null ? null : (shares.link.get(key) ?? 0));
  return chain.closure.values.flatMap((value) => {
    const references = value.parents.map((link) => {
      const parent = byId.get(link.parentId)!;
      const key = `${value.uid} ${parent.uid}`;
      const verdict = verdicts.get(key);
      return {
        childUid: value.uid,
        parentUid: parent.uid,
        role: link.role,
        sensitivity: link.sensitivity,
        usedAs: link.usedAs,
        usedBegin: link.usedBegin,
        usedEnd: link.usedEnd,
        flow: link.role === 'informs' ? 0 : flow(key),
        conduct: verdict?.conduct ?? 'not judged',
        today: verdict?.today ?? 'not judged',
      };
    });
    const sources = value.sources.map((link) => {
      const source = chain.closure.sources.get(link.sourceId)!;
      return {
        childUid: value.uid,
        parentUid: source.uid,
        role: 'source' as const,
        sensitivity: link.sensitivity,
        usedAs: null,
        usedBegin: null,
        usedEnd: null,
        flow: flow(`${value.uid} ${source.uid}`),
        conduct: 'sound' as const,
        today: 'sound' as const,
      };
    });
    return [...references, ...sources];
  });
}

/** What reaches the focus through each root, its scale version included; a root that only informs carries nothing. */
function rootShares(chain: Chain, shares: Shares): ChainResponse['rootShares'] {
  return chain.closure.values.flatMap(({ uid, rootKind }) => {
    const share = shares.through.get(uid);
    return rootKind === null || share === undefined ? [] : [{ uid, share }];
  });
}

function definitionOf(chain: Chain): ChainResponse['definition'] {
  // Runs that only inform a consensus value determined nothing in this chain.
  const { sensitivities } = chain.numbers.propagation;
  const roots = chain.closure.values.filter((value) => value.rootKind !== null && value.uid in sensitivities);
  const before = roots.filter((value) => value.performedEnd < REDEFINITION).length;
  if (before === 0) return 'planck constant';
  return before === roots.length ? 'international prototype' : 'both';
}

/**
 * Why the uncertainty is unknown: certificates withdrawn, where the chain is drawn as now known; else those that state none. A value whose own part cannot be told apart for
 * that reason is named only where no such certificate is.
 */
function missingOf(chain: Chain): ChainResponse['uncertainty']['missing'] {
  const missing = new Set(chain.numbers.propagation.missing);
  const lost = becauseLost(chain).filter(({ uid }) => missing.has(uid));
  if (lost.length > 0) return lost;
  const values = chain.closure.values.filter((value) => missing.has(value.uid));
  const silent = values.filter((value) => value.uStated === null);
  const sentence = silent.length > 0 ? 'states no uncertainty' : 'leaves its own part open';
  return (silent.length > 0 ? silent : values).map(({ uid, certificateNo, registryNo }) => ({
    uid,
    because: `certificate ${certificateNo} for ${registryNo} ${sentence}`,
  }));
}

function summaryOf(chain: Chain): ChainResponse['summary'] {
  const count = (verdict: 'conduct' | 'today') => {
    const of = (state: string) => chain.judgement.links.filter((link) => link[verdict] === state).length;
    return { sound: of('sound'), caution: of('caution'), broken: of('broken'), notJudged: of('not judged') };
  };
  return { links: chain.judgement.links.length, conduct: count('conduct'), today: count('today') };
}

function nameOf(laboratory: { id: string; code: string; name: string }): {
  id: string;
  code: string;
  name: string;
} {
  return { id: laboratory.id, code: laboratory.code, name: laboratory.name };
}
