import type { ReactNode } from 'react';
import type { LaboratoryResponse } from '#shared/contracts/network.ts';
import { Stack, Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { PeopleTable } from './people-table.tsx';
import { RecognitionFacts } from './recognition-facts.tsx';
import { ScopeTable } from './scope-table.tsx';

interface LaboratoryPageProps {
  sheet: LaboratoryResponse;
  /** Where one can go from here. */
  actions?: ReactNode;
}

/** One laboratory: how it is recognised, what it may do and how well, who works there. */
export function LaboratoryPage({ sheet, actions }: LaboratoryPageProps) {
  const { laboratory, recognitions, scope, people } = sheet;
  return (
    <Page
      title={laboratory.name}
      sub={`${laboratory.kind} · ${laboratory.place}, ${laboratory.country} · ${laboratory.code}`}
    >
      <Section
        title="Scope"
        note={
          <>
            best measurement capability as a function of the nominal{' '}
            <span className="font-serif italic">m</span>
          </>
        }
      >
        {scope.length > 0 ? (
          <ScopeTable lines={scope} />
        ) : (
          <EmptyState>
            What this laboratory may do, and how well at best, stands here once the registrar has entered its
            scope.
          </EmptyState>
        )}
      </Section>
      <TwoColumns
        sideWidth="wide"
        side={
          people &&
          people.length > 0 && (
            <Section title="People">
              <PeopleTable people={people} />
            </Section>
          )
        }
      >
        <Section title={recognitions.length > 1 ? 'Recognitions' : 'Recognition'}>
          <Stack>
            {recognitions.map((recognition) => (
              <RecognitionFacts key={`${recognition.kind} ${recognition.number}`} recognition={recognition} />
            ))}
            {recognitions.length === 0 && <p className="text-ink-2">None is in the register for today.</p>}
          </Stack>
        </Section>
        {actions && <Toolbar>{actions}</Toolbar>}
      </TwoColumns>
    </Page>
  );
}
