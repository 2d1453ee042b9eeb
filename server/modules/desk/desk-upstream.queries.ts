import type { DeskResponse } from '#shared/contracts/desk.ts';
import type { Sequelize } from 'sequelize';
import { IN_FORCE } from '#server/db/in-force.ts';
import { readRows } from '#server/db/read.ts';

type Upstream = DeskResponse['upstream'][number];

const SHOWN = 50;

/**
 * Values in force of some laboratories, not followed by a newer one of the same weight, whose reference was
 * withdrawn or superseded by another value since. A reference re-issued with the same value is no news.
 */
export async function deskUpstream(
  database: Sequelize,
  laboratoryIds: readonly string[],
  day: string,
  knownAt: string,
): Promise<Upstream[]> {
  if (laboratoryIds.length === 0) return [];
  return readRows<Upstream>(
    database,
    `SELECT v.uid AS valueUid, s.registry_no AS registryNo, v.quantity, vc.certificate_no AS certificateNo,
            r.registry_no AS referenceRegistryNo, pc.certificate_no AS referenceCertificateNo,
            x.kind AS what, x.effective_on AS \`on\`
     FROM assigned_value v
     JOIN value_link k ON k.child_id = v.id AND k.role = 'reference'
     JOIN value_end x ON x.value_id = k.parent_id AND x.effective_on <= :day AND x.recorded_at <= :knownAt
                     AND (x.kind = 'withdrawn' OR x.changed = 'value')
     JOIN assigned_value p ON p.id = k.parent_id
     JOIN revision vr ON vr.id = v.revision_id
     JOIN calibration vc ON vc.id = vr.calibration_id
     JOIN revision pr ON pr.id = p.revision_id
     JOIN calibration pc ON pc.id = pr.calibration_id
     JOIN standard s ON s.id = v.standard_id
     JOIN standard r ON r.id = p.standard_id
     WHERE v.holder_id IN (:laboratoryIds) AND ${IN_FORCE}
       AND NOT EXISTS (
         SELECT 1 FROM assigned_value newer
         WHERE newer.standard_id = v.standard_id AND newer.quantity = v.quantity
           AND newer.performed_end > v.performed_end
           AND newer.effective_from <= :day AND newer.recorded_at <= :knownAt)
     ORDER BY x.effective_on DESC, s.registry_no, v.quantity LIMIT ${SHOWN}`,
    { laboratoryIds, day, knownAt },
  );
}
