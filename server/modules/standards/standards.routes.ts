import { z } from 'zod';
import {
  EpochResponse,
  OpenEpochBody,
  RegisteredSetResponse,
  RegisteredStandardResponse,
  RegisterSetBody,
  RegisterStandardBody,
  StandardListQuery,
  StandardListResponse,
  StandardResponse,
} from '#shared/contracts/standards.ts';
import { Id } from '#shared/ids.ts';
import { notFound } from '#server/http/app-error.ts';
import { today } from '#server/http/context.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import { abilitiesFor, signedIn } from '#server/policy/permission.ts';
import { readableLaboratoryIds } from '#server/policy/user.ts';
import { openEpoch } from './open-epoch.service.ts';
import { registerSet } from './register-set.service.ts';
import { registerStandard } from './register-standard.service.ts';
import { standardSubject, type StandardSubject } from './standard-laboratory.queries.ts';
import { standardList } from './standard-list.queries.ts';
import { standardSheet } from './standard-sheet.queries.ts';
import {
  changeStandard,
  readStandard,
  registerStandardPermission,
  STANDARD_PERMISSIONS,
} from './standards.policy.ts';
import { presentStandard, presentStandardRow } from './standards.presenter.ts';

const StandardParams = z.object({ standardId: Id });

/** Whose standard it is; 404 for one this person does not read. */
async function readableStandard(
  context: SignedInContext,
  { params }: { params: z.infer<typeof StandardParams> },
): Promise<StandardSubject> {
  const subject = await standardSubject(context.database, params.standardId, today(context));
  if (!readStandard.allows(context.user, subject)) throw notFound('This standard');
  return subject;
}

async function ofLaboratory(
  context: SignedInContext,
  { body: { laboratoryId } }: { body: { laboratoryId: string } },
): Promise<{ laboratoryId: string }> {
  await refuseUnknownLaboratory(context, laboratoryId);
  return { laboratoryId };
}

export const standardRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/standards',
    summary: 'Standards of the laboratories this person reads in full, page by page.',
    permission: signedIn,
    query: StandardListQuery,
    act: (context, { query }) =>
      standardList(context.database, query, readableLaboratoryIds(context.user), today(context)),
    response: StandardListResponse,
    present: (list, context) => ({
      ...list,
      standards: list.standards.map(presentStandardRow),
      abilities: {
        [registerStandardPermission.name]: context.user.memberships.some((membership) =>
          registerStandardPermission.allows(context.user, membership),
        ),
      },
    }),
  }),
  route({
    method: 'post',
    path: '/api/standards',
    summary: 'Registers one weight.',
    permission: registerStandardPermission,
    body: RegisterStandardBody,
    subject: ofLaboratory,
    act: (context, { body }) => registerStandard(context, body),
    response: RegisteredStandardResponse,
    present: ({ id, registryNo }) => ({ id, registryNo }),
    status: 201,
    location: ({ id }) => `/api/standards/${id}`,
  }),
  route({
    method: 'post',
    path: '/api/sets',
    summary: 'Registers a set with all its weights.',
    permission: registerStandardPermission,
    body: RegisterSetBody,
    subject: ofLaboratory,
    act: (context, { body }) => registerSet(context, body),
    response: RegisteredSetResponse,
    present: ({ id, registryNo, members }) => ({ id, registryNo, members }),
    status: 201,
  }),
  route({
    method: 'get',
    path: '/api/standards/:standardId',
    summary: 'One standard: identity, history, properties, programme.',
    permission: readStandard,
    params: StandardParams,
    subject: readableStandard,
    act: (context, { params }) => standardSheet(context.database, params.standardId, today(context)),
    response: StandardResponse,
    present: (sheet, context, subject) =>
      presentStandard(sheet, abilitiesFor(context.user, subject, STANDARD_PERMISSIONS)),
  }),
  route({
    method: 'post',
    path: '/api/standards/:standardId/epochs',
    summary: 'Opens a new epoch after an adjustment, a repair, re-polishing or damage.',
    permission: changeStandard,
    params: StandardParams,
    body: OpenEpochBody,
    subject: readableStandard,
    act: (context, { params, body }) => openEpoch(context, params.standardId, body),
    response: EpochResponse,
    present: (epoch) => epoch,
    status: 201,
  }),
];
