import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import type { SaveState } from './autosave.ts';

/** One phrase in the head of the screen: whether the server has what was typed. */
export function SaveStatus({ state, updatedAt }: { state: SaveState; updatedAt: string | null }) {
  switch (state.kind) {
    case 'untouched':
      return updatedAt ? <>saved {clockTime(Date.parse(updatedAt), true)}</> : <>nothing typed yet</>;
    case 'typing':
      return <>kept in this browser, saving…</>;
    case 'saved':
      return <>saved {clockTime(state.at)}</>;
    case 'unreachable':
      return (
        <span className="text-caution">
          not saved: the server {state.isAnswered ? 'failed' : 'does not answer'}; kept in this browser
        </span>
      );
    case 'refused':
      return <span className="text-broken">not saved: the server refused it; kept in this browser</span>;
    case 'conflict':
      return <span className="text-caution">not saved: a newer version was saved elsewhere</span>;
  }
}

/** Why the server refused to save, with what would mend it. */
export function SaveRefusal({ state }: { state: SaveState }) {
  return state.kind === 'refused' ? <ErrorNotice error={state.error} /> : null;
}

/** The time of day here, and the day before it where it was not today. */
function clockTime(milliseconds: number, isFromServer = false): string {
  const when = new Date(milliseconds);
  const time = [when.getHours(), when.getMinutes(), when.getSeconds()].map((part) =>
    String(part).padStart(2, '0'),
  );
  const isToday = when.toDateString() === new Date().toDateString();
  const day = [when.getFullYear(), when.getMonth() + 1, when.getDate()].map((part) =>
    String(part).padStart(2, '0'),
  );
  return isFromServer && !isToday ? `${day.join('-')} ${time.join(':')}` : time.join(':');
}
