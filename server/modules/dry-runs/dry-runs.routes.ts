import { z } from 'zod';
import {
  DryRunListQuery,
  DryRunListResponse,
  DryRunNoteBody,
  DryRunResponse,
  NamedInput,
  NamedResponse,
  SaveDryRunBody,
  type DryRunQuestion,
} from '#shared/contracts/dry-runs.ts';
import { Id } from '#shared/ids.ts';
import { AppError } from '#server/http/app-error.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { readDownstream, whatIfSubject } from '#server/modules/downstream/index.ts';
import { refuseUnknownLaboratory } from '#server/modules/network/index.ts';
import { authorize, signedIn } from '#server/policy/permission.ts';
import { dryRunById, dryRunList } from './dry-run.queries.ts';
import { presentDryRun, presentHead, type OpenedDryRun } from './dry-run.presenter.ts';
import { noteDryRunPermission, saveDryRunPermission } from './dry-runs.policy.ts';
import { noteDryRun, saveDryRun } from './keep-dry-run.service.ts';
import { namedSubjects } from './named.service.ts';

const DryRunParams = z.object({ id: Id });

export const dryRunRoutes: Route[] = [
  route({
    method: 'post',
    path: '/api/what-if/named',
    summary:
      'What the changes of a dry run are about, in words, and which real acts are open to this person.',
    permission: readDownstream,
    body: NamedInput,
    subject: (context, { body }) => whatIfSubject(context, body),
    act: (context, { body }) => namedSubjects(context, body),
    response: NamedResponse,
    present: (subjects) => ({ subjects }),
  }),
  route({
    method: 'get',
    path: '/api/dry-runs',
    summary: 'Dry runs kept for the laboratories one works in, the newest first.',
    permission: signedIn,
    query: DryRunListQuery,
    act: (context, { query }) => {
      const { isRegistrar, memberships } = context.user;
      const own = [...new Set(memberships.map((membership) => membership.laboratoryId))];
      return dryRunList(context.database, query, isRegistrar ? null : own);
    },
    response: DryRunListResponse,
    present: ({ runs, nextCursor }) => ({ runs: runs.map(presentHead), nextCursor }),
  }),
  route({
    method: 'post',
    path: '/api/dry-runs',
    summary: 'Keeps the question of a dry run for a laboratory.',
    permission: saveDryRunPermission,
    body: SaveDryRunBody,
    subject: async (context, { body: { laboratoryId } }) => {
      await refuseUnknownLaboratory(context, laboratoryId);
      return { laboratoryId };
    },
    act: async (context, { body }) => {
      authorize(context.user, readDownstream, await whatIfSubject(context, body.question));
      return opened(context, await saveDryRun(context, body));
    },
    response: DryRunResponse,
    present: (run, context) => presentDryRun(run, context.user),
    status: 201,
    location: ({ run }) => `/api/dry-runs/${run.id}`,
  }),
  route({
    method: 'get',
    path: '/api/dry-runs/:id',
    summary: 'A dry run for whoever has its address: the question, as far as they may know what it names.',
    permission: signedIn,
    params: DryRunParams,
    act: (context, { params }) => opened(context, params.id),
    response: DryRunResponse,
    present: (run, context) => presentDryRun(run, context.user),
  }),
  route({
    method: 'post',
    path: '/api/dry-runs/:id/notes',
    summary: 'Adds a remark to a dry run, or says that it is discarded and why.',
    permission: noteDryRunPermission,
    params: DryRunParams,
    body: DryRunNoteBody,
    subject: async (context, { params: { id } }) => {
      const { run } = await dryRunById(context.database, id);
      return { id, laboratoryId: run.laboratoryId };
    },
    act: async (context, { params: { id }, body }, { laboratoryId }) => {
      await noteDryRun(context, { id, laboratoryId }, body);
      return opened(context, id);
    },
    response: DryRunResponse,
    present: (run, context) => presentDryRun(run, context.user),
    status: 201,
  }),
];

async function opened(context: SignedInContext, id: string): Promise<OpenedDryRun> {
  const { question, ...rest } = await dryRunById(context.database, id);
  return { ...rest, question: (await mayKnow(context, question)) ? question : null };
}

/** Whether this reader could have asked it: it names nothing that they may not know. */
async function mayKnow(context: SignedInContext, question: DryRunQuestion): Promise<boolean> {
  try {
    return readDownstream.allows(context.user, await whatIfSubject(context, question));
  } catch (error) {
    if (error instanceof AppError && (error.id === 'not-found' || error.id === 'unprocessable')) return false;
    throw error;
  }
}
