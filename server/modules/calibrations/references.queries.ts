import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { QuantityKind } from '#shared/contracts/common.ts';
import type { Sequelize } from 'sequelize';
import { knownAt } from '#server/db/in-force.ts';
import { readRows } from '#server/db/read.ts';
import { STATE_ON_DAY } from '#server/db/value-state.ts';

const LONGEST_LIST = 30;

const CHOICE = `
  SELECT v.uid AS valueUid, s.registry_no AS registryNo, s.marking, v.nominal, h.id AS holderId,
    h.code AS holderCode, h.name AS holderName, v.quantity, v.deviation, v.expanded_u AS expandedU, v.k,
    c.certificate_no AS certificateNo, v.performed_end AS performedEnd, ${STATE_ON_DAY} AS state,
    NOT EXISTS (
      SELECT 1 FROM assigned_value n
      WHERE n.standard_id = v.standard_id AND n.quantity = v.quantity AND n.performed_end > v.performed_end
        AND n.effective_from <= :day AND n.recorded_at <= :knownAt
        AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = n.id AND e.effective_on <= :day
                        AND e.recorded_at <= :knownAt)) AS isNewest
  FROM assigned_value v
  JOIN standard s ON s.id = v.standard_id
  JOIN laboratory h ON h.id = v.holder_id
  JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id`;

interface ChoiceRow extends Omit<ReferenceChoice, 'holder' | 'isNewest'> {
  holderId: string;
  holderCode: string;
  holderName: string;
  isNewest: number;
}

/**
 * Values a result may name as its reference: the laboratory's own by part of the registry number; of the
 * certificate's issuer what such a certificate shows: the newest value of a weight named by its whole number (or of
 * each piece of a set), or the values of one certificate by its whole number. Nothing of anybody else.
 */
export async function referenceChoices(
  database: Sequelize,
  wanted: {
    laboratoryId: string;
    issuerId: string | null;
    q: string;
    quantity: QuantityKind | null;
    day: string;
  },
): Promise<ReferenceChoice[]> {
  const number = wanted.q.toUpperCase();
  const kind = wanted.quantity ? 'AND v.quantity = :quantity' : '';
  const order = `ORDER BY state = 'in force' DESC, performedEnd DESC, registryNo LIMIT ${LONGEST_LIST}`;
  const rows = await readRows<ChoiceRow>(
    database,
    `(${CHOICE} WHERE v.holder_id = :laboratoryId AND s.registry_no LIKE :part ${kind} ${order})
     UNION (${CHOICE} WHERE v.holder_id = :issuerId AND (s.registry_no = :number OR s.registry_no LIKE :pieces) ${kind}
            HAVING isNewest AND state = 'in force' ${order})
     UNION (${CHOICE} WHERE v.holder_id = :issuerId AND c.certificate_no = :certificate ${kind} ${order}) ${order}`,
    {
      laboratoryId: wanted.laboratoryId,
      issuerId: wanted.issuerId,
      number,
      part: `%${escaped(number)}%`,
      pieces: `${escaped(number)}-%`,
      certificate: wanted.q,
      quantity: wanted.quantity,
      day: wanted.day,
      knownAt: knownAt(wanted.day),
    },
  );
  return rows.map(choiceOf);
}

function escaped(text: string): string {
  return text.replace(/[\\%_]/g, (sign) => `\\${sign}`);
}

/** The values with these uids, in no order; what is not in the register is left out. */
export async function referencesByUid(
  database: Sequelize,
  uids: readonly string[],
  day: string,
): Promise<ReferenceChoice[]> {
  if (uids.length === 0) return [];
  const rows = await readRows<ChoiceRow>(database, `${CHOICE} WHERE v.uid IN (:uids)`, {
    uids: [...new Set(uids)],
    day,
    knownAt: knownAt(day),
  });
  return rows.map(choiceOf);
}

function choiceOf({ holderId, holderCode, holderName, isNewest, ...row }: ChoiceRow): ReferenceChoice {
  return {
    ...row,
    holder: { id: holderId, code: holderCode, name: holderName },
    isNewest: Boolean(isNewest),
  };
}
