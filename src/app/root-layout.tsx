import { useSuspenseQuery } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import {
  Navigate,
  Outlet,
  redirect,
  ScrollRestoration,
  useLocation,
  useNavigate,
  useNavigation,
  type LoaderFunctionArgs,
} from 'react-router';
import { AppShell } from '#src/components/layout/app-shell.tsx';
import { FindBox } from '#src/features/desk/components/find-box.tsx';
import { sessionQuery } from '#src/features/identity/api.ts';
import { AccountMenu } from '#src/features/identity/components/account-menu.tsx';
import { ConnectionNotice } from '#src/lib/connection.tsx';
import { PersonContext } from '#src/lib/session.ts';
import { foundHref } from './found-href.ts';
import { paths, SAME_SCREEN, SECTIONS } from './paths.ts';
import { queryClient } from './query-client.ts';

/** Lets signed-in people past; everybody else signs in first and comes back to where they wanted to go. */
export async function requirePerson({ request }: LoaderFunctionArgs): Promise<null> {
  const { person } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  const { pathname, search } = new URL(request.url);
  if (!person) throw redirect(paths.signIn.href(pathname + search));
  return null;
}

/** The rail, the notices and the screen. It watches the session: once that has ended, it asks to sign in. */
export function RootLayout() {
  const { data } = useSuspenseQuery(sessionQuery);
  const location = useLocation();
  const navigate = useNavigate();
  const isMoving = useNavigation().state === 'loading';
  useFocusOnScreen(location.pathname, location.state === SAME_SCREEN);
  if (!data.person) return <Navigate to={paths.signIn.href(location.pathname + location.search)} replace />;
  return (
    <PersonContext value={data.person}>
      <AppShell
        sections={SECTIONS}
        search={<FindBox onFound={(found) => void navigate(foundHref(found))} />}
        foot={
          <AccountMenu person={data.person} onSignedOut={() => window.location.assign(paths.signIn.href())} />
        }
        notice={<ConnectionNotice />}
      >
        <div aria-busy={isMoving}>
          <Outlet />
        </div>
      </AppShell>
      <ScrollRestoration />
    </PersonContext>
  );
}

/** After a move to another screen the keyboard starts at that screen, not in the rail of the last one. */
function useFocusOnScreen(pathname: string, isSameScreen: boolean): void {
  const shown = useRef(pathname);
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    if (isSameScreen) return;
    document.getElementById('screen')?.focus({ preventScroll: true });
  }, [pathname, isSameScreen]);
}
