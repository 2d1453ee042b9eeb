import type { Sequelize } from 'sequelize';
import type { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { factOnDay } from '#server/modules/standards/index.ts';
import type {
  IssueFacts,
  LaboratoryFacts,
  ReferenceFacts,
  SourceFacts,
  StandardFacts,
} from './issue-facts.ts';

/** The newest shared effect of a standard's volume that is asserted for `:day`, else the newest of any day. */
const volumeSourceOf = (standard: string) => `(
  SELECT p.source_id FROM property p
  WHERE p.standard_id = ${standard} AND p.kind IN ('density', 'volume') AND p.source_id IS NOT NULL
  ORDER BY (p.valid_from <= :day AND (p.valid_to IS NULL OR p.valid_to >= :day)) DESC, p.act_seq DESC LIMIT 1)`;

const STANDARDS = `
  SELECT s.id, s.registry_no AS registryNo, s.marking, s.nominal, s.laboratory_id AS laboratoryId,
    COALESCE(${factOnDay('owner', 's.id')}, s.laboratory_id) AS ownerId,
    COALESCE(${factOnDay('custodian', 's.id')}, s.laboratory_id) AS custodianId,
    ${factOnDay('class', 's.id')} AS class,
    ${volumeSourceOf('s.id')} AS volumeSourceId,
    (SELECT v.id FROM assigned_value v
     WHERE v.standard_id = s.id AND v.quantity = 'conventional mass' AND v.performed_end < :day
       AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = v.id)
     ORDER BY v.performed_end DESC LIMIT 1) AS lastId
  FROM standard s WHERE s.id IN (:ids)`;

const REFERENCES = `
  SELECT v.id, v.uid, r.calibration_id AS calibrationId, c.certificate_no AS certificateNo,
    v.standard_id AS standardId, s.registry_no AS registryNo, v.nominal,
    COALESCE(v.class, ${factOnDay('class', 's.id')}) AS class, v.quantity, v.u, v.k,
    v.performed_end AS performedEnd, v.effective_from AS issuedOn,
    ${volumeSourceOf('v.standard_id')} AS volumeSourceId
  FROM assigned_value v
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id
  JOIN standard s ON s.id = v.standard_id
  WHERE v.uid IN (:uids)`;

const SOURCE = 'SELECT id, uid, kind, u FROM source';

type WithVolume<Row> = Omit<Row, 'volumeSource'> & { volumeSourceId: number | null };

/** Everything the rules of issuing need to know, in a handful of reads whatever the number of lines. */
export async function issueFacts(
  database: Sequelize,
  input: CalibrationInput,
  today: string,
): Promise<IssueFacts> {
  const day = input.performedEnd;
  const standards = await standardRows(
    database,
    input.lines.map((line) => line.standardId),
    day,
  );
  const uids = input.lines.flatMap((line) => line.references.map((reference) => reference.valueUid));
  const references = uids.length
    ? await readRows<WithVolume<ReferenceFacts>>(database, REFERENCES, { uids: [...new Set(uids)], day })
    : [];
  const sources = await sourceRows(
    database,
    input.lines.flatMap((line) => line.sources.map((source) => source.sourceUid)),
    [...standards, ...references].flatMap((row) => (row.volumeSourceId === null ? [] : [row.volumeSourceId])),
  );
  const byId = new Map(sources.map((source) => [source.id, source]));
  const withVolume = <Row extends { volumeSourceId: number | null }>({ volumeSourceId, ...row }: Row) => ({
    ...row,
    volumeSource: byId.get(volumeSourceId ?? -1) ?? null,
  });
  const scaleVersionIds = input.lines.flatMap((line) => line.scaleVersionId ?? []);
  return {
    today,
    laboratories: await laboratoryRows(database, [input.issuerId, input.registeredById]),
    standards: new Map(standards.map((row) => [row.id, withVolume(row)])),
    references: new Map(references.map((row) => [row.uid, withVolume(row)])),
    sources: new Map(sources.map((source) => [source.uid, source])),
    scaleVersionIds: await knownScaleVersions(database, scaleVersionIds),
    documentLaboratoryId: await documentLaboratory(database, input.documentId),
  };
}

async function standardRows(
  database: Sequelize,
  wanted: string[],
  day: string,
): Promise<WithVolume<StandardFacts>[]> {
  type Row = Omit<WithVolume<StandardFacts>, 'epochs' | 'lastConventional'> & { lastId: number | null };
  const ids = [...new Set(wanted)];
  const rows = await readRows<Row>(database, STANDARDS, { ids, day });
  const epochs = await readRows<StandardFacts['epochs'][number] & { standardId: string }>(
    database,
    `SELECT id, standard_id AS standardId, n, begins_on AS beginsOn FROM epoch
     WHERE standard_id IN (:ids) ORDER BY standard_id, n`,
    { ids },
  );
  const lastIds = rows.flatMap((row) => row.lastId ?? []);
  const lastValues = lastIds.length
    ? await readRows<{ id: number; deviation: string; expandedU: string | null }>(
        database,
        'SELECT id, deviation, expanded_u AS expandedU FROM assigned_value WHERE id IN (:lastIds)',
        { lastIds },
      )
    : [];
  const lastOf = new Map(lastValues.map(({ id, ...last }) => [id, last]));
  return rows.map(({ lastId, ...row }) => ({
    ...row,
    epochs: epochs.filter((epoch) => epoch.standardId === row.id),
    lastConventional: lastOf.get(lastId ?? -1) ?? null,
  }));
}

async function sourceRows(database: Sequelize, uids: string[], ids: number[]): Promise<SourceFacts[]> {
  if (uids.length + ids.length === 0) return [];
  return readRows<SourceFacts>(
    database,
    `${SOURCE} WHERE uid IN (:uids) UNION ${SOURCE} WHERE id IN (:ids)`,
    {
      uids: uids.length ? [...new Set(uids)] : [''],
      ids: ids.length ? [...new Set(ids)] : [0],
    },
  );
}

async function laboratoryRows(database: Sequelize, ids: string[]): Promise<Map<string, LaboratoryFacts>> {
  const rows = await readRows<LaboratoryFacts>(
    database,
    'SELECT id, name, kind FROM laboratory WHERE id IN (:ids)',
    { ids },
  );
  return new Map(rows.map((row) => [row.id, row]));
}

async function knownScaleVersions(database: Sequelize, ids: string[]): Promise<Set<string>> {
  if (ids.length === 0) return new Set();
  const rows = await readRows<{ id: string }>(database, 'SELECT id FROM scale_version WHERE id IN (:ids)', {
    ids: [...new Set(ids)],
  });
  return new Set(rows.map((row) => row.id));
}

async function documentLaboratory(database: Sequelize, id: string | null): Promise<string | null> {
  if (id === null) return null;
  const row = await readRow<{ laboratoryId: string }>(
    database,
    'SELECT laboratory_id AS laboratoryId FROM document WHERE id = :id',
    { id },
  );
  return row?.laboratoryId ?? null;
}
