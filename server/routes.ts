import { deskRoutes } from '#server/modules/desk/index.ts';
import { chainRoutes } from '#server/modules/chains/index.ts';
import { downstreamRoutes } from '#server/modules/downstream/index.ts';
import { documentRoutes } from '#server/modules/documents/index.ts';
import { healthRoutes } from '#server/modules/health/index.ts';
import { identityRoutes } from '#server/modules/identity/index.ts';
import { noticeRoutes } from '#server/modules/notices/index.ts';
import { networkRoutes } from '#server/modules/network/index.ts';
import { calibrationRoutes } from '#server/modules/calibrations/index.ts';
import { statementRoutes } from '#server/modules/statements/index.ts';
import { standardRoutes } from '#server/modules/standards/index.ts';
import { dryRunRoutes } from '#server/modules/dry-runs/index.ts';
import { auditRoutes } from '#server/modules/audits/index.ts';
import type { Route } from '#server/http/route.ts';

/** Every route of the product. A test walks this table as every kind of person. */
export const routes: readonly Route[] = [
  ...healthRoutes,
  ...identityRoutes,
  ...networkRoutes,
  ...noticeRoutes,
  ...documentRoutes,
  ...standardRoutes,
  ...calibrationRoutes,
  ...chainRoutes,
  ...statementRoutes,
  ...downstreamRoutes,
  ...dryRunRoutes,
  ...auditRoutes,
  ...deskRoutes,
];
