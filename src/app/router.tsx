import type { ComponentType } from 'react';
import {
  createBrowserRouter,
  redirect,
  type LoaderFunction,
  type LoaderFunctionArgs,
  type RouteObject,
} from 'react-router';
import { ErrorPage } from './error-page.tsx';
import { paths } from './paths.ts';
import { requirePerson, RootLayout } from './root-layout.tsx';

/** A screen whose module is fetched when it is first asked for; its failure leaves the rail standing. */
function screen(path: string, lazy: RouteObject['lazy']): RouteObject {
  return { path, lazy, ErrorBoundary: ErrorPage } as RouteObject;
}

/**
 * A screen behind sign-in. Loaders run side by side: this one waits until the person is known, so that a stranger's
 * browser asks for nothing it would be refused.
 */
function signedInScreen(path: string, lazy: () => Promise<ScreenModule>): RouteObject {
  return screen(path, async () => {
    const { loader, ...module } = await lazy();
    if (!loader) return module;
    return {
      ...module,
      loader: async (args: LoaderFunctionArgs) => {
        await requirePerson(args);
        return loader(args);
      },
    };
  });
}

interface ScreenModule {
  Component: ComponentType;
  loader?: LoaderFunction;
}

/** The tree of screens. A route module exports `Component` and, where it primes queries, `loader`. */
export const routes: RouteObject[] = [
  { ...screen(paths.signIn.path, () => import('#src/routes/sign-in.tsx')), HydrateFallback: Nothing },
  {
    Component: RootLayout,
    loader: requirePerson,
    ErrorBoundary: ErrorPage,
    HydrateFallback: Nothing,
    children: [
      { path: paths.home.path, loader: () => redirect(paths.desk.href()), Component: Nothing },
      signedInScreen(paths.desk.path, () => import('#src/routes/desk.tsx')),
      signedInScreen(paths.standards.path, () => import('#src/routes/standards.tsx')),
      signedInScreen(paths.newStandard.path, () => import('#src/routes/standard-new.tsx')),
      signedInScreen(paths.newSet.path, () => import('#src/routes/set-new.tsx')),
      signedInScreen(paths.standard.path, () => import('#src/routes/standard.tsx')),
      signedInScreen(paths.exposure.path, () => import('#src/routes/exposure.tsx')),
      signedInScreen(paths.calibrations.path, () => import('#src/routes/calibrations.tsx')),
      signedInScreen(paths.calibrationDraft.path, () => import('#src/routes/calibration-draft.tsx')),
      signedInScreen(paths.calibration.path, () => import('#src/routes/calibration.tsx')),
      signedInScreen(paths.chains.path, () => import('#src/routes/chains.tsx')),
      signedInScreen(paths.whatIf.path, () => import('#src/routes/what-if.tsx')),
      signedInScreen(paths.dryRuns.path, () => import('#src/routes/dry-runs.tsx')),
      signedInScreen(paths.dryRunComparison.path, () => import('#src/routes/dry-run-comparison.tsx')),
      signedInScreen(paths.dryRun.path, () => import('#src/routes/dry-run.tsx')),
      signedInScreen(paths.together.path, () => import('#src/routes/together.tsx')),
      signedInScreen(paths.chain.path, () => import('#src/routes/chain.tsx')),
      signedInScreen(paths.downstream.path, () => import('#src/routes/downstream.tsx')),
      signedInScreen(paths.massScale.path, () => import('#src/routes/mass-scale.tsx')),
      signedInScreen(paths.newNotice.path, () => import('#src/routes/notice-new.tsx')),
      signedInScreen(paths.notice.path, () => import('#src/routes/notice.tsx')),
      signedInScreen(paths.audits.path, () => import('#src/routes/audits.tsx')),
      signedInScreen(paths.audit.path, () => import('#src/routes/audit.tsx')),
      signedInScreen(paths.network.path, () => import('#src/routes/network.tsx')),
      signedInScreen(paths.laboratory.path, () => import('#src/routes/laboratory.tsx')),
      signedInScreen('*', () => import('#src/routes/not-found.tsx')),
    ],
  },
];

export const router = createBrowserRouter(routes);

/** While the first module is on its way the page stays blank paper; a spinner would only flicker. */
function Nothing() {
  return null;
}
