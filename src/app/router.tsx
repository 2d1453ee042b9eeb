import { createBrowserRouter, redirect, type RouteObject } from 'react-router';
import { ErrorPage } from './error-page.tsx';
import { paths } from './paths.ts';
import { requirePerson, RootLayout } from './root-layout.tsx';

/** A screen whose module is fetched when it is first asked for; its failure leaves the rail standing. */
function screen(path: string, lazy: RouteObject['lazy']): RouteObject {
  return { path, lazy, ErrorBoundary: ErrorPage } as RouteObject;
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
      { path: paths.home.path, loader: () => redirect(paths.desk.href()) },
      screen(paths.desk.path, () => import('#src/routes/desk.tsx')),
      screen(paths.standards.path, () => import('#src/routes/standards.tsx')),
      screen(paths.newStandard.path, () => import('#src/routes/standard-new.tsx')),
      screen(paths.newSet.path, () => import('#src/routes/set-new.tsx')),
      screen(paths.standard.path, () => import('#src/routes/standard.tsx')),
      screen(paths.calibrations.path, () => import('#src/routes/calibrations.tsx')),
      screen(paths.calibrationDraft.path, () => import('#src/routes/calibration-draft.tsx')),
      screen(paths.calibration.path, () => import('#src/routes/calibration.tsx')),
      screen(paths.chains.path, () => import('#src/routes/chains.tsx')),
      screen(paths.chain.path, () => import('#src/routes/chain.tsx')),
      screen(paths.downstream.path, () => import('#src/routes/downstream.tsx')),
      screen(paths.network.path, () => import('#src/routes/network.tsx')),
      screen(paths.laboratory.path, () => import('#src/routes/laboratory.tsx')),
      screen('*', () => import('#src/routes/not-found.tsx')),
    ],
  },
];

export const router = createBrowserRouter(routes);

/** While the first module is on its way the page stays blank paper; a spinner would only flicker. */
function Nothing() {
  return null;
}
