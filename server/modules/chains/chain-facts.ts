import type {
  DensityFacts,
  EndFacts,
  HistoryFacts,
  LaboratoryFacts,
  LinkFacts,
  OtherValueFacts,
  Question,
  ResultFacts,
  ValueFacts,
} from '#shared/rules/facts.ts';
import { endOfDay, stateAt } from '#shared/state-at.ts';
import { assertedOn } from './asserted-on.ts';
import type { ChainNumbers } from './chain-numbers.ts';
import type { Notice } from '#shared/notices/notice.ts';
import { historyBefore } from './history.ts';
import { linkKey, scaleMapOf, type NoticesOfLinks } from './notice-facts.ts';
import type {
  LaboratoryDossier,
  StandardDossier,
  StoredEnd,
  StoredHistoryValue,
  StoredLink,
  StoredSource,
  StoredValue,
} from './stored.ts';
import { budgetFacts, propertyFacts, sheetFacts, weightFacts } from './weight-facts.ts';

/** What the assembly reads: plain maps, filled by the service. */
export interface FactParts {
  question: Question;
  standards: Map<string, StandardDossier>;
  laboratories: Map<string, LaboratoryDossier>;
  numbers: ChainNumbers;
  /** Values of the closure by id. */
  byId: Map<number, StoredValue>;
  /** What the values of the closure lean on beside each other. */
  sources: ReadonlyMap<number, StoredSource>;
  /** Every notice recorded, and those that each link left out. */
  notices: readonly Notice[];
  noticesOfLinks: NoticesOfLinks;
}

/** Assembles what the value rules need to know of one value, as the register knew it on the knowledge day. */
export function valueFacts(value: StoredValue, parts: FactParts): ValueFacts {
  const horizon = endOfDay(parts.question.known);
  const dossier = parts.standards.get(value.standardId)!;
  const issuer = parts.laboratories.get(value.issuerId)!;
  const carried = parts.numbers.carried(value);
  const recorded = <T extends { recordedAt: string }>(rows: readonly T[]) =>
    rows.filter((row) => row.recordedAt <= horizon);
  const nextEpoch = recorded(dossier.epochs).find((epoch) => epoch.n === value.epochN + 1);
  return {
    ...resultFacts(value),
    ...datesFacts(value),
    calibrationId: value.calibrationId,
    standardId: value.standardId,
    registryNo: value.registryNo,
    marking: value.marking,
    issuer: laboratoryFacts(issuer),
    holder: laboratoryFacts(parts.laboratories.get(value.holderId)!),
    registeredByIssuer: value.registeredById === value.issuerId,
    recordedAt: value.recordedAt,
    method: value.method,
    quantity: value.quantity,
    medium: value.medium,
    stage: value.stage,
    nominal: value.nominal,
    class: value.class as ValueFacts['class'],
    decisionRule: value.decisionRule,
    coverage: value.coverage,
    underAccreditation: value.underAccreditation,
    unitConfirmed: value.unitConfirmed,
    rootKind: value.rootKind,
    scaleVersion: value.scaleVersion,
    ends: endFacts(historyOf(dossier, value.id)?.ends ?? [], parts.standards.get(value.standardId)!, horizon),
    nextEpoch: nextEpoch ?? null,
    references: value.parents.filter((link) => link.role === 'reference').length,
    siblingLinesWithReferences: value.siblingLinesWithReferences,
    recognitions: recorded(issuer.recognitions),
    scope: recorded(issuer.scope).filter((line) => line.quantity === value.quantity),
    density: densityFacts(dossier, value.performedEnd, horizon),
    otherKind: otherKind(dossier, value),
    carriedVariance: carried.variance,
    carriedVarianceIndependent: carried.independentVariance,
    carriedMissing: carried.missing.map((above) => above.certificateNo),
    sharedAncestors: [...carried.shared].map((id) => parts.byId.get(id)!.registryNo),
    history: historyFacts(dossier, value, parts),
    duplicates: duplicateFacts(dossier, value, parts),
    weight: weightFacts(value, parts),
    sheet: sheetFacts(value, parts),
    budget: budgetFacts(value, parts),
  };
}

/** Assembles one step of the chain. */
export function linkFacts(
  child: ValueFacts,
  parent: ValueFacts,
  link: StoredLink,
  parts: FactParts,
): LinkFacts {
  const horizon = endOfDay(parts.question.known);
  const dossier = parts.standards.get(parent.standardId)!;
  return {
    child,
    parent,
    role: link.role,
    sensitivity: link.sensitivity,
    usedBegin: link.usedBegin,
    usedEnd: link.usedEnd,
    usedAs: link.usedAs,
    usedDeviation: link.usedDeviation,
    usedExpandedU: link.usedExpandedU,
    usedK: link.usedK,
    programmes: dossier.programmes.filter(
      (row) => row.laboratoryId === child.issuer.id && row.recordedAt <= horizon,
    ),
    otherValues: otherValuesOf(parent, link.parentId, dossier, horizon),
    notices: parts.noticesOfLinks.get(linkKey(child, link)) ?? [],
    scaleMap: scaleMapOf(
      parts.byId.get(link.parentId)!,
      child.scaleVersion,
      parts.notices,
      parts.question.known,
    ),
  };
}

/** By the reference's facts, which are of one question: many links lean on one reference. */
const otherValues = new WeakMap<ValueFacts, OtherValueFacts[]>();

/** The reference's other values of its kind and medium, recorded by the horizon. */
function otherValuesOf(
  parent: ValueFacts,
  parentId: number,
  dossier: StandardDossier,
  horizon: string,
): OtherValueFacts[] {
  const known = otherValues.get(parent);
  if (known) return known;
  const epochN = historyOf(dossier, parentId)?.epochN;
  const facts = dossier.history
    .filter((row) => row.recordedAt <= horizon && row.calibrationId !== parent.calibrationId)
    .filter((row) => row.quantity === parent.quantity && row.medium === parent.medium)
    .map((row) => otherValueFacts(row, epochN, dossier, horizon));
  otherValues.set(parent, facts);
  return facts;
}

function otherValueFacts(
  row: StoredHistoryValue,
  epochN: number | undefined,
  dossier: StandardDossier,
  horizon: string,
): OtherValueFacts {
  return {
    ...datesFacts(row),
    uid: row.uid,
    certificateNo: row.certificateNo,
    revisionN: row.revisionN,
    sameEpoch: row.epochN === epochN,
    ends: endFacts(row.ends, dossier, horizon),
  };
}

/** Values in force that the rules compare with; covariance is worked out for the one just before only. */
function historyFacts(dossier: StandardDossier, value: StoredValue, parts: FactParts): HistoryFacts[] {
  const previous = historyBefore(dossier, value, endOfDay(parts.question.known));
  return comparable(dossier, value, parts.question).map((row) => ({
    ...resultFacts(row),
    ...datesFacts(row),
    covariance: row.id === previous?.id ? parts.numbers.covariance(value.uid, row.uid) : null,
  }));
}

function comparable(dossier: StandardDossier, value: StoredValue, question: Question): StoredHistoryValue[] {
  const own = historyOf(dossier, value.id);
  return dossier.history.filter(
    (row) =>
      row.calibrationId !== value.calibrationId &&
      row.quantity === value.quantity &&
      row.medium === value.medium &&
      row.epochN === (own?.epochN ?? value.epochN) &&
      stateAt(
        { effectiveFrom: row.issuedOn, recordedAt: row.recordedAt },
        row.ends,
        question.day,
        question.known,
      ).state === 'in force',
  );
}

function duplicateFacts(
  dossier: StandardDossier,
  value: StoredValue,
  parts: FactParts,
): ValueFacts['duplicates'] {
  return dossier.duplicateIds.flatMap((id) => {
    const partner = parts.standards.get(id);
    const result = partner?.history.find(
      (row) => row.revisionId === value.revisionId && row.quantity === value.quantity,
    );
    if (!partner || !result) return [];
    const like = { ...value, id: result.id, epochN: result.epochN };
    return [
      {
        registryNo: partner.registryNo,
        marking: partner.marking,
        result: resultFacts(result),
        history: comparable(partner, like, parts.question).map((row) => ({
          ...resultFacts(row),
          ...datesFacts(row),
          covariance: null,
        })),
      },
    ];
  });
}

function otherKind(dossier: StandardDossier, value: StoredValue): ResultFacts | null {
  const row = dossier.history.find(
    (other) =>
      other.revisionId === value.revisionId &&
      other.quantity !== value.quantity &&
      other.stage === value.stage,
  );
  return row ? resultFacts(row) : null;
}

function densityFacts(dossier: StandardDossier, day: string, horizon: string): DensityFacts | null {
  const density = assertedOn(
    dossier.properties.filter((property) => property.kind === 'density'),
    day,
    horizon,
  );
  return density && propertyFacts(density);
}

/** Ends as known; what took a value's place is told with its own ends, so that a replaced replacement shows. */
function endFacts(ends: StoredEnd[], dossier: StandardDossier, horizon: string): EndFacts[] {
  return ends
    .filter((end) => end.recordedAt <= horizon)
    .map((end) => {
      const next = end.replacedById === null ? undefined : historyOf(dossier, end.replacedById);
      return {
        kind: end.kind,
        effectiveOn: end.effectiveOn,
        madeKnownOn: end.madeKnownOn,
        recordedAt: end.recordedAt,
        changed: end.changed,
        replacedBy: next
          ? {
              uid: next.uid,
              certificateNo: next.certificateNo,
              revisionN: next.revisionN,
              ends: endFacts(next.ends, dossier, horizon),
            }
          : null,
      };
    });
}

function historyOf(dossier: StandardDossier, valueId: number): StoredHistoryValue | undefined {
  return dossier.history.find((row) => row.id === valueId);
}

function laboratoryFacts(laboratory: LaboratoryDossier): LaboratoryFacts {
  return { id: laboratory.id, name: laboratory.name, kind: laboratory.kind };
}

function resultFacts(row: StoredValue | StoredHistoryValue): ResultFacts {
  return {
    uid: row.uid,
    certificateNo: row.certificateNo,
    revisionN: row.revisionN,
    deviation: row.deviation,
    reportedUnit: row.reportedUnit,
    reportedDecimals: row.reportedDecimals,
    expandedU: row.expandedU,
    reportedUDecimals: row.reportedUDecimals,
    k: row.k,
  };
}

function datesFacts(
  row: StoredValue | StoredHistoryValue,
): Pick<ValueFacts, 'performedBegin' | 'performedEnd' | 'issuedOn' | 'datePrecision'> {
  return {
    performedBegin: row.performedBegin,
    performedEnd: row.performedEnd,
    issuedOn: row.issuedOn,
    datePrecision: row.datePrecision,
  };
}
