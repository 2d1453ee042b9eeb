import { useSuspenseQuery } from '@tanstack/react-query';
import { redirect, useNavigate, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { sessionQuery } from '#src/features/identity/api.ts';
import { SignInForm } from '#src/features/identity/components/sign-in-form.tsx';
import { returnPath } from '#src/features/identity/return-path.ts';

/** Whoever is signed in already goes straight on. */
export async function loader({ request }: LoaderFunctionArgs): Promise<null> {
  const { person } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  if (person) throw redirect(returnPath(new URL(request.url).searchParams.get('from'), paths.desk.href()));
  return null;
}

/** The door: the product's name, two fields, and what the product does not decide. */
export function Component() {
  const { data } = useSuspenseQuery(sessionQuery);
  const [search] = useSearchParams();
  const navigate = useNavigate();
  const goOn = (): void =>
    void navigate(returnPath(search.get('from'), paths.desk.href()), { replace: true });
  return (
    <main className="mx-auto flex min-h-dvh w-full max-w-88 flex-col justify-center gap-6 px-4 py-10">
      <title>Sign in · Exagium</title>
      <header className="border-b border-rule pb-3.5">
        <h1 className="font-serif text-2xl">Exagium</h1>
        <p className="mt-1 text-ink-2">
          The shared register of mass standards, calibrations and their chains to the SI.
        </p>
      </header>
      <SignInForm onSignedIn={goOn} />
      <p className="text-sm text-ink-3">
        {data.isDemo && 'This register holds the demo network. '}
        The register shows what was measured and how it connects. It decides nothing in law: legal metrology,
        accreditation and local safety codes stand above it.
      </p>
    </main>
  );
}
