import { z } from 'zod';
import { Id } from '#shared/ids.ts';
import { MembershipBody, MembershipResponse } from '#shared/contracts/identity.ts';
import { route, type Route } from '#server/http/route.ts';
import { assertMembershipPermission } from './identity.policy.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import { refuseUnknownAccount } from './membership.queries.ts';
import { changeRole } from './membership.service.ts';

const Params = z.object({ laboratoryId: Id, accountId: Id });

export const membershipRoutes: Route[] = [
  route({
    method: 'put',
    path: '/api/laboratories/:laboratoryId/people/:accountId',
    summary: 'Grants or ends a role in a laboratory, from a day on.',
    permission: assertMembershipPermission,
    params: Params,
    body: MembershipBody,
    subject: async (context, { params, body }) => {
      await refuseUnknownLaboratory(context, params.laboratoryId);
      return { laboratoryId: params.laboratoryId, role: body.role };
    },
    act: async (context, { params, body }) => {
      await refuseUnknownAccount(context, params.accountId);
      return changeRole(context, { ...params, ...body });
    },
    response: MembershipResponse,
    present: (made) => made,
  }),
];
