import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { IssuedResponse } from '#shared/contracts/calibrations.ts';
import type { DraftResponse } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { can } from '#src/lib/abilities.ts';
import { draftQuery, useSetDraftState } from '../api.ts';
import { IssueDialog } from './issue-dialog.tsx';

interface DraftActionsProps {
  draft: DraftResponse;
  issuerName: string;
  /** Points and questions that keep it from being issued. */
  openPoints: number;
  /** Saves at once; says whether the server now has every entry. */
  saveNow: () => Promise<boolean>;
  onIssued: (issued: IssuedResponse) => void;
  onDiscarded: () => void;
}

/** What can be done with the draft as a whole. Before each act the last keystrokes are saved. */
export function DraftActions(props: DraftActionsProps) {
  const { draft, issuerName, openPoints, saveNow, onIssued, onDiscarded } = props;
  const [asks, setAsks] = useState<'issue' | 'discard' | null>(null);
  const [isSaving, setSaving] = useState(false);
  const queries = useQueryClient();
  const state = useSetDraftState(draft.id);
  const maySend = can(draft, 'draft:send');
  const isSent = draft.state === 'sent to sign';
  const isComplete = openPoints === 0;

  const isBusy = isSaving || state.isPending;

  /** Saves, then acts; a second click meanwhile does nothing, and what an earlier try was refused for is gone. */
  const ifSaved = (act: () => void) => () => {
    if (isBusy) return;
    state.reset();
    setSaving(true);
    void saveNow()
      .then((isSaved) => isSaved && act())
      .finally(() => setSaving(false));
  };
  // The save just made may have given a newer version than the one drawn here.
  const version = (): number => queries.getQueryData(draftQuery(draft.id).queryKey)?.version ?? draft.version;
  const setState = (to: 'open' | 'sent to sign' | 'discarded', onSuccess?: () => void): void =>
    state.mutate({ version: version(), state: to }, { onSuccess });

  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-baseline gap-2">
        {can(draft, 'calibration:issue') && (
          <Button weight="primary" disabled={!isComplete || isBusy} onClick={ifSaved(() => setAsks('issue'))}>
            Issue
          </Button>
        )}
        {maySend && !isSent && (
          <Button
            weight={can(draft, 'calibration:issue') ? 'plain' : 'primary'}
            disabled={!isComplete || isBusy}
            isBusy={isBusy}
            onClick={ifSaved(() => setState('sent to sign'))}
          >
            Send to sign
          </Button>
        )}
        {maySend && isSent && (
          <Button
            isBusy={isBusy}
            // The second half of a double click on "Send to sign" lands here.
            onClick={({ detail }) => detail < 2 && setState('open')}
          >
            {can(draft, 'calibration:issue') ? 'Send back' : 'Take it back'}
          </Button>
        )}
        {maySend && (
          <Button weight="text" onClick={() => setAsks('discard')}>
            Discard the draft
          </Button>
        )}
      </div>
      {!isComplete && (
        <p className="text-sm text-ink-3">
          A draft can be left like this; it is issued once every point and question is settled.
        </p>
      )}
      {isSent && <p className="text-sm text-ink-2">It waits for a signatory. A change opens it again.</p>}
      {state.error && <ErrorNotice error={state.error} />}
      {asks === 'issue' && <IssueDialog {...{ draft, issuerName, onIssued }} onClose={() => setAsks(null)} />}
      {asks === 'discard' && (
        <Dialog
          title="Discard this draft"
          onClose={() => setAsks(null)}
          actions={
            <>
              <Button
                weight="destructive"
                isBusy={state.isPending}
                onClick={() => setState('discarded', onDiscarded)}
              >
                Discard the draft
              </Button>
              <Button onClick={() => setAsks(null)}>Keep it</Button>
            </>
          }
        >
          <p>
            It leaves the lists and cannot be issued. Nothing of it was in the register. It can be opened
            again at this address.
          </p>
        </Dialog>
      )}
    </div>
  );
}
