import { z } from 'zod';
import { ChainLifeResponse } from '#shared/contracts/chain-life.ts';
import {
  ChainQuery,
  ChainResponse,
  ChainSearchQuery,
  ChainSearchResponse,
  CovarianceResponse,
} from '#shared/contracts/chains.ts';
import { packChecks, PackedChainResponse } from '#shared/contracts/packed-checks.ts';
import { Id } from '#shared/ids.ts';
import { today } from '#server/http/context.ts';
import { route, type Route } from '#server/http/route.ts';
import { authorize, signedIn } from '#server/policy/permission.ts';
import { chainChoices } from './chain-search.queries.ts';
import { chainSubject } from './chain-subject.queries.ts';
import { presentChain } from './chain.presenter.ts';
import { chainOf } from './chain.service.ts';
import { readChain } from './chains.policy.ts';
import { covarianceOf } from './covariance.service.ts';
import { presentLife } from './life.presenter.ts';
import { lifeOf } from './life.service.ts';
import { storeOf } from './store-of.ts';

export const chainRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/chains',
    summary: 'Which chain to open: values in force of one’s own weights.',
    permission: signedIn,
    query: ChainSearchQuery,
    act: (context, { query }) => chainChoices(context, query.q, query.failing === '1'),
    response: ChainSearchResponse,
    present: (rows) => ({
      values: rows.map(({ holderId, holderCode, holderName, ...row }) => ({
        ...row,
        holder: { id: holderId, code: holderCode, name: holderName },
      })),
    }),
  }),
  route({
    method: 'get',
    path: '/api/chains/:valueUid',
    summary: 'The chain of a value up to the SI, with its numbers and checks, on a day as known on a day.',
    permission: readChain,
    params: z.object({ valueUid: Id }),
    query: ChainQuery,
    subject: (context, { params }) => chainSubject(context, params.valueUid),
    act: async (context, { query }, subject) => ({
      chain: await chainOf(context, storeOf(context.database), subject.id, query),
      isPacked: query.checks === 'packed',
    }),
    response: z.union([PackedChainResponse, ChainResponse]),
    isLarge: true,
    present: ({ chain, isPacked }, context, subject) => {
      const reply = presentChain(chain, context.user, subject);
      return isPacked ? { ...reply, checks: packChecks(reply.checks) } : reply;
    },
  }),
  route({
    method: 'get',
    path: '/api/chains/:valueUid/life',
    summary: 'What befell the weight and what it rests on: the days on which a question makes a difference.',
    permission: readChain,
    params: z.object({ valueUid: Id }),
    subject: (context, { params }) => chainSubject(context, params.valueUid),
    act: (context, _input, subject) => lifeOf(context, storeOf(context.database), subject.id),
    response: ChainLifeResponse,
    present: (life, context, subject) => presentLife(life, context.user, subject),
  }),
  route({
    method: 'get',
    path: '/api/chains/:valueUid/covariance/:otherUid',
    summary: 'Covariance and correlation of two values through everything they share.',
    permission: readChain,
    params: z.object({ valueUid: Id, otherUid: Id }),
    subject: (context, { params }) => chainSubject(context, params.valueUid),
    act: async (context, { params }, subject) => {
      const other = await chainSubject(context, params.otherUid);
      authorize(context.user, readChain, other);
      return covarianceOf(storeOf(context.database), subject, other, today(context));
    },
    response: CovarianceResponse,
    present: (result) => result,
  }),
];
