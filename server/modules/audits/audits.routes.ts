import { z } from 'zod';
import {
  AuditAskedResponse,
  AuditBody,
  AuditFactsResponse,
  AuditFindingsQuery,
  AuditFindingsResponse,
  AuditListQuery,
  AuditListResponse,
  AuditResponse,
  AuditStoppedResponse,
  type AuditResult,
} from '#shared/contracts/audits.ts';
import { Id } from '#shared/ids.ts';
import { notFound } from '#server/http/app-error.ts';
import { route, type Route } from '#server/http/route.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import { signedIn } from '#server/policy/permission.ts';
import { allFindings, findingPage } from './audit-findings.queries.ts';
import { auditableLaboratories, auditList } from './audit-list.queries.ts';
import { auditRun } from './audit-run.queries.ts';
import { auditSubject, wantedAudit } from './audit-subject.ts';
import { presentAudit, presentFacts, presentFinding } from './audits.presenter.ts';
import { beginAudit, readAudit, repeatAuditPermission, stopAuditPermission } from './audits.policy.ts';
import { askAudit, repeatAudit, stopAudit } from './ask-audit.service.ts';
import { csvHead, csvLine } from './findings-csv.ts';
import { findingWithFacts, readAuditOf, whoseOf } from './read-audit.service.ts';

const OneAudit = z.object({ auditId: Id });
const OneFinding = z.object({ auditId: Id, n: z.coerce.number().int().min(0).max(4_000_000_000) });

export const auditRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/audits',
    summary: 'The audits in one’s reach, newest first.',
    permission: signedIn,
    query: AuditListQuery,
    act: async (context, { query }) => {
      const [list, laboratories] = await Promise.all([
        auditList(context, query.cursor),
        auditableLaboratories(context),
      ]);
      return { ...list, mayAudit: { laboratories, network: context.user.isRegistrar } };
    },
    response: AuditListResponse,
    present: (list) => list,
  }),
  route({
    method: 'post',
    path: '/api/audits',
    summary: 'Asks for an audit of a chain, a laboratory or the network.',
    permission: beginAudit,
    body: AuditBody,
    subject: async (context, { body }) => {
      if (body.scope === 'laboratory') {
        await refuseUnknownLaboratory(context, body.laboratoryId);
      }
      return wantedAudit(context, body);
    },
    act: (context, { body }) => askAudit(context, body),
    status: 201,
    location: ({ id }) => `/api/audits/${id}`,
    response: AuditAskedResponse,
    present: (asked) => asked,
  }),
  route({
    method: 'get',
    path: '/api/audits/:auditId',
    summary: 'How far an audit is, and what it found.',
    permission: readAudit,
    params: OneAudit,
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: (context, _input, job) => readAuditOf(context, job),
    response: AuditResponse,
    present: (found, context, job) => presentAudit(found, context.user, job),
  }),
  route({
    method: 'get',
    path: '/api/audits/:auditId/findings',
    summary: 'What fails or cannot be judged, a page at a time.',
    permission: readAudit,
    params: OneAudit,
    query: AuditFindingsQuery,
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: (context, { query: { cursor, whose, ...filter } }, job) =>
      findingPage(context.database, job.id, filter, whoseOf(context, job, whose), cursor),
    response: AuditFindingsResponse,
    present: ({ findings, ...page }, context) => ({
      ...page,
      findings: findings.map((found) => presentFinding(found, context.user)),
    }),
  }),
  route({
    method: 'get',
    path: '/api/audits/:auditId/findings.csv',
    summary: 'The same as a file for a spreadsheet.',
    permission: readAudit,
    params: OneAudit,
    query: AuditFindingsQuery.omit({ cursor: true }),
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: async (context, { query: { whose, ...filter } }, job) => {
      const run = await auditRun(context.database, job.id);
      if (!run) throw notFound('The result of this audit');
      const rules = JSON.parse(run.rules) as z.infer<typeof AuditResult>['rules'];
      const byId = new Map(rules.map((rule) => [rule.id, rule]));
      const lines = [csvHead()];
      for await (const page of allFindings(context.database, job.id, filter, whoseOf(context, job, whose))) {
        for (const found of page) lines.push(csvLine(presentFinding(found, context.user), byId));
      }
      return { name: `audit-${run.day}-${job.id.slice(-6)}.csv`, text: lines.join('') };
    },
    response: z.any(),
    present: () => null,
    send: ({ name, text }, response) => {
      response.attachment(name).type('text/csv; charset=utf-8').send(text);
    },
  }),
  route({
    method: 'get',
    path: '/api/audits/:auditId/findings/:n/facts',
    summary: 'What a finding’s rule saw.',
    permission: readAudit,
    params: OneFinding,
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: async (context, { params }, job) => {
      const { found, facts } = await findingWithFacts(context, job, params.n);
      const shown = presentFacts(found, facts, context.user);
      if (shown === null) throw notFound('What the rule saw of this weight');
      return { n: params.n, facts: shown };
    },
    response: AuditFactsResponse,
    present: ({ n, facts }) => ({ n, facts: facts as z.input<typeof AuditFactsResponse>['facts'] }),
  }),
  route({
    method: 'post',
    path: '/api/audits/:auditId/repeat',
    summary: 'Asks the same question again, with the knowledge it was asked with.',
    permission: repeatAuditPermission,
    params: OneAudit,
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: (context, _input, job) => repeatAudit(context, job),
    status: 201,
    location: ({ id }) => `/api/audits/${id}`,
    response: AuditAskedResponse,
    present: (asked) => asked,
  }),
  route({
    method: 'post',
    path: '/api/audits/:auditId/stop',
    summary: 'Stops an audit that waits or runs.',
    permission: stopAuditPermission,
    params: OneAudit,
    subject: (context, { params }) => auditSubject(context, params.auditId),
    act: (context, _input, job) => stopAudit(context, job.id),
    response: AuditStoppedResponse,
    present: (stopped) => stopped,
  }),
];
