import { useState } from 'react';
import type { AuditBody, AuditListResponse } from '#shared/contracts/audits.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { DateField } from '#src/components/ui/text-field.tsx';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { useAskAudit } from '../api.ts';
import { dayProblem } from '../day-problem.ts';

const NETWORK = 'network';

interface NewAuditProps {
  mayAudit: AuditListResponse['mayAudit'];
  onAsked: (auditId: string) => void;
}

/** Asks for an audit: of what, in force on which day, as known on which. */
export function NewAudit({ mayAudit, onAsked }: NewAuditProps) {
  const { laboratories, network } = mayAudit;
  const today = new Date().toISOString().slice(0, 10);
  const [of, setOf] = useState(network ? NETWORK : (laboratories[0]?.id ?? ''));
  const [days, setDays] = useState({ day: today, known: today });
  // A text that is no day is told once the audit is to begin, and then as it is typed.
  const [isRefused, setRefused] = useState(false);
  const ask = useAskAudit();
  const choices = [
    ...(network ? [{ value: NETWORK, label: 'The whole network' }] : []),
    ...laboratories.map(({ id, name }) => ({ value: id, label: name })),
  ];
  const begin = () => {
    const isEither = dayProblem(days.day) ?? dayProblem(days.known);
    setRefused(isEither !== undefined);
    if (isEither) return;
    const body: AuditBody =
      of === NETWORK ? { scope: 'network', ...days } : { scope: 'laboratory', laboratoryId: of, ...days };
    ask.mutate(body, { onSuccess: ({ id }) => onAsked(id) });
  };
  const told = ask.error instanceof ApiProblem ? ask.error.document.fields : undefined;
  const isAtField = Boolean(told?.day ?? told?.known);
  const dayField = (name: 'day' | 'known', label: string) => {
    const error = (isRefused ? dayProblem(days[name]) : undefined) ?? told?.[name]?.message;
    return (
      <DateField
        label={label}
        className={error ? 'w-72' : 'w-36'}
        value={days[name]}
        error={error}
        onChange={(event) => {
          setDays({ ...days, [name]: event.target.value.trim() });
          if (ask.error) ask.reset();
        }}
      />
    );
  };
  return (
    <Section title="New audit" note="every step of the chains judged once, and each chain as a whole">
      <Toolbar label="New audit">
        <SelectField
          label="Of"
          className="w-72"
          choices={choices}
          value={of}
          onChange={(event) => setOf(event.target.value)}
        />
        {dayField('day', 'In force on')}
        {dayField('known', 'As known on')}
        <Button weight="primary" isBusy={ask.isPending} onClick={begin}>
          Begin the audit
        </Button>
      </Toolbar>
      {ask.error && !isAtField && <ErrorNotice error={ask.error} />}
    </Section>
  );
}
