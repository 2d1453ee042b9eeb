import type { z } from 'zod';
import type { NamedInput, NamedSubject } from '#shared/contracts/dry-runs.ts';
import { decimalText } from '#shared/decimal.ts';
import { readRow } from '#server/db/read.ts';
import { AppError, notFound } from '#server/http/app-error.ts';
import type { SignedInContext } from '#server/http/route.ts';
import {
  calibrationSubject,
  correctCalibrationPermission,
  isAuthorisedToSign,
  withdrawCalibrationPermission,
} from '#server/modules/calibrations/index.ts';
import { abilitiesFor } from '#server/policy/permission.ts';

const ISSUER = 'i.id AS issuerId, i.code AS issuerCode, i.name AS issuerName';

interface IssuerColumns {
  issuerId: string;
  issuerCode: string;
  issuerName: string;
}

interface ValueColumns extends IssuerColumns {
  registryNo: string;
  nominal: string;
  class: Extract<NamedSubject, { about: 'value' }>['class'];
  certificateNo: string;
  revisionId: string;
  deviation: string;
  expandedU: string | null;
  k: string | null;
}

/**
 * What the changes of a dry run are about, as a traceability statement would name it, and which of the real acts are
 * open to this person. Whether they may know it was settled before.
 * @throws AppError `not-found`
 */
export async function namedSubjects(
  context: SignedInContext,
  { changes }: z.infer<typeof NamedInput>,
): Promise<NamedSubject[]> {
  return Promise.all(
    changes.map((change) => {
      if (change.kind === 'notice') return namedIssuer(context, change.issuerId);
      if (change.kind === 'withdraw') return namedCertificate(context, change.revisionId);
      return namedValue(context, change.valueUid);
    }),
  );
}

async function namedValue(context: SignedInContext, uid: string): Promise<NamedSubject> {
  const row = await readRow<ValueColumns>(
    context.database,
    `SELECT s.registry_no AS registryNo, v.nominal, v.class, c.certificate_no AS certificateNo,
       v.revision_id AS revisionId, v.deviation, v.expanded_u AS expandedU, v.k, ${ISSUER}
     FROM assigned_value v JOIN standard s ON s.id = v.standard_id JOIN revision r ON r.id = v.revision_id
     JOIN calibration c ON c.id = r.calibration_id JOIN laboratory i ON i.id = v.issuer_id
     WHERE v.uid = :uid`,
    { uid },
  );
  if (!row) throw notFound('This value');
  const acts = await openActs(context, row.revisionId);
  return {
    about: 'value',
    uid,
    registryNo: row.registryNo,
    nominal: decimalText(row.nominal),
    class: row.class,
    certificateNo: row.certificateNo,
    issuer: issuerOf(row),
    deviation: decimalText(row.deviation),
    expandedU: row.expandedU === null ? null : decimalText(row.expandedU),
    k: row.k === null ? null : decimalText(row.k),
    revisionId: acts ? row.revisionId : null,
    abilities: acts ?? {},
  };
}

async function namedCertificate(context: SignedInContext, revisionId: string): Promise<NamedSubject> {
  const row = await readRow<IssuerColumns & { certificateNo: string; issuedOn: string; size: number }>(
    context.database,
    `SELECT c.certificate_no AS certificateNo, r.issued_on AS issuedOn, ${ISSUER},
       (SELECT COUNT(*) FROM assigned_value v WHERE v.revision_id = r.id) AS size
     FROM revision r JOIN calibration c ON c.id = r.calibration_id JOIN laboratory i ON i.id = c.laboratory_id
     WHERE r.id = :revisionId`,
    { revisionId },
  );
  if (!row) throw notFound('This certificate');
  return {
    about: 'certificate',
    revisionId,
    certificateNo: row.certificateNo,
    issuer: issuerOf(row),
    issuedOn: row.issuedOn,
    values: row.size,
    abilities: (await openActs(context, revisionId)) ?? {},
  };
}

async function namedIssuer(context: SignedInContext, issuerId: string): Promise<NamedSubject> {
  const row = await readRow<IssuerColumns>(
    context.database,
    `SELECT ${ISSUER} FROM laboratory i WHERE i.id = :issuerId`,
    { issuerId },
  );
  if (!row) throw notFound('This laboratory');
  return { about: 'issuer', issuer: issuerOf(row), abilities: {} };
}

function issuerOf(row: IssuerColumns): NamedSubject['issuer'] {
  return { id: row.issuerId, code: row.issuerCode, name: row.issuerName };
}

/** What this person may do with a certificate; null where they may not open it, nothing where it no longer stands. */
async function openActs(
  context: SignedInContext,
  revisionId: string,
): Promise<Record<string, boolean> | null> {
  const about = await readable(context, revisionId);
  if (!about) return null;
  const ended = await readRow(
    context.database,
    `SELECT 1 AS yes FROM value_end e JOIN assigned_value v ON v.id = e.value_id
     WHERE v.revision_id = :revisionId LIMIT 1`,
    { revisionId },
  );
  if (ended) return {};
  const isAuthorised = await isAuthorisedToSign(context, about.registeredById);
  return {
    ...abilitiesFor(context.user, about, [withdrawCalibrationPermission]),
    ...abilitiesFor(context.user, { ...about, isAuthorised }, [correctCalibrationPermission]),
  };
}

async function readable(context: SignedInContext, revisionId: string) {
  try {
    return await calibrationSubject(context, revisionId);
  } catch (error) {
    if (error instanceof AppError && error.id === 'not-found') return null;
    throw error;
  }
}
