import { z } from 'zod';
import { ChainResponse } from '#shared/contracts/chains.ts';
import {
  DrawingQuery,
  StatementQuery,
  StatementResponse,
  type StatementQuery as Asked,
} from '#shared/contracts/statements.ts';
import { Id } from '#shared/ids.ts';
import { route, type Route, type SignedInContext } from '#server/http/route.ts';
import { presentAs } from '#server/http/validate.ts';
import { authorize } from '#server/policy/permission.ts';
import {
  chainOf,
  chainSubject,
  presentChain,
  readChain,
  storeOf,
  type ChainSubject,
} from '#server/modules/chains/index.ts';
import { drawingPdf } from './drawing-pdf.ts';
import { drawingSvg } from './drawing-svg.ts';
import { contentOf } from './content.ts';
import { sendFile, type TakenFile } from './send-file.ts';
import { statementOf } from './statement.ts';
import { statementPdf } from './statement-pdf.ts';
import { stripPdf } from './strip-pdf.ts';
import { takeAlongPage } from './take-along.ts';

interface Spec<Query extends Asked> {
  /** The last part of the address. */
  file: string;
  summary: string;
  query: z.ZodType<Query>;
  /** `second` is the chain of a further value, where the question names one. */
  make: (chain: ChainResponse, query: Query, second: ChainResponse | null) => TakenFile | Promise<TakenFile>;
}

/**
 * A document of a chain. Each is made from the reply that this person would get to the same question, checked
 * against its contract, and from nothing else.
 */
function document<Query extends Asked>({ file, summary, query, make }: Spec<Query>): Route {
  return route({
    method: 'get',
    path: `/api/chains/:valueUid/${file}`,
    summary,
    permission: readChain,
    params: z.object({ valueUid: Id }),
    query,
    subject: (context, { params }) => chainSubject(context, params.valueUid),
    act: async (context, { query: asked }, subject) => {
      const chain = await visibleChain(context, asked, subject);
      return make(chain, asked, await secondChain(context, asked));
    },
    response: z.custom<TakenFile>(),
    present: (made) => made,
    send: sendFile,
  });
}

async function visibleChain(
  context: SignedInContext,
  asked: Asked,
  subject: ChainSubject,
): Promise<ChainResponse> {
  const chain = await chainOf(context, storeOf(context.database), subject.id, asked);
  return presentAs(ChainResponse, presentChain(chain, context.user, subject));
}

async function secondChain(
  context: SignedInContext,
  asked: Asked & { with?: string | undefined },
): Promise<ChainResponse | null> {
  if (asked.with === undefined) return null;
  const subject = await chainSubject(context, asked.with);
  authorize(context.user, readChain, subject);
  return visibleChain(context, asked, subject);
}

export const statementRoutes: Route[] = [
  document({
    file: 'drawing.svg',
    summary: 'The chain, drawn: SVG with its fonts in it.',
    query: DrawingQuery,
    make: (chain, query, second) => ({
      ...{ chain, called: 'chain', extension: 'svg' },
      body: drawingSvg(chain, query, second),
    }),
  }),
  document({
    file: 'drawing.pdf',
    summary: 'The chain, drawn: one page as large as the drawing.',
    query: DrawingQuery,
    make: async (chain, query, second) => ({
      ...{ chain, called: 'chain', extension: 'pdf' },
      body: await drawingPdf(chain, query, second),
    }),
  }),
  document({
    file: 'chain.json',
    summary: 'The chain as data, in one spelling: the same question gives the same bytes.',
    query: StatementQuery,
    make: (chain) => ({ chain, called: 'chain', extension: 'json', body: contentOf(chain).json }),
  }),
  document({
    file: 'take-along.html',
    summary: 'The chain as one page that needs nothing from anywhere and verifies itself.',
    query: StatementQuery,
    make: (chain, query) => {
      const { html, content } = takeAlongPage(chain, query);
      return { chain, called: 'chain', extension: 'html', body: html, sha256: content.sha256 };
    },
  }),
  document({
    file: 'strip.pdf',
    summary: 'The mass branch on A4, one step a row.',
    query: StatementQuery,
    make: async (chain, query) => ({
      ...{ chain, called: 'strip', extension: 'pdf' },
      body: await stripPdf(chain, query),
    }),
  }),
  document({
    file: 'statement.json',
    summary: 'The statement of traceability as data.',
    query: StatementQuery,
    make: (chain, query) => ({
      ...{ chain, called: 'statement', extension: 'json' },
      body: contentOf(presentAs(StatementResponse, statementOf(chain, query))).json,
    }),
  }),
  document({
    file: 'statement.pdf',
    summary: 'The statement of traceability on paper.',
    query: StatementQuery,
    make: async (chain, query) => ({
      ...{ chain, called: 'statement', extension: 'pdf' },
      body: await statementPdf(chain, query),
    }),
  }),
];
