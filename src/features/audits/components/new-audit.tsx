import { useState } from 'react';
import type { AuditBody, AuditListResponse } from '#shared/contracts/audits.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { useAskAudit } from '../api.ts';

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
  const [day, setDay] = useState(today);
  const [known, setKnown] = useState(today);
  const ask = useAskAudit();
  const choices = [
    ...(network ? [{ value: NETWORK, label: 'The whole network' }] : []),
    ...laboratories.map(({ id, name }) => ({ value: id, label: name })),
  ];
  const begin = () => {
    const days = { day, known };
    const body: AuditBody =
      of === NETWORK ? { scope: 'network', ...days } : { scope: 'laboratory', laboratoryId: of, ...days };
    ask.mutate(body, { onSuccess: ({ id }) => onAsked(id) });
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
        <DayField label="In force on" value={day} onDay={(next) => setDay(next ?? today)} />
        <DayField label="As known on" value={known} onDay={(next) => setKnown(next ?? today)} />
        <Button weight="primary" isBusy={ask.isPending} onClick={begin}>
          Begin the audit
        </Button>
      </Toolbar>
      {ask.error && <ErrorNotice error={ask.error} />}
    </Section>
  );
}
