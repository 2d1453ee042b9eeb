import { z } from 'zod';
import {
  CalibrationListQuery,
  CalibrationListResponse,
  CalibrationResponse,
  WithdrawBody,
} from '#shared/contracts/calibrations.ts';
import { Id } from '#shared/ids.ts';
import { today } from '#server/http/context.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { signedIn } from '#server/policy/permission.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';
import { calibrationList } from './calibration-list.queries.ts';
import { calibrationSheet } from './calibration-sheet.queries.ts';
import { calibrationSubject } from './calibration-subject.queries.ts';
import { presentCalibration } from './calibration.presenter.ts';
import {
  draftCalibration,
  readCalibration,
  somewhere,
  withdrawCalibrationPermission,
} from './calibrations.policy.ts';
import { openDrafts } from './draft-list.queries.ts';
import { draftRoutes } from './drafts.routes.ts';
import { withdrawCalibration } from './withdraw-calibration.service.ts';

const RevisionParams = z.object({ revisionId: Id });

const subject = (context: SignedInContext, { params }: { params: z.infer<typeof RevisionParams> }) =>
  calibrationSubject(context, params.revisionId);

export const calibrationRoutes: Route[] = [
  ...draftRoutes,
  route({
    method: 'get',
    path: '/api/calibrations',
    summary:
      'Issued calibrations that concern the laboratories this person reads in full; drafts on the first page.',
    permission: signedIn,
    query: CalibrationListQuery,
    act: async (context, { query }) => {
      const { database, user } = context;
      const own = [...new Set(user.memberships.map((membership) => membership.laboratoryId))];
      return {
        ...(await calibrationList(database, query, readableLaboratoryIds(user), today(context))),
        drafts: query.cursor === undefined ? await openDrafts(database, own) : [],
      };
    },
    response: CalibrationListResponse,
    present: (list, context) => ({ ...list, abilities: somewhere(context.user, draftCalibration) }),
  }),
  route({
    method: 'get',
    path: '/api/calibrations/:revisionId',
    summary: 'The sheet of one revision, as far as this person may see it.',
    permission: readCalibration,
    params: RevisionParams,
    subject,
    act: (context, { params }) => calibrationSheet(context.database, params.revisionId, today(context)),
    response: CalibrationResponse,
    present: (sheet, context, about) => presentCalibration(sheet, context.user, about),
  }),
  route({
    method: 'post',
    path: '/api/calibrations/:revisionId/withdraw',
    summary: 'Withdraws an issued calibration from a day on.',
    permission: withdrawCalibrationPermission,
    params: RevisionParams,
    body: WithdrawBody,
    subject,
    act: async (context, { params: { revisionId }, body }) => {
      await withdrawCalibration(context, revisionId, body);
      return calibrationSheet(context.database, revisionId, today(context));
    },
    response: CalibrationResponse,
    present: (sheet, context, about) => presentCalibration(sheet, context.user, about),
  }),
];
