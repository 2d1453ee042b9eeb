import { openDrafts } from '#server/modules/calibrations/index.ts';
import type { DeskResponse } from '#shared/contracts/desk.ts';
import type { Sequelize } from 'sequelize';
import { knownAt } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { today, type Context } from '#server/http/context.ts';
import { newestAudits } from '#server/modules/audits/index.ts';
import { standingOn } from '#server/modules/network/index.ts';
import type { User } from '#server/policy/user.ts';
import { deskDue } from './desk-due.queries.ts';
import { deskNotices } from './desk-notices.ts';
import { deskUpstream } from './desk-upstream.queries.ts';

/** What needs a person today, by the roles they hold. Parts that a role has no use for are empty. */
export async function deskOf(context: Context, user: User): Promise<DeskResponse> {
  const { database } = context;
  const day = today(context);
  const own = [...new Set(user.memberships.map((membership) => membership.laboratoryId))];
  const signsFor = user.memberships
    .filter(({ role }) => role === 'signatory')
    .map(({ laboratoryId }) => laboratoryId);
  const [laboratories, toSign, drafts, due, upstream, notices, audits, register, assessments] =
    await Promise.all([
      laboratoryNames(database, own),
      openDrafts(database, signsFor, ['sent to sign']),
      openDrafts(database, own, ['open']),
      deskDue(database, own, day, knownAt(day)),
      deskUpstream(database, own, day, knownAt(day)),
      deskNotices(context, user),
      newestAudits(database, [...own, ...user.assessedLaboratoryIds], user.isRegistrar),
      user.isRegistrar ? registerSize(database) : null,
      openAssessments(database, user.accountId, day),
    ]);
  return { day, laboratories, toSign, drafts, due, upstream, notices, audits, register, assessments };
}

type Name = DeskResponse['laboratories'][number];

async function laboratoryNames(database: Sequelize, ids: readonly string[]): Promise<Name[]> {
  if (ids.length === 0) return [];
  return readRows<Name>(database, 'SELECT id, code, name FROM laboratory WHERE id IN (:ids) ORDER BY name', {
    ids,
  });
}

function registerSize(database: Sequelize): Promise<DeskResponse['register']> {
  return readRow<NonNullable<DeskResponse['register']>>(
    database,
    `SELECT (SELECT COUNT(*) FROM laboratory) AS laboratories, (SELECT COUNT(*) FROM standard) AS standards,
            (SELECT COUNT(*) FROM assigned_value) AS \`values\`, (SELECT CAST(COALESCE(MAX(seq), 0) AS UNSIGNED) FROM act) AS acts`,
  );
}

async function openAssessments(
  database: Sequelize,
  accountId: string,
  day: string,
): Promise<DeskResponse['assessments']> {
  const rows = await readRows<Name & { until: string | null }>(
    database,
    `SELECT l.id, l.code, l.name, m.valid_to AS until
     FROM (${standingOn('membership', 'a.account_id, a.role, a.laboratory_id')}) m
     JOIN laboratory l ON l.id = m.laboratory_id
     WHERE m.account_id = :accountId AND m.role = 'assessor' AND m.state = 'granted' ORDER BY l.name`,
    { accountId, day },
  );
  return rows.map(({ until, ...laboratory }) => ({ laboratory, until }));
}
