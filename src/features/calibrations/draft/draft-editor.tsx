import { useMemo } from 'react';
import { FormProvider } from 'react-hook-form';
import type { DraftResponse, IssuedResponse } from '#shared/contracts/calibrations.ts';
import type { LaboratoryName } from '#shared/contracts/common.ts';
import type { z } from 'zod';
import { useZodForm } from '#src/lib/form.ts';
import { DraftForm, emptyDraft, newLine, type DraftValues } from './draft-values.ts';
import { DraftSheet } from './draft-sheet.tsx';
import { KnownContext } from './known.ts';
import { useKnownValues } from './known-values.ts';
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

/** A calibration transcribed from its certificate: the form, how it is kept, and what its entries name. */
export function DraftEditor(props: DraftEditorProps) {
  const { draft, laboratory, firstStandardId, onCreated, onIssued, onDiscarded } = props;
  const form = useZodForm(DraftForm, { defaultValues: valuesOf(draft, firstStandardId) });
  const saving = useAutosave(form, draft, laboratory.id, onCreated);
  const known = useKnownValues(draft);
  // What happens afterwards is the same for the whole life of the editor.
  const ends = useMemo(() => ({ onIssued, onDiscarded }), [onIssued, onDiscarded]);
  return (
    <KnownContext value={known}>
      <FormProvider {...form}>
        <DraftSheet {...{ draft, laboratory, saving, ends }} />
      </FormProvider>
    </KnownContext>
  );
}

function valuesOf(draft: DraftResponse | null, firstStandardId: string | undefined): DraftValues {
  if (draft) return { ...draft.content, version: draft.version };
  const empty = emptyDraft();
  return firstStandardId ? { ...empty, lines: [newLine(firstStandardId)] } : empty;
}
