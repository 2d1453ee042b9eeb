import { healthRoutes } from '#server/modules/health/index.ts';
import type { Route } from '#server/http/route.ts';

/** Every route of the product. A test walks this table as every kind of person. */
export const routes: readonly Route[] = [...healthRoutes];
