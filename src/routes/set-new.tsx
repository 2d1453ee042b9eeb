import { useNavigate } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { SetForm } from '#src/features/standards/components/set-form.tsx';
import { laboratoriesOf, usePerson } from '#src/lib/session.ts';

/** Registers a set with all its weights, and goes on to the list of them. */
export function Component() {
  const person = usePerson();
  const navigate = useNavigate();
  return (
    <Page
      title="Register a set"
      sub="Each weight gets its own number after the set's, in the order of the table."
    >
      <SetForm
        accountId={person.accountId}
        laboratories={laboratoriesOf(person).map(({ id, name }) => ({ value: id, label: name }))}
        onRegistered={(registryNo) =>
          void navigate(`${paths.standards.href()}?q=${encodeURIComponent(registryNo)}`)
        }
      />
    </Page>
  );
}
