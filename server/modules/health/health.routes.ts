import { HealthResponse, SessionHealthResponse } from '#shared/contracts/health.ts';
import { readRow } from '#server/db/read.ts';
import { AppError } from '#server/http/app-error.ts';
import { route, type Route } from '#server/http/route.ts';
import { anyone, signedIn } from '#server/policy/permission.ts';
import { version } from '#server/version.ts';

export const healthRoutes: Route[] = [
  route({
    method: 'get',
    path: '/api/health',
    summary: 'Whether the product is ready to answer.',
    permission: anyone,
    act: async (context) => {
      const row = await readRow<{ version: string }>(context.database, 'SELECT VERSION() AS version');
      if (!row) throw new AppError('unavailable', 'The database does not answer.');
      return row;
    },
    response: HealthResponse,
    present: (row) => ({ status: 'ready' as const, version, database: row.version }),
  }),
  route({
    method: 'get',
    path: '/api/health/session',
    summary: 'The shortest signed-in request: one trip to the database. Others are measured beside it.',
    permission: signedIn,
    act: async (context) => {
      const row = await readRow<{ one: number }>(context.database, 'SELECT 1 AS one');
      if (!row) throw new AppError('unavailable', 'The database does not answer.');
    },
    response: SessionHealthResponse,
    present: () => ({ status: 'ready' as const }),
  }),
];
