import { useQuery, useQueryClient } from '@tanstack/react-query';
import { lazy, Suspense, useState } from 'react';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { paths } from '#src/app/paths.ts';
import { Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { namedQuery, suppositionOf } from '../api.ts';
import { GROUPINGS } from '../groups.ts';
import type { WhatIfSearch } from '../what-if-search.ts';
import { BeyondField } from './beyond-field.tsx';
import { ChangeForm } from './change-form.tsx';
import { ChangeText } from './change-text.tsx';
import { NotAsked } from './not-asked.tsx';
import { RealActs, type ActDialogs } from './real-acts.tsx';
import { RecordedNotice } from './recorded-notice.tsx';
import { WhatIf } from './what-if.tsx';

/** The form and its library are fetched when there is a dry run to keep. */
const KeepDryRun = lazy(() =>
  import('./keep-dry-run.tsx').then((module) => ({ default: module.KeepDryRun })),
);

const MOST_CHANGES = 20;

interface WhatIfScreenProps {
  search: WhatIfSearch;
  onChange: (change: Partial<WhatIfSearch>) => void;
  dialogs: ActDialogs;
}

/** A dry run of several changes at once: what would follow for all that leans on what they touch. */
export function WhatIfScreen({ search, onChange, dialogs }: WhatIfScreenProps) {
  const { changes } = search;
  const [actSeq, setActSeq] = useState<number | null>(null);
  const [isRefused, setRefused] = useState(false);
  const queries = useQueryClient();
  const today = new Date().toISOString().slice(0, 10);
  const asked = suppositionOf(changes, search);
  const { day, known, by, threshold } = asked;
  const certificateOf = async (valueUid: string) => {
    const probe: WhatIfChange = { kind: 'shift', valueUid, shift: '0.000001' };
    const { subjects } = await queries.query({ ...namedQuery([probe]), staleTime: 10_000 });
    const [subject] = subjects;
    return subject?.about === 'value' ? subject.revisionId : null;
  };
  return (
    <Page
      title="What if it were otherwise?"
      sub="A dry run: it works out what would follow for all that leans on what is supposed, and changes nothing."
    >
      <Toolbar label="What is asked">
        <DayField label="In force on" value={search.day ?? today} onDay={(next) => onChange({ day: next })} />
        <DayField
          label="As known on"
          value={search.known ?? today}
          onDay={(next) => onChange({ known: next })}
        />
        <BeyondField
          value={search.beyond}
          onChange={(beyond) => onChange({ beyond })}
          onRefused={setRefused}
        />
        <Switch
          label="Grouped by"
          value={search.by}
          onChange={(next) => onChange({ by: next, group: undefined })}
          choices={GROUPINGS}
        />
        <LinkButton to={paths.dryRuns.href()}>Dry runs kept</LinkButton>
      </Toolbar>
      <TwoColumns
        sideWidth="narrow"
        side={
          <>
            <Supposed changes={changes} onChanges={(next) => onChange({ changes: next })} />
            {changes.length < MOST_CHANGES && (
              <Section title={changes.length === 0 ? 'A change to suppose' : 'A further change'}>
                <ChangeForm
                  onAdd={(change) => onChange({ changes: [...changes, change] })}
                  certificateOf={certificateOf}
                />
              </Section>
            )}
            {changes.length > 0 && !isRefused && (
              <>
                <RealActs asked={asked} dialogs={dialogs} onDone={setActSeq} />
                <Suspense fallback={null}>
                  <KeepDryRun question={{ changes, day, known, by, threshold }} />
                </Suspense>
              </>
            )}
          </>
        }
      >
        {actSeq !== null && <RecordedNotice actSeq={actSeq} />}
        {changes.length === 0 ? (
          <EmptyState>
            What several changes together would do stands here: a value that shifts, a larger u, a certificate
            withdrawn, a notice. Suppose the first one beside.
          </EmptyState>
        ) : isRefused ? (
          <NotAsked onFormer={() => setRefused(false)} />
        ) : (
          <WhatIf
            changes={changes}
            search={search}
            onOpen={(group) => onChange({ group })}
            onSort={(sort) => onChange({ sort })}
          />
        )}
      </TwoColumns>
    </Page>
  );
}

function Supposed({
  changes,
  onChanges,
}: {
  changes: WhatIfChange[];
  onChanges: (changes: WhatIfChange[]) => void;
}) {
  const named = useQuery({ ...namedQuery(changes), enabled: changes.length > 0 });
  if (changes.length === 0) return null;
  return (
    <Section title={changes.length === 1 ? 'One change' : `${changes.length} changes together`}>
      <ol className="border-t border-rule">
        {changes.map((change, at) => (
          <li key={at} className="flex items-baseline justify-between gap-3 border-b border-rule py-1">
            <span>
              <ChangeText change={change} subject={named.data?.subjects[at]} />
            </span>
            <Button
              weight="text"
              className="shrink-0"
              aria-label={`Take away change ${at + 1}`}
              onClick={() => onChanges(changes.filter((_, place) => place !== at))}
            >
              Take away
            </Button>
          </li>
        ))}
      </ol>
    </Section>
  );
}
