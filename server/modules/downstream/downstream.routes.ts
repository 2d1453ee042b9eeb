import { z } from 'zod';
import { DistanceResponse } from '#shared/contracts/distance.ts';
import {
  DownstreamQuery,
  DownstreamResponse,
  ExposureQuery,
  WhatIfInput,
  WhatIfResponse,
} from '#shared/contracts/downstream.ts';
import { TogetherInput, TogetherResponse } from '#shared/contracts/together.ts';
import { Id } from '#shared/ids.ts';
import { route, type Route } from '#server/http/route.ts';
import { chainSubject, readChain } from '#server/modules/chains/index.ts';
import { authorize, signedIn } from '#server/policy/permission.ts';
import { seesHistory } from '#server/policy/value-view.ts';
import { distanceOf } from './distance.service.ts';
import { presentDownstream } from './downstream.presenter.ts';
import { downstreamOf } from './downstream.service.ts';
import { readDownstream } from './downstream.policy.ts';
import { exposureOf } from './exposure.service.ts';
import { standardSubject, valueOrStandardSubject } from './subject.queries.ts';
import { togetherOf } from './together.service.ts';
import { presentWhatIf } from './what-if.presenter.ts';
import { whatIfSubject } from './what-if-subject.ts';
import { whatIf } from './what-if.service.ts';

export const downstreamRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/downstream/:uid',
    summary: 'Who leans on a value, or on any value of a standard: in groups, and a group opened.',
    permission: readDownstream,
    params: z.object({ uid: Id }),
    query: DownstreamQuery,
    subject: (context, { params }) => valueOrStandardSubject(context, params.uid),
    act: (context, { query }, subject) => downstreamOf(context, subject.ids.flat(), query),
    response: DownstreamResponse,
    present: presentDownstream,
  }),
  route({
    method: 'get',
    path: '/api/exposure/:standardId',
    summary: 'What leaned on a weight between its last good day and its first bad one.',
    permission: readDownstream,
    params: z.object({ standardId: Id }),
    query: ExposureQuery,
    subject: (context, { params }) => standardSubject(context, params.standardId),
    act: (context, { query }, subject) => exposureOf(context, subject.ids.flat(), query),
    response: DownstreamResponse,
    present: presentDownstream,
  }),
  route({
    method: 'post',
    path: '/api/what-if',
    summary:
      'A dry run: what a shift, a larger u, a withdrawal or a notice would do to all that leans on it.',
    permission: readDownstream,
    body: WhatIfInput,
    subject: (context, { body }) => whatIfSubject(context, body),
    act: (context, { body }, subject) => whatIf(context, subject, body),
    response: WhatIfResponse,
    present: presentWhatIf,
  }),
  route({
    method: 'get',
    path: '/api/chains/:valueUid/distance',
    summary: 'How wrong each ancestor may be before a value leaves its class, and what it can still carry.',
    permission: readChain,
    params: z.object({ valueUid: Id }),
    subject: (context, { params }) => chainSubject(context, params.valueUid),
    act: (context, _input, subject) => distanceOf(context, subject, seesHistory(context.user, subject)),
    response: DistanceResponse,
    present: (result) => result,
  }),
  route({
    method: 'post',
    path: '/api/chains/together',
    summary: 'Several weights on the pans: what they share, and the uncertainty of their sum and difference.',
    permission: signedIn,
    body: TogetherInput,
    act: async (context, { body }) => {
      const subjects = await Promise.all(body.valueUids.map((uid) => chainSubject(context, uid)));
      for (const subject of subjects) authorize(context.user, readChain, subject);
      return togetherOf(context, subjects, body);
    },
    response: TogetherResponse,
    present: (result) => result,
  }),
];
