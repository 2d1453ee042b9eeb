import type { WeightClass } from '#shared/contracts/common.ts';
import { decimalText } from '#shared/decimal.ts';
import type {
  AuthorisationFacts,
  BudgetFacts,
  EffectFacts,
  PropertyFacts,
  SheetFacts,
  WeightFacts,
} from '#shared/rules/weight-facts.ts';
import { endOfDay } from '#shared/state-at.ts';
import { assertedOn } from './asserted-on.ts';
import type { FactParts } from './chain-facts.ts';
import type { StandardDossier, StoredProperty, StoredValue } from './stored.ts';

/** What the rules read of the weight behind a value, as of the last day of its weighing. */
export function weightFacts(value: StoredValue, parts: FactParts): WeightFacts {
  const horizon = endOfDay(parts.question.known);
  const dossier = parts.standards.get(value.standardId)!;
  const day = value.performedEnd;
  const asserted = (kind: StoredProperty['kind']) => propertyOn(dossier, kind, day, horizon);
  const claimed = assertedOn(dossier.classes, day, horizon);
  return {
    kind: dossier.kind,
    serial: dossier.serial,
    shape: dossier.shape,
    classClaimed: (claimed?.value ?? null) as WeightClass | null,
    isInSet: dossier.isInSet,
    alike: dossier.duplicateIds.flatMap((id) => {
      const other = parts.standards.get(id);
      return other ? [{ registryNo: other.registryNo, marking: other.marking, serial: other.serial }] : [];
    }),
    volume: asserted('volume'),
    susceptibility: asserted('susceptibility'),
    polarisation: asserted('polarisation'),
    densityOnlyFrom: densityOnlyFrom(dossier, day, horizon),
    driftRates: dossier.driftRates
      .filter((rate) => rate.recordedAt <= horizon)
      .map(({ u, determinedOn }) => ({ u, determinedOn })),
  };
}

function propertyOn(
  { properties }: StandardDossier,
  kind: StoredProperty['kind'],
  day: string,
  horizon: string,
): PropertyFacts | null {
  const row = assertedOn(
    properties.filter((property) => property.kind === kind),
    day,
    horizon,
  );
  return row && propertyFacts(row);
}

/** A property as rules read it; the column's zeros are not the certificate's, and sentences quote these texts. */
export function propertyFacts(row: StoredProperty): PropertyFacts {
  const plain = (text: string | null) => text && decimalText(text);
  return {
    value: decimalText(row.value),
    expandedU: plain(row.expandedU),
    k: plain(row.k),
    origin: row.origin,
  };
}

/** The first later day for which a density or volume is on record, where none covers the day itself. */
function densityOnlyFrom({ properties }: StandardDossier, day: string, horizon: string): string | null {
  const rows = properties.filter(
    ({ kind, recordedAt }) => (kind === 'density' || kind === 'volume') && recordedAt <= horizon,
  );
  if (assertedOn(rows, day, horizon)) return null;
  const later = rows.map((row) => row.validFrom).filter((from) => from > day);
  return later.toSorted()[0] ?? null;
}

/** How the certificate of a value came to be: who signed it, what it amends, and what else it says of the weight. */
export function sheetFacts(value: StoredValue, parts: FactParts): SheetFacts {
  const horizon = endOfDay(parts.question.known);
  const dossier = parts.standards.get(value.standardId)!;
  const issuer = parts.laboratories.get(value.issuerId)!;
  const authorisations = issuer.authorisations.filter((row) => row.recordedAt <= horizon);
  const epoch = dossier.epochs.find(({ n }) => n === value.epochN);
  return {
    isIssued: value.id > 0,
    signatory:
      value.signatoryId === null
        ? null
        : authorisations.filter((row) => row.accountId === value.signatoryId).map(authorisationFacts),
    hasAuthorisations: authorisations.length > 0,
    amendmentReason: value.amendmentReason,
    stages: dossier.history
      .filter((row) => row.revisionId === value.revisionId && row.quantity === value.quantity)
      .map((row) => row.stage),
    epoch: { n: value.epochN, reason: epoch?.reason ?? 'new', beginsOn: value.epochBeginsOn },
  };
}

function authorisationFacts({
  state,
  validFrom,
  validTo,
  recordedAt,
}: AuthorisationFacts): AuthorisationFacts {
  return { state, validFrom, validTo, recordedAt };
}

/** What the uncertainty of a value is made of, as far as the register holds it. */
export function budgetFacts(value: StoredValue, parts: FactParts): BudgetFacts {
  return {
    components: value.components,
    effects: value.sources.flatMap(({ sourceId, sensitivity }) => effectFacts(sourceId, sensitivity, parts)),
    references: value.parents.flatMap((link) => {
      const parent = parts.byId.get(link.parentId);
      if (!parent || link.role !== 'reference') return [];
      const { registryNo, standardId, standardKind: kind, rootKind } = parent;
      return [{ registryNo, standardId, kind, rootKind, usedAs: link.usedAs }];
    }),
    nuEff: value.nuEff,
    ownU: value.localU,
    ownDegreesOfFreedom: value.localDegreesOfFreedom,
  };
}

/** A published notice enters chains as a source as well; it is no effect of the value's own. */
function effectFacts(sourceId: number, sensitivity: number, parts: FactParts): EffectFacts[] {
  const source = parts.sources.get(sourceId);
  if (!source || source.isPublished) return [];
  const { kind, standardId, registryNo, name, u, determinedOn } = source;
  const onRecord = kind === 'volume' && standardId !== null ? volumesOf(sourceId, standardId, parts) : [];
  return [{ kind, standardId, of: registryNo ?? name, sensitivity, u, determinedOn, onRecord }];
}

function volumesOf(sourceId: number, standardId: string, parts: FactParts): EffectFacts['onRecord'] {
  const horizon = endOfDay(parts.question.known);
  const rows = parts.standards.get(standardId)?.properties ?? [];
  return rows.flatMap(({ kind, validFrom, validTo, recordedAt, sourceId: own }) =>
    (kind === 'density' || kind === 'volume') && recordedAt <= horizon
      ? [{ kind, isThis: own === sourceId, validFrom, validTo, recordedAt }]
      : [],
  );
}
