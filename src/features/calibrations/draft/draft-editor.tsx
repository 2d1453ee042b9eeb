import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { flushSync } from 'react-dom';
import { FormProvider, useWatch } from 'react-hook-form';
import type { DraftResponse, IssuedResponse } from '#shared/contracts/calibrations.ts';
import type { LaboratoryName } from '#shared/contracts/common.ts';
import type { z } from 'zod';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { TwoColumns } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { can } from '#src/lib/abilities.ts';
import { useZodForm } from '#src/lib/form.ts';
import { laboratoriesQuery } from '../api.ts';
import { CertificateFields } from './certificate-fields.tsx';
import { DraftAside } from './draft-aside.tsx';
import { DraftConflict } from './draft-conflict.tsx';
import { DraftContext } from './draft-context.ts';
import { contentOf, DraftForm, emptyDraft, newLine, type DraftValues } from './draft-values.ts';
import { focusField } from './focus-field.ts';
import { lineOf } from './field-words.ts';
import { KnownContext } from './known.ts';
import { useKnownValues } from './known-values.ts';
import { countOf } from './open-points.tsx';
import { currentPoints, isBlocking } from './points.ts';
import { ResultsTable } from './results-table.tsx';
import { SaveRefusal, SaveStatus } from './save-status.tsx';
import { useAutosave } from './use-autosave.ts';

interface DraftEditorProps {
  /** What the server has; null for a draft that its first change will create. */
  draft: DraftResponse | null;
  laboratory: z.infer<typeof LaboratoryName>;
  /** The weight a new draft begins with. */
  firstStandardId?: string;
  onCreated: (draft: DraftResponse) => void;
  onIssued: (issued: IssuedResponse) => void;
  onDiscarded: () => void;
}

/** A calibration transcribed from its certificate: the work at the left, what it means at the right. */
export function DraftEditor(props: DraftEditorProps) {
  const { draft, laboratory, firstStandardId, onCreated, onIssued, onDiscarded } = props;
  const form = useZodForm(DraftForm, { defaultValues: valuesOf(draft, firstStandardId) });
  const saving = useAutosave(form, draft, laboratory.id, onCreated);
  const known = useKnownValues(draft);
  const [open, setOpen] = useState<string | null>(null);
  const values = useWatch({ control: form.control }) as DraftValues;
  const { data } = useQuery(laboratoriesQuery);
  const issuer = data?.laboratories.find(({ id }) => id === values.issuerId);
  const points = currentPoints(draft, values);
  const openPoints = points.filter(isBlocking).length;
  const questions = points.filter(({ kind }) => kind === 'question').length;
  const isLocked = draft !== null && !can(draft, 'draft:write');

  function goTo(path: string): void {
    const at = lineOf(path);
    const key = at === null ? undefined : form.getValues('lines')[at]?.key;
    // The fields of a line that is closed are not there to be focused.
    if (key && !/\.(value|expandedU|k|standardId)$/.test(path)) flushSync(() => setOpen(key));
    focusField(path);
  }

  const title = values.certificateNo.trim() || 'New calibration, from a certificate';
  return (
    <KnownContext value={known}>
      <DraftContext value={{ draft, laboratoryId: laboratory.id, isLocked, points, goTo }}>
        <FormProvider {...form}>
          <Page
            title={title}
            sub={
              <span role="status">
                {draft?.state === 'sent to sign' ? 'Sent to sign' : 'Draft'} · {laboratory.name} ·{' '}
                <SaveStatus state={saving.state} updatedAt={draft?.updatedAt ?? null} />
                {draft && ` · ${countOf(openPoints - questions, questions).toLowerCase()}`}
              </span>
            }
          >
            <SaveRefusal state={saving.state} />
            <DraftConflict saving={saving} mine={() => contentOf(form.getValues())} />
            {saving.restoredFrom !== null && (
              <Notice
                role="status"
                tone="brass"
                title="Filled again from this browser"
                answers={
                  <Button weight="text" onClick={() => saving.dismiss()}>
                    Good
                  </Button>
                }
              >
                What was typed until {new Date(saving.restoredFrom).toTimeString().slice(0, 8)} had not
                reached the server. It is here again.
              </Notice>
            )}
            <TwoColumns
              side={
                <DraftAside
                  values={values}
                  issuerName={issuer?.name ?? ''}
                  {...{ openPoints, onIssued, onDiscarded }}
                  saveNow={saving.saveNow}
                />
              }
            >
              <fieldset disabled={isLocked} className="contents">
                <CertificateFields laboratoryId={laboratory.id} />
              </fieldset>
              <ResultsTable open={open} onOpen={setOpen} />
            </TwoColumns>
          </Page>
        </FormProvider>
      </DraftContext>
    </KnownContext>
  );
}

function valuesOf(draft: DraftResponse | null, firstStandardId: string | undefined): DraftValues {
  if (draft) return { ...draft.content, version: draft.version };
  const empty = emptyDraft();
  return firstStandardId ? { ...empty, lines: [newLine(firstStandardId)] } : empty;
}
