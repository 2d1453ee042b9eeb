import { useState } from 'react';
import { Stack, Toolbar } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import type { Choice } from '#src/components/ui/select-field.tsx';
import { showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { useRegisterSet } from '../api.ts';
import { isGrams, isHeavy } from '../nominal.ts';
import { seriesMembers, type SeriesMember } from '../series.ts';
import { isSameMembers, proposedName, SetEntries, toSetBody, type MemberEntry } from '../set-entries.ts';
import { HeavyCaution } from './heavy-caution.tsx';
import { MemberTable } from './member-table.tsx';
import { RestoredNotice } from './restored-notice.tsx';
import { RowProblems } from './row-problems.tsx';
import { FIRST_CHOICE, SeriesChooser } from './series-chooser.tsx';
import { SetIdentityFields } from './set-identity-fields.tsx';
import { SetMaterialFields } from './set-material-fields.tsx';

interface SetFormProps {
  /** Whose entries are kept in this browser. */
  accountId: string;
  /** The laboratories one may register for. */
  laboratories: readonly Choice[];
  onRegistered: (registryNo: string) => void;
}

/** A whole box at once: what its weights share is said once, the table names each. */
export function SetForm({ accountId, laboratories, onRegistered }: SetFormProps) {
  const [filled, setFilled] = useState(() => rowsOf(seriesMembers(FIRST_CHOICE, FIRST_CHOICE)));
  const form = useZodForm(SetEntries, {
    defaultValues: {
      laboratoryId: laboratories[0]?.value ?? '',
      registryNo: '',
      name: '',
      manufacturer: null,
      inServiceFrom: null,
      intervalMonths: null,
      class: null,
      material: 'stainless steel',
      density: null,
      below1g: null,
      members: rowsOf(seriesMembers(FIRST_CHOICE, FIRST_CHOICE)),
    },
  });
  const draft = useLocalDraft(accountId, 'set-new', form);
  const register = useRegisterSet();
  const [hidesFields, setHidesFields] = useState(true);
  const members = form.watch('members');
  const { errors, isSubmitted } = form.formState;

  /** The name follows class and nominals until somebody writes another. */
  function proposeName(weightClass: string | null, next: readonly MemberEntry[]): void {
    const { name, class: classBefore, members: before } = form.getValues();
    if (name !== '' && name !== proposedName(classBefore, before)) return;
    form.setValue('name', proposedName(weightClass, next), {
      shouldDirty: true,
      shouldValidate: isSubmitted,
    });
  }

  function fill(next: SeriesMember[]): void {
    const rows = rowsOf(next);
    proposeName(form.getValues('class'), rows);
    setFilled(rows);
    form.setValue('members', rowsOf(next), { shouldDirty: true, shouldValidate: isSubmitted });
  }

  const submit = form.handleSubmit((entries) =>
    register.mutateAsync(toSetBody(entries)).then(
      ({ registryNo }) => {
        draft.clear();
        onRegistered(registryNo);
      },
      (error: unknown) => {
        const hasField = (path: string) =>
          (path !== 'laboratoryId' || laboratories.length > 1) &&
          !/^members\.\d+\.(class|material|density)/.test(path);
        setHidesFields(showFieldProblems(error, form, hasField));
      },
    ),
  );

  const count = members.length === 1 ? '1 weight' : `${members.length} weights`;
  return (
    <form
      noValidate
      onSubmit={(event) => {
        register.reset();
        void submit(event);
      }}
      className="flex flex-col gap-6"
    >
      <RestoredNotice restoredFrom={draft.restoredFrom} onDiscard={draft.discard} />
      <SetIdentityFields
        form={form}
        laboratories={laboratories}
        onClass={(weightClass) => proposeName(weightClass, members)}
      />
      <SetMaterialFields form={form} />
      <Section title="Weights" note={count}>
        <Stack>
          <SeriesChooser isEdited={!isSameMembers(members, filled)} onFill={fill} />
          {isSubmitted && <RowProblems errors={errors} members={members} />}
          {members.some(({ nominal }) => isGrams(nominal) && isHeavy(nominal)) && <HeavyCaution />}
          <MemberTable form={form} />
        </Stack>
      </Section>
      {register.error && <ErrorNotice error={register.error} hidesFields={hidesFields} />}
      <Toolbar>
        <Button type="submit" weight="primary" isBusy={register.isPending}>
          Register {count}
        </Button>
      </Toolbar>
    </form>
  );
}

function rowsOf(members: readonly SeriesMember[]): MemberEntry[] {
  return members.map((member) => ({ ...member, serial: null }));
}
