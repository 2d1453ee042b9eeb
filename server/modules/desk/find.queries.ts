import { Decimal } from '#shared/decimal.ts';
import type { FindResponse } from '#shared/contracts/desk.ts';
import { formatQuantity } from '#shared/engine/quantity/format-quantity.ts';
import type { Unit } from '#shared/engine/quantity/units.ts';
import type { z } from 'zod';
import type { Sequelize } from 'sequelize';
import { readRows } from '#server/db/read.ts';
import { readableLaboratoryIds, type User } from '#server/policy/user.ts';

export type Found = z.input<typeof FindResponse>['found'][number];

/** Rows of one kind. */
const SHOWN = 8;

/**
 * Anything by registry number, marking, serial, certificate number or laboratory, in the laboratories that this
 * person reads in full. Laboratories are known to everybody signed in.
 */
export async function findAnything(database: Sequelize, user: User, typed: string): Promise<Found[]> {
  const text = asRegistryNo(typed);
  const ids = readableLaboratoryIds(user);
  const found = await Promise.all([
    ids === null ? standardsEverywhere(database, text) : standardsOf(database, text, ids),
    certificates(database, text, ids),
    laboratories(database, text),
  ]);
  const byKey = new Map(found.flat().map((one) => [`${one.kind} ${one.id}`, one]));
  return [...byKey.values()];
}

/** "pa0411" is PA 0411; anything else stays as it was typed. */
function asRegistryNo(typed: string): string {
  const match = /^([A-Za-z]{2,4}) ?(\d{4}(?:-\d{1,3})?)$/.exec(typed.trim());
  return match ? `${match[1]!.toUpperCase()} ${match[2]}` : typed;
}

interface StandardRow {
  id: string;
  registryNo: string;
  nominal: string;
  marking: string;
  holder: string;
}

const STANDARD = `
  SELECT s.id, s.registry_no AS registryNo, CAST(s.nominal AS CHAR) AS nominal, s.marking, l.name AS holder
  FROM standard s JOIN laboratory l ON l.id = s.laboratory_id`;

const SET = `
  SELECT w.id, 'set' AS kind, w.registry_no AS label, CONCAT(w.name, ', ', l.name) AS detail
  FROM weight_set w JOIN laboratory l ON l.id = w.laboratory_id`;

/** Within some laboratories: the holdings are few enough to look into each number and marking. */
async function standardsOf(database: Sequelize, text: string, ids: readonly string[]): Promise<Found[]> {
  if (ids.length === 0) return [];
  const replacements = { ids, part: `%${escaped(text)}%`, number: `%${escaped(text.toUpperCase())}%` };
  const [standards, sets] = await Promise.all([
    readRows<StandardRow>(
      database,
      `${STANDARD}
       WHERE s.id IN (SELECT f.standard_id FROM standard_fact f
                      WHERE f.laboratory_id IN (:ids) AND f.kind IN ('owner', 'custodian'))
         AND (s.registry_no LIKE :number OR s.marking LIKE :part OR s.serial LIKE :part)
       ORDER BY s.registry_no LIMIT ${SHOWN}`,
      replacements,
    ),
    readRows<Found>(
      database,
      `${SET} WHERE w.laboratory_id IN (:ids) AND (w.registry_no LIKE :number OR w.name LIKE :part)
       ORDER BY w.registry_no LIMIT ${SHOWN}`,
      replacements,
    ),
  ]);
  return [...standards.map(presentStandard), ...sets];
}

/** In the whole register, for the registrar: by the beginning, which the indexes answer. */
async function standardsEverywhere(database: Sequelize, text: string): Promise<Found[]> {
  const replacements = { part: `${escaped(text)}%`, number: `${escaped(text.toUpperCase())}%` };
  const [standards, sets] = await Promise.all([
    readRows<StandardRow>(
      database,
      `(${STANDARD} WHERE s.registry_no LIKE :number ORDER BY s.registry_no LIMIT ${SHOWN})
       UNION (${STANDARD} WHERE s.marking LIKE :part LIMIT ${SHOWN})
       UNION (${STANDARD} WHERE s.serial LIKE :part LIMIT ${SHOWN})
       LIMIT ${SHOWN}`,
      replacements,
    ),
    readRows<Found>(
      database,
      `${SET} WHERE w.registry_no LIKE :number ORDER BY w.registry_no LIMIT ${SHOWN}`,
      replacements,
    ),
  ]);
  return [...standards.map(presentStandard), ...sets];
}

/** By certificate number: issued by, registered by or about weights of the laboratories; null is all of them. */
async function certificates(
  database: Sequelize,
  text: string,
  ids: readonly string[] | null,
): Promise<Found[]> {
  if (ids?.length === 0) return [];
  const readable = `
    SELECT id FROM calibration WHERE laboratory_id IN (:ids) AND certificate_no LIKE :number
    UNION SELECT id FROM calibration WHERE registered_by_id IN (:ids) AND certificate_no LIKE :number
    UNION SELECT r.calibration_id FROM assigned_value v JOIN revision r ON r.id = v.revision_id
          JOIN calibration c2 ON c2.id = r.calibration_id
          WHERE v.holder_id IN (:ids) AND c2.certificate_no LIKE :number`;
  const all = 'SELECT id FROM calibration WHERE certificate_no LIKE :number';
  return readRows<Found>(
    database,
    `SELECT r.id, 'certificate' AS kind, c.certificate_no AS label,
            CONCAT(l.name, ', ', DATE_FORMAT(r.issued_on, '%Y-%m-%d')) AS detail
     FROM (${ids === null ? all : readable}) m
     JOIN calibration c ON c.id = m.id
     JOIN revision r ON r.calibration_id = c.id
     JOIN laboratory l ON l.id = c.laboratory_id
     WHERE r.n = (SELECT MAX(newest.n) FROM revision newest WHERE newest.calibration_id = c.id)
     ORDER BY c.certificate_no LIMIT ${SHOWN}`,
    ids === null ? { number: `${escaped(text)}%` } : { ids, number: `%${escaped(text)}%` },
  );
}

function laboratories(database: Sequelize, text: string): Promise<Found[]> {
  return readRows<Found>(
    database,
    `SELECT id, 'laboratory' AS kind, name AS label, CONCAT(code, ', ', place) AS detail
     FROM laboratory WHERE name LIKE :part OR code LIKE :code OR place LIKE :part
     ORDER BY name LIMIT ${SHOWN}`,
    { part: `%${escaped(text)}%`, code: `${escaped(text.toUpperCase())}%` },
  );
}

function presentStandard(row: StandardRow): Found {
  const detail = [nominalText(row.nominal), row.marking, row.holder].join(', ');
  return { kind: 'standard', id: row.id, label: row.registryNo, detail };
}

/** A nominal as it stands on the weight: 2 kg, 500 g, 20 mg. */
function nominalText(grams: string): string {
  const value = new Decimal(grams);
  const [unit, perGram]: [Unit, string] = value.gte(1000)
    ? ['kg', '0.001']
    : value.lt(1)
      ? ['mg', '1000']
      : ['g', '1'];
  return formatQuantity({ value: value.times(perGram), unit }).text;
}

/** Text in a LIKE pattern stands for itself. */
function escaped(text: string): string {
  return text.replace(/[\\%_]/g, '\\$&');
}
