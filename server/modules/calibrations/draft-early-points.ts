import type { Sequelize } from 'sequelize';
import type { DraftContent, OpenPoint } from '#shared/contracts/drafts.ts';
import { Day } from '#shared/contracts/common.ts';
import { readRow } from '#server/db/read.ts';
import { dateProblems } from './issue-rules.ts';
import { wrong } from './open-points.ts';

const DAYS = ['performedBegin', 'performedEnd', 'issuedOn'] as const;

/** What is wrong with the days that can be read already, while the rest of the certificate is still being copied. */
export function dayPoints(content: DraftContent, today: string): OpenPoint[] {
  const read = (field: (typeof DAYS)[number]): string | null =>
    Day.safeParse(content[field].trim()).data ?? null;
  // A day that is not there yet is taken as one that breaks no rule, and no point is made of it.
  const performedBegin = read('performedBegin') ?? '0001-01-01';
  const performedEnd = read('performedEnd') ?? performedBegin;
  const issuedOn = read('issuedOn') ?? '9999-12-31';
  return dateProblems({ performedBegin, performedEnd, issuedOn }, today)
    .filter(({ field }) => DAYS.some((day) => day === field && read(day) !== null))
    .map(({ field, message, received = null, expected = null, clause = null }) => ({
      ...wrong(field, message, received, expected),
      clause,
    }));
}

/** Whether the certificate is in the register already; asked as soon as its issuer and its number are named. */
export async function repeatedCertificate(database: Sequelize, content: DraftContent): Promise<OpenPoint[]> {
  const { issuerId } = content;
  const certificateNo = content.certificateNo.trim();
  if (issuerId === null || certificateNo === '') return [];
  const known = await readRow(
    database,
    'SELECT id FROM calibration WHERE laboratory_id = :issuerId AND certificate_no = :certificateNo',
    { issuerId, certificateNo },
  );
  if (!known) return [];
  const message = 'This certificate of this laboratory is already in the register.';
  return [wrong('certificateNo', message, certificateNo, 'a certificate that is not entered yet')];
}
