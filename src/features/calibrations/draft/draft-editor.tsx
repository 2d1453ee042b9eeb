import { useMemo } from 'react';
import { FormProvider } from 'react-hook-form';
import type { IssuedResponse } from '#shared/contracts/calibrations.ts';
import type { DraftResponse, ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { LaboratoryName } from '#shared/contracts/common.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import type { z } from 'zod';
import { useZodForm } from '#src/lib/form.ts';
import { DraftForm, emptyDraft, newLine, type DraftValues } from './draft-values.ts';
import { DraftSheet } from './draft-sheet.tsx';
import { KnownContext } from './known.ts';
import { useKnownValues } from './known-values.ts';
import { useAutosave } from './use-autosave.ts';

const NONE: readonly StandardRow[] = [];

interface DraftEditorProps {
  /** What the server has; null for a draft that its first change will create. */
  draft: DraftResponse | null;
  laboratory: z.infer<typeof LaboratoryName>;
  /** The weight a new draft begins with. */
  firstStandardId?: string;
  /** The weights of a set that a new draft begins with, a line each. */
  firstStandards?: readonly StandardRow[];
  /** What the first weight leans on. */
  firstReference?: ReferenceChoice | null;
  /** The laboratory whose certificate a new draft is expected to transcribe. */
  firstIssuerId?: string | undefined;
  onCreated: (draft: DraftResponse) => void;
  onIssued: (issued: IssuedResponse) => void;
  onDiscarded: () => void;
}

/** A calibration transcribed from its certificate: the form, how it is kept, and what its entries name. */
export function DraftEditor(props: DraftEditorProps) {
  const {
    draft,
    laboratory,
    firstStandardId,
    firstStandards = NONE,
    firstReference = null,
    firstIssuerId,
    onCreated,
    onIssued,
    onDiscarded,
  } = props;
  const firstIds = firstStandardId ? [firstStandardId] : firstStandards.map(({ id }) => id);
  const form = useZodForm(DraftForm, {
    defaultValues: valuesOf(draft, firstIds, firstReference, firstIssuerId),
  });
  const saving = useAutosave(form, draft, laboratory.id, onCreated);
  const known = useKnownValues(draft, firstStandards, firstReference);
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

function valuesOf(
  draft: DraftResponse | null,
  firstIds: readonly string[],
  reference: ReferenceChoice | null,
  issuerId: string | null = null,
): DraftValues {
  if (draft) return { ...draft.content, version: draft.version };
  const lines = firstIds.map((id) => newLine(id));
  const head = { ...emptyDraft(), issuerId };
  if (!reference) return { ...head, lines };
  const { quantity, valueUid } = reference;
  const leaning = { quantity, references: [{ valueUid, sensitivity: '', usedAs: 'certificate' as const }] };
  return { ...head, lines: lines.map((line) => ({ ...line, ...leaning })) };
}
