import type { Sequelize } from 'sequelize';
import type { NoticeKind } from '#shared/contracts/notices.ts';
import { readRows } from '#server/db/read.ts';

/** A notice as the list and its own page tell it. */
export interface NoticeHead {
  id: string;
  number: string;
  kind: NoticeKind;
  title: string;
  reason: string;
  threshold: string | null;
  issuerId: string;
  issuerCode: string;
  issuerName: string;
  fromScaleId: string;
  fromScaleName: string;
  toScaleId: string | null;
  toScaleName: string | null;
  effectiveOn: string;
  madeKnownOn: string;
  replacesId: string | null;
}

const NOTICES = `
  SELECT n.id, n.number, n.kind, n.title, n.reason, n.threshold, l.id AS issuerId, l.code AS issuerCode,
    l.name AS issuerName, f.id AS fromScaleId, f.name AS fromScaleName, t.id AS toScaleId, t.name AS toScaleName,
    n.effective_on AS effectiveOn, n.made_known_on AS madeKnownOn, n.replaces_id AS replacesId
  FROM notice n
  JOIN laboratory l ON l.id = n.issuer_id
  JOIN scale_version f ON f.id = n.from_scale_id
  LEFT JOIN scale_version t ON t.id = n.to_scale_id
  ORDER BY n.effective_on, n.act_seq`;

/** Every notice, by the day it takes effect. */
export async function noticeHeads(database: Sequelize): Promise<NoticeHead[]> {
  return readRows<NoticeHead>(database, NOTICES);
}

export interface ScaleVersionHead {
  id: string;
  name: string;
  basis: string;
  validFrom: string;
  validTo: string | null;
  values: number;
}

/** Every version of the mass scale, in the order of their days, with how many values rest on it. */
export async function scaleVersions(database: Sequelize): Promise<ScaleVersionHead[]> {
  return readRows<ScaleVersionHead>(
    database,
    `SELECT s.id, s.name, s.basis, s.valid_from AS validFrom, s.valid_to AS validTo,
       (SELECT COUNT(*) FROM assigned_value v WHERE v.scale_version_id = s.id) AS \`values\`
     FROM scale_version s ORDER BY s.valid_from, s.act_seq`,
  );
}

/** A value of a notice's issuer, as far as coverage asks. */
export interface CoverableRow {
  id: number;
  issuerId: string;
  quantity: 'mass' | 'conventional mass';
  nominal: string;
  performedEnd: string;
  scaleVersion: string | null;
}

/** What values are asked for: whatever one of the terms may cover. Null bounds nothing. */
export interface Reach {
  performedFrom: string | null;
  performedTo: string | null;
  nominalFrom: string | null;
  nominalTo: string | null;
}

/** Values that a laboratory issued, by nominal, day, kind and scale: those within a reach, the coverage being judged later. */
export async function valuesIssuedBy(
  database: Sequelize,
  issuerId: string,
  reach: Reach,
): Promise<CoverableRow[]> {
  return readRows<CoverableRow>(
    database,
    `SELECT v.id, v.issuer_id AS issuerId, v.quantity, v.nominal, v.performed_end AS performedEnd,
       s.name AS scaleVersion
     FROM assigned_value v LEFT JOIN scale_version s ON s.id = v.scale_version_id
     WHERE v.issuer_id = :issuerId
       AND (:performedFrom IS NULL OR v.performed_end >= :performedFrom)
       AND (:performedTo IS NULL OR v.performed_end <= :performedTo)
       AND (:nominalFrom IS NULL OR v.nominal >= CAST(:nominalFrom AS DECIMAL(40, 20)))
       AND (:nominalTo IS NULL OR v.nominal <= CAST(:nominalTo AS DECIMAL(40, 20)))`,
    { issuerId, ...reach },
  );
}
