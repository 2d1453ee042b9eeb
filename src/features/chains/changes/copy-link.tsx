import { useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';

/**
 * Copies the address of the answer with its days and rule set named, so that it is the same question tomorrow. Where
 * the browser lets nothing be copied, the address stands there to be copied by hand.
 */
export function CopyLink({ parameters }: { parameters: Record<string, string> }) {
  const [state, setState] = useState<'idle' | 'copied' | 'refused'>('idle');
  const address = `${location.origin}${location.pathname}?${new URLSearchParams(parameters).toString()}`;
  const copy = async () => {
    try {
      // Browsers lend the clipboard to secure origins only; elsewhere it is not there at all.
      await navigator.clipboard.writeText(address);
      setState('copied');
    } catch {
      setState('refused');
    }
  };
  return (
    <>
      <Button weight="text" onClick={() => void copy()}>
        Copy a link to this answer
      </Button>
      <span role="status" className="min-w-0 text-sm break-all text-ink-2">
        {state === 'copied' && 'Copied, with its days and rule set.'}
        {state === 'refused' && address}
      </span>
    </>
  );
}
