import { z } from 'zod';
import { Id } from '#shared/ids.ts';
import {
  LaboratoryListQuery,
  LaboratoryListResponse,
  LaboratoryResponse,
} from '#shared/contracts/network.ts';
import { notFound } from '#server/http/app-error.ts';
import { today } from '#server/http/context.ts';
import { route, type Route } from '#server/http/route.ts';
import { abilitiesFor, signedIn } from '#server/policy/permission.ts';
import { laboratoryList } from './laboratory-list.queries.ts';
import { laboratoryDetail, laboratoryPeople } from './laboratory.queries.ts';
import { LABORATORY_PERMISSIONS, seePeople } from './network.policy.ts';

export const networkRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/laboratories',
    summary: 'Every laboratory with its standing on a day.',
    permission: signedIn,
    query: LaboratoryListQuery,
    act: (context, { query }) => laboratoryList(context.database, query.day ?? today(context)),
    response: LaboratoryListResponse,
    present: (laboratories) => ({ laboratories }),
  }),
  route({
    method: 'get',
    path: '/api/laboratories/:laboratoryId',
    summary: 'One laboratory: standing, scope, and people for those who read it in full.',
    permission: signedIn,
    params: z.object({ laboratoryId: Id }),
    query: LaboratoryListQuery,
    act: async (context, { params: { laboratoryId }, query }) => {
      const day = query.day ?? today(context);
      const detail = await laboratoryDetail(context.database, laboratoryId, day);
      if (!detail) throw notFound('This laboratory');
      const isOpen = seePeople.allows(context.user, { laboratoryId });
      return {
        ...detail,
        people: isOpen ? await laboratoryPeople(context.database, laboratoryId, day) : null,
      };
    },
    response: LaboratoryResponse,
    present: (detail, context) => ({
      ...detail,
      abilities: abilitiesFor(context.user, { laboratoryId: detail.laboratory.id }, LABORATORY_PERMISSIONS),
    }),
  }),
];
