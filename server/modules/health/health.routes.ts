import { HealthResponse } from '#shared/contracts/health.ts';
import { readRow } from '#server/db/read.ts';
import { AppError } from '#server/http/app-error.ts';
import { route, type Route } from '#server/http/route.ts';
import { anyone } from '#server/policy/permission.ts';
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
];
