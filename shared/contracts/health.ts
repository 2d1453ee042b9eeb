import { z } from 'zod';

/** GET /api/health: ready to answer. */
export const HealthResponse = z.object({
  status: z.literal('ready'),
  version: z.string(),
  database: z.string(),
});
