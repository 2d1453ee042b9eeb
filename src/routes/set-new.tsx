import { useState } from 'react';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { RegisterPlace } from '#src/features/standards/components/register-place.tsx';
import { RegisteredSet } from '#src/features/standards/components/registered-set.tsx';
import { SetForm } from '#src/features/standards/components/set-form.tsx';
import { usePerson } from '#src/lib/session.ts';

/** Registers a set with all its weights, and offers what usually comes next. */
export function Component() {
  const person = usePerson();
  const [registryNo, setRegistryNo] = useState<string | null>(null);
  if (registryNo !== null) {
    const asked = encodeURIComponent(registryNo);
    return (
      <Page title="Register a set">
        <RegisteredSet
          registryNo={registryNo}
          draftHref={`${paths.newDraft.href()}?set=${asked}`}
          listHref={`${paths.standards.href()}?q=${asked}`}
        />
      </Page>
    );
  }
  return (
    <Page
      title="Register a set"
      sub="Each weight gets its own number after the set's, in the order of the table."
    >
      <RegisterPlace>
        {(laboratories) => (
          <SetForm accountId={person.accountId} laboratories={laboratories} onRegistered={setRegistryNo} />
        )}
      </RegisterPlace>
    </Page>
  );
}
