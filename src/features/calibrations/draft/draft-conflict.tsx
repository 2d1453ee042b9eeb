import { useState } from 'react';
import type { DraftContent } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { ConflictDialog } from './conflict-dialog.tsx';
import type { Saving } from './use-autosave.ts';

interface DraftConflictProps {
  saving: Saving;
  mine: () => DraftContent;
}

/** Someone else's version came first: both are laid side by side, at once and again on demand. */
export function DraftConflict({ saving, mine }: DraftConflictProps) {
  const { state, settle } = saving;
  const theirs = state.kind === 'conflict' ? state.theirs : null;
  const [putOff, setPutOff] = useState<number | null>(null);
  if (!theirs) return null;
  if (putOff === theirs.version) {
    return (
      <Notice
        role="status"
        tone="caution"
        title="Two versions of this draft"
        answers={
          <Button weight="text" onClick={() => setPutOff(null)}>
            Compare them
          </Button>
        }
      >
        Nothing more is saved on the server until you have chosen what stands. What you type is kept in this
        browser.
      </Notice>
    );
  }
  return (
    <ConflictDialog
      mine={mine()}
      theirs={theirs}
      base={saving.base()}
      onSettled={(content) => settle(theirs, { ...content, version: theirs.version })}
      onClose={() => setPutOff(theirs.version)}
    />
  );
}
