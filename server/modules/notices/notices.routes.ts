import { z } from 'zod';
import {
  NoticeListResponse,
  NoticeQuery,
  NoticeResponse,
  PublishNoticeBody,
  PublishNoticeResponse,
  ScaleVersionListResponse,
} from '#shared/contracts/notices.ts';
import { Id } from '#shared/ids.ts';
import { today } from '#server/http/context.ts';
import { route, type Route } from '#server/http/route.ts';
import { confirmSignature } from '#server/modules/calibrations/index.ts';
import { abilitiesFor, signedIn } from '#server/policy/permission.ts';
import { noticeSubject, publishesFor } from './notice-subject.queries.ts';
import { publishNoticePermission } from './notices.policy.ts';
import { presentNotice, presentNotices } from './notices.presenter.ts';
import { scaleVersions } from './notices.queries.ts';
import { publishNotice } from './publish-notice.service.ts';
import { allNotices, showNotice } from './show-notice.service.ts';

export const noticeRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/scale-versions',
    summary: 'Every version of the mass scale, in the order of their days.',
    permission: signedIn,
    act: (context) => scaleVersions(context.database),
    response: ScaleVersionListResponse,
    present: (versions) => ({ scaleVersions: versions }),
  }),
  route({
    method: 'get',
    path: '/api/notices',
    summary: 'Every notice on the mass scale, by the day it takes effect.',
    permission: signedIn,
    act: async (context) => ({ notices: await allNotices(context), open: await publishesFor(context) }),
    response: NoticeListResponse,
    present: ({ notices, open }, context) => ({
      notices: presentNotices(notices, today(context)),
      publishesFor: open,
    }),
  }),
  route({
    method: 'get',
    path: '/api/notices/:noticeId',
    summary: "One notice, with one's own values before and after, and the weights below them by one word.",
    permission: signedIn,
    params: z.object({ noticeId: Id }),
    query: NoticeQuery,
    act: async (context, { params: { noticeId }, query }) => {
      const shown = await showNotice(context, noticeId, query);
      return { shown, subject: await noticeSubject(context, shown.notice.issuerId) };
    },
    response: NoticeResponse,
    present: ({ shown, subject }, context) =>
      presentNotice(shown, today(context), abilitiesFor(context.user, subject, [publishNoticePermission])),
  }),
  route({
    method: 'post',
    path: '/api/notices',
    summary:
      'Publishes a notice on the mass scale under the password of a signatory of a national institute.',
    permission: publishNoticePermission,
    body: PublishNoticeBody,
    subject: (context, { body }) => noticeSubject(context, body.issuerId),
    act: async (context, { body: { password, ...input } }) => {
      await confirmSignature(context, password, 'Nothing was published.');
      return publishNotice(context, input);
    },
    response: PublishNoticeResponse,
    present: (published) => published,
    status: 201,
    location: ({ id }) => `/api/notices/${id}`,
  }),
];
