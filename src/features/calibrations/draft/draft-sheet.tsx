import { useQuery } from '@tanstack/react-query';
import { useCallback, useDeferredValue, useMemo, useState } from 'react';
import { flushSync } from 'react-dom';
import { useFormContext, useWatch } from 'react-hook-form';
import type { DraftResponse } from '#shared/contracts/drafts.ts';
import type { LaboratoryName } from '#shared/contracts/common.ts';
import type { z } from 'zod';
import { TwoColumns } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { can } from '#src/lib/abilities.ts';
import { laboratoriesQuery } from '../api.ts';
import { CertificateFields } from './certificate-fields.tsx';
import { DraftAside, type DraftEnds } from './draft-aside.tsx';
import { DraftConflict } from './draft-conflict.tsx';
import { DraftContext } from './draft-context.ts';
import { contentOf, type DraftValues } from './draft-values.ts';
import { lineOf } from './field-words.ts';
import { focusField } from './focus-field.ts';
import { countOf } from './open-points.tsx';
import { currentPoints, isBlocking } from './points.ts';
import { RestoredNotice } from './restored-notice.tsx';
import { ResultsTable } from './results-table.tsx';
import { SaveRefusal, SaveStatus } from './save-status.tsx';
import type { Saving } from './use-autosave.ts';
import { useSameList } from './use-same-list.ts';

interface DraftSheetProps {
  draft: DraftResponse | null;
  laboratory: z.infer<typeof LaboratoryName>;
  saving: Saving;
  ends: DraftEnds;
}

/** The work at the left, what it means at the right. */
export function DraftSheet({ draft, laboratory, saving, ends }: DraftSheetProps) {
  const { control, getValues } = useFormContext<DraftValues>();
  const values = useWatch({ control }) as DraftValues;
  // The meaning may lag behind the keys by a moment; the keys may not.
  const settled = useDeferredValue(values);
  const points = useSameList(useMemo(() => currentPoints(draft, settled), [draft, settled]));
  const [open, setOpen] = useState<string | null>(null);
  const { data } = useQuery(laboratoriesQuery);
  const issuer = data?.laboratories.find(({ id }) => id === values.issuerId);
  const openPoints = points.filter(isBlocking).length;
  const questions = points.filter(({ kind }) => kind === 'question').length;
  const isLocked = draft !== null && !can(draft, 'draft:write');

  const goTo = useCallback(
    (path: string): void => {
      const at = lineOf(path);
      const key = at === null ? undefined : getValues('lines')[at]?.key;
      // The fields of a line that is closed are not there to be focused.
      if (key && !/\.(value|expandedU|k|standardId)$/.test(path)) flushSync(() => setOpen(key));
      focusField(path);
    },
    [getValues],
  );
  const context = useMemo(
    () => ({ draft, laboratoryId: laboratory.id, isLocked, points, goTo }),
    [draft, laboratory.id, isLocked, points, goTo],
  );

  return (
    <DraftContext value={context}>
      <Page
        title={values.certificateNo.trim() || 'New calibration, from a certificate'}
        sub={
          <span role="status">
            {draft?.state === 'sent to sign' ? 'Sent to sign' : 'Draft'} · {laboratory.name} ·{' '}
            <SaveStatus state={saving.state} updatedAt={draft?.updatedAt ?? null} />
            {draft && ` · ${countOf(openPoints - questions, questions).toLowerCase()}`}
          </span>
        }
      >
        <SaveRefusal state={saving.state} />
        <DraftConflict saving={saving} mine={() => contentOf(getValues())} />
        {saving.restoredFrom !== null && <RestoredNotice at={saving.restoredFrom} onSeen={saving.dismiss} />}
        <TwoColumns
          side={
            <DraftAside
              values={settled}
              issuerName={issuer?.name ?? ''}
              openPoints={openPoints}
              saveNow={saving.saveNow}
              ends={ends}
            />
          }
        >
          <fieldset disabled={isLocked} className="contents">
            <CertificateFields laboratoryId={laboratory.id} />
          </fieldset>
          <ResultsTable open={open} onOpen={setOpen} />
        </TwoColumns>
      </Page>
    </DraftContext>
  );
}
