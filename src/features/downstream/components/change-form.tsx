import { useState, type FormEvent } from 'react';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { findValues } from '#src/lib/find-values.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { laboratoriesOf, usePerson } from '#src/lib/session.ts';
import { amountProblem, readAmount } from '../read-amount.ts';
import { AmountField } from './amount-field.tsx';
import { NoticeForm } from './notice-form.tsx';

type Kind = WhatIfChange['kind'];

const KINDS: { value: Kind; label: string }[] = [
  { value: 'shift', label: 'A value shifts' },
  { value: 'raise', label: 'The u of a value is larger' },
  { value: 'withdraw', label: 'A certificate is withdrawn' },
  { value: 'notice', label: 'A notice is published' },
];

interface ChangeFormProps {
  onAdd: (change: WhatIfChange) => void;
  /** Finds the certificate of a value; null where it is not this person's to open. */
  certificateOf: (valueUid: string) => Promise<string | null>;
}

/** Adds one change to a dry run. */
export function ChangeForm({ onAdd, certificateOf }: ChangeFormProps) {
  const institutes = laboratoriesOf(usePerson()).filter((laboratory) => laboratory.isNationalInstitute);
  const [kind, setKind] = useState<Kind>('shift');
  return (
    <div className="flex flex-col gap-3">
      <SelectField
        label="Suppose"
        value={kind}
        onChange={(event) => setKind(event.target.value as Kind)}
        choices={KINDS.filter(({ value }) => value !== 'notice' || institutes.length > 0)}
      />
      {kind === 'notice' ? (
        <NoticeForm institutes={institutes} onAdd={onAdd} />
      ) : (
        <ValueChangeForm key={kind} kind={kind} {...{ onAdd, certificateOf }} />
      )}
    </div>
  );
}

function ValueChangeForm({
  kind,
  onAdd,
  certificateOf,
}: ChangeFormProps & { kind: Exclude<Kind, 'notice'> }) {
  const { decimalMark } = usePreferences();
  const [value, setValue] = useState<ComboboxOption | null>(null);
  const [amount, setAmount] = useState('');
  const [isJudged, setJudged] = useState(false);
  const [refusal, setRefusal] = useState<string>();
  const [error, setError] = useState<Error | null>(null);
  const [isBusy, setBusy] = useState(false);
  const read = readAmount(amount, decimalMark);
  const problem = kind === 'withdraw' ? undefined : amountProblem(read, kind);
  const add = (change: WhatIfChange) => {
    onAdd(change);
    setValue(null);
    setAmount('');
    setJudged(false);
  };
  const withdraw = async (valueUid: string) => {
    setBusy(true);
    setError(null);
    try {
      const revisionId = await certificateOf(valueUid);
      if (revisionId === null) setRefusal('Its certificate is not yours to open.');
      else add({ kind: 'withdraw', revisionId });
    } catch (failure) {
      setError(failure as Error);
    } finally {
      setBusy(false);
    }
  };
  const submit = (event: FormEvent) => {
    event.preventDefault();
    setJudged(true);
    setRefusal(undefined);
    if (!value || problem) return;
    if (kind === 'withdraw') void withdraw(value.id);
    else if (read.kind === 'amount' && kind === 'shift') add({ kind, valueUid: value.id, shift: read.grams });
    else if (read.kind === 'amount' && kind === 'raise')
      add({ kind, valueUid: value.id, addedU: Number(read.grams) });
  };
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-3">
      <Combobox
        label={kind === 'withdraw' ? 'A weight on the certificate' : 'Value'}
        hint="By registry number"
        value={value}
        onChange={setValue}
        search={findValues}
        error={refusal ?? (isJudged && !value ? 'Choose a value from the list.' : undefined)}
      />
      {kind !== 'withdraw' && (
        <AmountField
          suppose={kind}
          value={amount}
          onChange={setAmount}
          onLeft={() => setJudged(amount.trim() !== '' && value !== null)}
          read={read}
          problem={isJudged ? problem : undefined}
        />
      )}
      {error && <ErrorNotice error={error} />}
      <div>
        <Button type="submit" isBusy={isBusy}>
          Add this change
        </Button>
      </div>
    </form>
  );
}
