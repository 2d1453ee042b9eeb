import { useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import type { Person } from '#src/lib/session.ts';
import { useSignOut } from '../api.ts';
import { PreferencesForm } from './preferences-form.tsx';

interface AccountMenuProps {
  person: Person;
  onSignedOut: () => void;
}

/** The foot of the rail: who is at work here, how they like to read, and the way out. */
export function AccountMenu({ person, onSignedOut }: AccountMenuProps) {
  const [isOpen, setOpen] = useState(false);
  const signOut = useSignOut();
  return (
    <div className="flex flex-col gap-1 border-t border-rule pt-3 text-sm">
      <p className="break-words">{person.name}</p>
      <p className="text-ink-3">{roleLine(person)}</p>
      <div className="flex flex-wrap gap-x-3">
        <Button weight="text" aria-haspopup="dialog" onClick={() => setOpen(true)}>
          Preferences
        </Button>
        <Button
          weight="text"
          isBusy={signOut.isPending}
          onClick={() => signOut.mutate(undefined, { onSuccess: onSignedOut })}
        >
          Sign out
        </Button>
      </div>
      {signOut.error && <ErrorNotice error={signOut.error} />}
      {isOpen && (
        <Dialog
          title="Preferences"
          onClose={() => setOpen(false)}
          actions={<Button onClick={() => setOpen(false)}>Done</Button>}
        >
          <PreferencesForm />
        </Dialog>
      )}
    </div>
  );
}

/** The roles in the first laboratory and its code; a person without any is known by the e-mail. */
function roleLine(person: Person): string {
  const first = person.roles[0];
  if (!first) return person.email;
  const here = person.roles.filter(({ laboratory }) => laboratory?.id === first.laboratory?.id);
  const roles = here.map(({ role }) => role).join(', ');
  return first.laboratory ? `${roles} · ${first.laboratory.code}` : roles;
}
