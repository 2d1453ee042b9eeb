import { useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { saveFile } from '#src/lib/save-file.ts';
import type { ChainQuestion } from '../question.ts';
import { CHAIN_DOCUMENTS, fetchDocument, type ChainDocument } from './documents.ts';

interface TakeAlongProps {
  valueUid: string;
  question: ChainQuestion;
}

type Stand =
  { is: 'making' | 'saved'; id: string; name?: string } | { is: 'failed'; error: unknown; id: string };

/** What can be taken along of the chain, as it is asked now. */
export function TakeAlong({ valueUid, question }: TakeAlongProps) {
  const [stand, setStand] = useState<Stand | null>(null);
  const take = async (wanted: ChainDocument) => {
    setStand({ is: 'making', id: wanted.id });
    try {
      const isDark = document.documentElement.dataset['theme'] === 'lamp';
      const { name, blob } = await fetchDocument(wanted, valueUid, question, isDark);
      saveFile(name, blob);
      setStand({ is: 'saved', id: wanted.id, name });
    } catch (error) {
      setStand({ is: 'failed', id: wanted.id, error });
    }
  };
  const failed = stand?.is === 'failed' ? CHAIN_DOCUMENTS.find(({ id }) => id === stand.id) : undefined;
  return (
    <details className="border-y border-rule print:hidden">
      <summary className="min-h-8 cursor-pointer py-1.5 font-serif text-lg pointer-coarse:min-h-11">
        Take along
      </summary>
      <ul className="pb-2">
        {CHAIN_DOCUMENTS.map((one) => (
          <li key={one.id} className="flex flex-wrap items-baseline gap-x-3 py-1">
            <Button
              weight="text"
              isBusy={stand?.is === 'making' && stand.id === one.id}
              onClick={() => void take(one)}
            >
              {one.label}
            </Button>
            <span className="text-sm text-ink-2">{one.note}</span>
          </li>
        ))}
        <li className="flex flex-wrap items-baseline gap-x-3 py-1">
          <Button weight="text" onClick={() => window.print()}>
            Print this screen
          </Button>
          <span className="text-sm text-ink-2">drawing and table, black on white</span>
        </li>
      </ul>
      <p role="status" className="pb-2 text-sm text-ink-2 empty:hidden">
        {stand?.is === 'saved' && (
          <>
            Saved as <span className="font-mono wrap-anywhere">{stand.name}</span>
          </>
        )}
      </p>
      {stand?.is === 'failed' && (
        <ErrorNotice error={stand.error} {...(failed && { onRetry: () => void take(failed) })} />
      )}
    </details>
  );
}
