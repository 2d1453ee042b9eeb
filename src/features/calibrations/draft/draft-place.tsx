import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { IssuedResponse } from '#shared/contracts/calibrations.ts';
import type { DraftResponse, ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { can } from '#src/lib/abilities.ts';
import { usePerson } from '#src/lib/session.ts';
import { laboratoriesQuery, useSetDraftState } from '../api.ts';
import { DraftEditor } from './draft-editor.tsx';

interface DraftPlaceProps {
  draft: DraftResponse | null;
  /** The laboratory a new draft is meant for. */
  laboratoryId?: string;
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

/** Decides what stands at a draft's address: the editor, or why there is nothing to edit. */
export function DraftPlace({ laboratoryId, ...rest }: DraftPlaceProps) {
  const { draft } = rest;
  const places = usePlaces();
  const [chosen, setChosen] = useState(laboratoryId ?? (places.length === 1 ? places[0]?.id : undefined));
  if (draft && (draft.state === 'issued' || draft.state === 'discarded'))
    return <ClosedDraft draft={draft} />;
  const laboratory = draft?.laboratory ?? places.find(({ id }) => id === chosen);
  if (laboratory) return <DraftEditor {...rest} laboratory={laboratory} />;
  return (
    <Page title="New calibration, from a certificate">
      {places.length === 0 ? (
        <EmptyState action={<LinkButton to={paths.calibrations.href()}>Go to the calibrations</LinkButton>}>
          A calibration is entered by a metrologist or the administrator of a laboratory. You have neither
          role today; the administrator of your laboratory gives it.
        </EmptyState>
      ) : (
        <SelectField
          label="Entered for"
          placeholder="choose the laboratory that holds the weights"
          choices={places.map(({ id, name }) => ({ value: id, label: name }))}
          className="max-w-96"
          value={chosen ?? ''}
          onChange={(event) => setChosen(event.target.value)}
        />
      )}
    </Page>
  );
}

function ClosedDraft({ draft }: { draft: DraftResponse }) {
  const reopen = useSetDraftState(draft.id);
  const isIssued = draft.state === 'issued';
  return (
    <Page
      title={draft.content.certificateNo || 'Draft'}
      sub={`Draft · ${draft.laboratory.name} · ${draft.state}`}
    >
      <EmptyState
        action={
          isIssued && draft.revisionId ? (
            <LinkButton to={paths.calibration.href(draft.revisionId)} weight="primary">
              Open the sheet
            </LinkButton>
          ) : (
            can(draft, 'draft:send') && (
              <Button
                isBusy={reopen.isPending}
                onClick={() => reopen.mutate({ version: draft.version, state: 'open' })}
              >
                Open it again
              </Button>
            )
          )
        }
      >
        {isIssued
          ? 'This draft was issued. What it says now stands in the register and does not change any more.'
          : 'This draft was discarded. Nothing of it is in the register.'}
      </EmptyState>
      {reopen.error && <ErrorNotice error={reopen.error} />}
    </Page>
  );
}

/** The laboratories for which this person may begin a draft: for the registrar all. The server decides again. */
function usePlaces(): { id: string; code: string; name: string }[] {
  const { roles } = usePerson();
  const isRegistrar = roles.some(({ role }) => role === 'registrar');
  const { data } = useQuery({ ...laboratoriesQuery, enabled: isRegistrar });
  if (isRegistrar) return data?.laboratories ?? [];
  const entering = roles.filter(({ role }) => role === 'metrologist' || role === 'laboratory administrator');
  const byId = new Map(
    entering.flatMap(({ laboratory }) => (laboratory ? [[laboratory.id, laboratory]] : [])),
  );
  return [...byId.values()];
}
