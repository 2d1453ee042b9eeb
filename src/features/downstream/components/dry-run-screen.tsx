import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { z } from 'zod';
import { DryRunNoteBody, type DryRunQuestion, type DryRunResponse } from '#shared/contracts/dry-runs.ts';
import { paths } from '#src/app/paths.ts';
import { Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { Textarea } from '#src/components/ui/text-field.tsx';
import { can } from '#src/lib/abilities.ts';
import { errorAt, useZodForm } from '#src/lib/form.ts';
import { namedQuery, useNoteDryRun } from '../api.ts';
import { GROUPINGS } from '../groups.ts';
import { askedOfRun, type RunView } from '../run-view.ts';
import { OTHERS_BEYOND } from '../search.ts';
import { ChangeText } from './change-text.tsx';
import { WhatIf } from './what-if.tsx';

interface DryRunScreenProps {
  run: DryRunResponse;
  view: RunView;
  onView: (change: Partial<RunView>) => void;
}

const REGISTERS = [
  { value: 'now', label: 'As the register stands now' },
  { value: 'then', label: 'As it was known then' },
] as const;

/** A kept dry run, answered anew for whoever opens it. */
export function DryRunScreen({ run, view, onView }: DryRunScreenProps) {
  const { question } = run;
  return (
    <Page
      title={run.name}
      sub={
        <>
          Kept for {run.laboratory.name} by {run.savedBy}, <DateText value={run.savedAt} />, at act{' '}
          {run.actSeq}
        </>
      }
    >
      {run.isDiscarded && (
        <Notice tone="caution" title="Discarded">
          It is no longer listed; its address still opens it.
        </Notice>
      )}
      {run.actsSince > 0 && (
        <Notice
          title={`The register has moved on: ${run.actsSince} ${run.actsSince === 1 ? 'act' : 'acts'} since`}
        >
          Asked as it was known then, it is answered by what was recorded up to the end of {run.savedOn}.
        </Notice>
      )}
      <Toolbar label="What is asked">
        <Switch label="Asked" value={view.as} onChange={(as) => onView({ as })} choices={REGISTERS} />
        <Switch
          label="Grouped by"
          value={view.by ?? question?.by ?? 'laboratory'}
          onChange={(by) => onView({ by, group: undefined })}
          choices={GROUPINGS}
        />
      </Toolbar>
      <TwoColumns
        sideWidth="narrow"
        side={
          <>
            {question && <Asked question={question} />}
            <Remarks run={run} />
          </>
        }
      >
        {question ? (
          <WhatIf
            changes={question.changes}
            search={askedOfRun(run.savedOn, question, view)}
            onOpen={(group) => onView({ group })}
            onSort={(sort) => onView({ sort })}
          />
        ) : (
          <EmptyState>
            What this dry run is about is not yours to see: it names a value that neither your laboratory
            holds or issued, nor anything of yours leans on.
          </EmptyState>
        )}
      </TwoColumns>
    </Page>
  );
}

function Asked({ question }: { question: DryRunQuestion }) {
  const named = useQuery(namedQuery(question.changes));
  const { day, known, by, threshold } = question;
  const beyond = String(Number((threshold * 100).toPrecision(12)));
  const days = { ...(day && { day }), ...(known && { known }) };
  return (
    <Section title="Supposed">
      <ol className="border-t border-rule">
        {question.changes.map((change, at) => (
          <li key={at} className="border-b border-rule py-1">
            <ChangeText change={change} subject={named.data?.subjects[at]} />
          </li>
        ))}
      </ol>
      <p className="text-ink-2">
        Material beyond {beyond} % of U
        {beyond !== String(OTHERS_BEYOND) && ` (for weights of others: beyond ${OTHERS_BEYOND} %)`}
        {day && `; in force on ${day}`}
        {known && `, as known on ${known}`}.
      </p>
      <div>
        <LinkButton
          to={paths.whatIf.href({
            changes: JSON.stringify(question.changes),
            ...(beyond === '10' ? {} : { beyond }),
            ...(by === 'laboratory' ? {} : { by }),
            ...days,
          })}
        >
          Ask it otherwise
        </LinkButton>
      </div>
    </Section>
  );
}

const Entry = z.object({ text: DryRunNoteBody.shape.text });

function Remarks({ run }: { run: DryRunResponse }) {
  const note = useNoteDryRun(run.id);
  const form = useZodForm(Entry, { defaultValues: { text: '' } });
  const [kind, setKind] = useState<'note' | 'discard'>('note');
  const mayNote = can(run, 'dry-run:note') && !run.isDiscarded;
  if (!mayNote && run.notes.length === 0) return null;
  const send = (next: typeof kind) => {
    setKind(next);
    void form.handleSubmit(({ text }) =>
      note.mutate({ kind: next, text }, { onSuccess: () => form.reset({ text: '' }) }),
    )();
  };
  return (
    <Section title="Remarks">
      {run.notes.length > 0 && (
        <ul className="border-t border-rule">
          {run.notes.map(({ kind: kindOf, text, by, at }) => (
            <li key={at} className="border-b border-rule py-1">
              {kindOf === 'discard' && <span className="font-medium">Discarded: </span>}
              {text}
              <span className="block text-sm text-ink-2">
                {by}, <DateText value={at} />
              </span>
            </li>
          ))}
        </ul>
      )}
      {mayNote && (
        <form noValidate onSubmit={(event) => event.preventDefault()} className="flex flex-col gap-3">
          <Textarea
            label="A remark, or why it is discarded"
            maxLength={600}
            error={errorAt(form.formState.errors, 'text')}
            {...form.register('text')}
          />
          <div className="flex flex-wrap gap-2">
            <Button isBusy={note.isPending && kind === 'note'} onClick={() => send('note')}>
              Add the remark
            </Button>
            <Button
              weight="destructive"
              isBusy={note.isPending && kind === 'discard'}
              onClick={() => send('discard')}
            >
              Discard the dry run
            </Button>
          </div>
          {note.error && <ErrorNotice error={note.error} />}
        </form>
      )}
    </Section>
  );
}
