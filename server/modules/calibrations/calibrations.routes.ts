import { z } from 'zod';
import {
  CalibrationListQuery,
  CalibrationListResponse,
  CalibrationResponse,
  CorrectBody,
  CorrectedResponse,
  SignedWithdrawBody,
  WithdrawnResponse,
} from '#shared/contracts/calibrations.ts';
import { Id } from '#shared/ids.ts';
import { today } from '#server/http/context.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { signedIn } from '#server/policy/permission.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';
import { isAuthorisedToSign } from './authorised-to-sign.queries.ts';
import { calibrationList } from './calibration-list.queries.ts';
import { calibrationSheet } from './calibration-sheet.queries.ts';
import { calibrationSubject } from './calibration-subject.queries.ts';
import { presentCalibration } from './calibration.presenter.ts';
import {
  correctCalibrationPermission,
  draftCalibration,
  readCalibration,
  somewhere,
  withdrawCalibrationPermission,
} from './calibrations.policy.ts';
import { confirmSignature } from './confirm-signature.ts';
import { correctCalibration } from './correct-calibration.service.ts';
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
    body: SignedWithdrawBody,
    subject,
    act: async (context, { params: { revisionId }, body: { password, ...body } }) => {
      await confirmSignature(context, password, 'Nothing was withdrawn.');
      const { actSeq } = await withdrawCalibration(context, revisionId, body);
      return { actSeq, sheet: await calibrationSheet(context.database, revisionId, today(context)) };
    },
    response: WithdrawnResponse,
    present: ({ actSeq, sheet }, context, about) => ({
      ...presentCalibration(sheet, context.user, about),
      actSeq,
    }),
  }),
  route({
    method: 'post',
    path: '/api/calibrations/:revisionId/correct',
    summary: 'Issues the next revision with some results corrected, under the hand of a signatory.',
    permission: correctCalibrationPermission,
    params: RevisionParams,
    body: CorrectBody,
    subject: async (context, { params }) => {
      const about = await calibrationSubject(context, params.revisionId);
      return { ...about, isAuthorised: await isAuthorisedToSign(context, about.registeredById) };
    },
    act: (context, { params: { revisionId }, body }) => correctCalibration(context, revisionId, body),
    response: CorrectedResponse,
    present: (result) => result,
    status: 201,
    location: ({ revisionId }) => `/api/calibrations/${revisionId}`,
  }),
];
