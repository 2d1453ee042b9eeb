import { useState } from 'react';
import { Link } from 'react-router';
import { z } from 'zod';
import { SaveDryRunBody, type DryRunQuestion } from '#shared/contracts/dry-runs.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { usePerson, type Person } from '#src/lib/session.ts';
import { useSaveDryRun } from '../api.ts';

const Entry = z.object({ name: SaveDryRunBody.shape.name, laboratoryId: SaveDryRunBody.shape.laboratoryId });

/** Beyond this many characters programs are known to cut an address; common practice, no source. */
const LONGEST_ADDRESS = 1_500;

/** Keeps the question of a dry run, to be opened again, shared by its address and compared. */
export function KeepDryRun({ question }: { question: z.input<typeof DryRunQuestion> }) {
  const choices = keepersOf(usePerson());
  const save = useSaveDryRun();
  const form = useZodForm(Entry, { defaultValues: { name: '', laboratoryId: choices[0]?.value ?? '' } });
  const [isShownAtFields, setShownAtFields] = useState(false);
  if (choices.length === 0) return null;
  const submit = form.handleSubmit((entry) =>
    save.mutate(
      { ...entry, question },
      {
        onSuccess: () => form.reset({ ...entry, name: '' }),
        onError: (error) => setShownAtFields(showFieldProblems(error, form, (path) => path in entry)),
      },
    ),
  );
  const { errors } = form.formState;
  return (
    <Section title="Keep this dry run">
      {location.href.length > LONGEST_ADDRESS && (
        <Notice title="Its address is long">
          Mail may cut an address of {location.href.length} characters. Keep the dry run and send the address
          that it then has, which is short.
        </Notice>
      )}
      <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-3">
        <TextField
          label="Name"
          hint="The question is kept. What it answers is worked out anew for whoever opens it, within their rights."
          maxLength={120}
          error={errorAt(errors, 'name')}
          {...form.register('name')}
        />
        {choices.length > 1 && (
          <SelectField label="For" choices={choices} {...form.register('laboratoryId')} />
        )}
        <div>
          <Button type="submit" isBusy={save.isPending}>
            Keep it
          </Button>
        </div>
      </form>
      {save.error && !isShownAtFields && <ErrorNotice error={save.error} />}
      {save.data && (
        <Notice role="status" tone="sound" title="Kept">
          <Link to={paths.dryRun.href(save.data.id)} className="text-ink underline underline-offset-3">
            {save.data.name}
          </Link>
          : its address can be sent to anyone who signs in here.
        </Notice>
      )}
    </Section>
  );
}

const KEEPERS = ['metrologist', 'signatory', 'laboratory administrator'];

/** The laboratories in whose name this person writes or signs. */
function keepersOf(person: Person): { value: string; label: string }[] {
  const byId = new Map(
    person.roles.flatMap(({ role, laboratory }) =>
      laboratory && KEEPERS.includes(role) ? [[laboratory.id, laboratory.name] as const] : [],
    ),
  );
  return [...byId].map(([value, label]) => ({ value, label }));
}
