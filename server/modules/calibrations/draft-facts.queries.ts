import type { Sequelize } from 'sequelize';
import { decimalText } from '#shared/decimal.ts';
import type { DraftContent, DraftLine, ReferenceChoice } from '#shared/contracts/drafts.ts';
import { Day, type WeightClass } from '#shared/contracts/common.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { factOnDay } from '#server/modules/standards/index.ts';
import type { DraftFacts } from './draft-facts.ts';
import { referencesByUid } from './references.queries.ts';

export interface DraftStandard {
  id: string;
  registryNo: string;
  marking: string;
  nominal: string;
  class: WeightClass | null;
  lastValues: Partial<Record<DraftLine['quantity'], LastValue>>;
}

interface LastValue {
  deviation: string;
  expandedU: string | null;
  performedEnd: string;
}

/** What is shown beside a draft and what its reading asks for, in one go. */
export interface DraftSurroundings {
  facts: DraftFacts;
  standards: DraftStandard[];
  references: ReferenceChoice[];
}

const ISSUER = `
  SELECT l.id, l.name, EXISTS (
    SELECT 1 FROM recognition r
    WHERE r.laboratory_id = l.id AND r.state = 'granted'
      AND r.valid_from <= :day AND (r.valid_to IS NULL OR r.valid_to >= :day)
      AND NOT EXISTS (
        SELECT 1 FROM recognition x
        WHERE x.laboratory_id = r.laboratory_id AND x.kind = r.kind AND x.act_seq > r.act_seq
          AND x.valid_from <= :day AND (x.valid_to IS NULL OR x.valid_to >= :day))) AS isRecognized
  FROM laboratory l WHERE l.id = :issuerId`;

/** Weights of the laboratory: those it owns, keeps or registered. Others' stay unknown to its drafts. */
const STANDARDS = `
  SELECT s.id, s.registry_no AS registryNo, s.marking, s.nominal, ${factOnDay('class', 's.id')} AS class
  FROM standard s
  WHERE s.id IN (:ids) AND :laboratoryId IN (
    s.laboratory_id, ${factOnDay('owner', 's.id')}, ${factOnDay('custodian', 's.id')})`;

const LAST_VALUES = `
  SELECT v.standard_id AS standardId, v.quantity, v.deviation, v.expanded_u AS expandedU,
    v.performed_end AS performedEnd
  FROM assigned_value v
  WHERE v.standard_id IN (:ids) AND v.performed_end <= :day
    AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = v.id)
  ORDER BY v.performed_end, v.id`;

/** Loads what a draft of this laboratory refers to. A half-typed date counts as today. */
export async function draftSurroundings(
  database: Sequelize,
  laboratoryId: string,
  content: DraftContent,
  today: string,
): Promise<DraftSurroundings> {
  const typedEnd = Day.safeParse(content.performedEnd.trim());
  const day = typedEnd.success ? typedEnd.data : today;
  const issuer = content.issuerId ? await issuerOn(database, content.issuerId, day) : null;
  const standards = await standardsOf(database, laboratoryId, content, { day, today });
  const uids = content.lines.flatMap((line) => line.references.map((reference) => reference.valueUid));
  const references = await referencesByUid(database, uids, today);
  return {
    standards,
    references,
    facts: {
      laboratoryId,
      issuer,
      standards: new Map(standards.map((standard) => [standard.id, standard])),
      references: new Map(references.map((reference) => [reference.valueUid, reference])),
    },
  };
}

async function issuerOn(database: Sequelize, issuerId: string, day: string): Promise<DraftFacts['issuer']> {
  const row = await readRow<{ id: string; name: string; isRecognized: number }>(database, ISSUER, {
    issuerId,
    day,
  });
  return row && { ...row, isRecognized: Boolean(row.isRecognized) };
}

async function standardsOf(
  database: Sequelize,
  laboratoryId: string,
  content: DraftContent,
  { day, today }: { day: string; today: string },
): Promise<DraftStandard[]> {
  const ids = [...new Set(content.lines.flatMap((line) => line.standardId ?? []))];
  if (ids.length === 0) return [];
  const rows = await readRows<Omit<DraftStandard, 'lastValues'>>(database, STANDARDS, {
    ids,
    laboratoryId,
    day: today,
  });
  if (rows.length === 0) return [];
  const known = rows.map((row) => row.id);
  const values = await readRows<LastValue & { standardId: string; quantity: DraftLine['quantity'] }>(
    database,
    LAST_VALUES,
    { ids: known, day },
  );
  return rows.map((row) => {
    const lastValues: DraftStandard['lastValues'] = {};
    for (const { standardId, quantity, ...value } of values) {
      if (standardId !== row.id) continue;
      const { deviation, expandedU, performedEnd } = value;
      lastValues[quantity] = {
        deviation: decimalText(deviation),
        expandedU: expandedU && decimalText(expandedU),
        performedEnd,
      };
    }
    return { ...row, lastValues };
  });
}
