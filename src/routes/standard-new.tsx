import { Link, useNavigate } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { RegisterPlace } from '#src/features/standards/components/register-place.tsx';
import { StandardForm } from '#src/features/standards/components/standard-form.tsx';
import { usePerson } from '#src/lib/session.ts';

/** Registers one weight, and goes on to its page. */
export function Component() {
  const person = usePerson();
  const navigate = useNavigate();
  return (
    <Page
      title="Register a weight"
      sub={
        <>
          A box of weights is quicker as{' '}
          <Link to={paths.newSet.href()} className="underline underline-offset-3">
            a whole set
          </Link>
          .
        </>
      }
    >
      <RegisterPlace>
        {(laboratories) => (
          <StandardForm
            accountId={person.accountId}
            laboratories={laboratories}
            onRegistered={(standardId) => void navigate(paths.standard.href(standardId))}
          />
        )}
      </RegisterPlace>
    </Page>
  );
}
