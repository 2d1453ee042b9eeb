import { z } from 'zod';

/** GET /api/health: ready to answer. */
export const HealthResponse = z.object({
  status: z.literal('ready'),
  version: z.string(),
  database: z.string(),
});

/** GET /api/health/session: the database answered a signed-in person. */
export const SessionHealthResponse = z.object({ status: z.literal('ready') });
