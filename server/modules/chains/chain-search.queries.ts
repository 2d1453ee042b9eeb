import { readRows } from '#server/db/read.ts';
import { IN_FORCE, knownAt } from '#server/db/in-force.ts';
import { today } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';

export interface FoundValue {
  uid: string;
  registryNo: string;
  nominal: string;
  marking: string;
  holderId: string;
  holderCode: string;
  holderName: string;
  quantity: 'mass' | 'conventional mass';
  certificateNo: string;
  performedEnd: string;
  deviation: string;
  expandedU: string | null;
  k: string | null;
}

const LONGEST_LIST = 30;

/**
 * Values in force of weights this person reads in full, by the beginning of the registry number, in capitals or
 * not, with its space or without; newest first.
 * @param isFailing only those of which the newest audit of a laboratory says that a step or the whole fails
 */
export async function chainChoices(
  context: SignedInContext,
  q: string,
  isFailing: boolean,
): Promise<FoundValue[]> {
  const laboratoryIds = readableLaboratoryIds(context.user);
  if (laboratoryIds?.length === 0) return [];
  const day = today(context);
  return readRows<FoundValue>(
    context.database,
    `SELECT v.uid, s.registry_no AS registryNo, v.nominal, s.marking, h.id AS holderId, h.code AS holderCode,
       h.name AS holderName, v.quantity, c.certificate_no AS certificateNo, v.performed_end AS performedEnd,
       v.deviation, v.expanded_u AS expandedU, v.k
     FROM assigned_value v
     JOIN standard s ON s.id = v.standard_id
     JOIN revision r ON r.id = v.revision_id
     JOIN calibration c ON c.id = r.calibration_id
     JOIN laboratory h ON h.id = v.holder_id
     WHERE ${laboratoryIds ? `(${whoseOf(isFailing)}) AND` : ''} REPLACE(s.registry_no, ' ', '') LIKE :beginning AND ${IN_FORCE}
       ${isFailing ? `AND v.uid IN (${failingUids(laboratoryIds !== null)})` : ''}
     ORDER BY v.performed_end DESC, v.id DESC LIMIT ${LONGEST_LIST}`,
    {
      laboratoryIds: laboratoryIds ?? [],
      beginning: `${q
        .toUpperCase()
        .replace(/\s/g, '')
        .replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`,
      day,
      knownAt: knownAt(day),
    },
  );
}

/** One's own weights; of what fails, also the results one has issued for others. */
function whoseOf(isFailing: boolean): string {
  const held = 'v.holder_id IN (:laboratoryIds)';
  return isFailing ? `${held} OR v.issuer_id IN (:laboratoryIds)` : held;
}

/** Values that fail in the newest audit of each laboratory, and for who reads all in the newest of the network. */
function failingUids(isOfSome: boolean): string {
  return `
    SELECT f.value_uid FROM audit_finding f
    JOIN audit_run r ON r.id = f.run_id
    JOIN (
      SELECT MAX(act_seq) AS act_seq FROM audit_run
      WHERE scope = 'laboratory' ${isOfSome ? 'AND laboratory_id IN (:laboratoryIds)' : ''} GROUP BY laboratory_id
      ${isOfSome ? '' : "UNION SELECT MAX(act_seq) FROM audit_run WHERE scope = 'network'"}
    ) newest ON newest.act_seq = r.act_seq
    WHERE f.outcome = 'fails' AND f.severity <> 'information'`;
}
