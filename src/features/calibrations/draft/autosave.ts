import type { DraftContent, DraftResponse } from '#shared/contracts/drafts.ts';
import { DraftResponse as DraftResponseSchema } from '#shared/contracts/drafts.ts';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { isSameContent } from './draft-values.ts';

const PAUSE_MS = 800;
const AGAIN_MS = 5000;

/** How the entries stand towards the server. */
export type SaveState =
  | { kind: 'untouched' }
  | { kind: 'typing' }
  | { kind: 'saved'; at: number }
  | { kind: 'unreachable'; isAnswered: boolean }
  | { kind: 'refused'; error: ApiProblem }
  | { kind: 'conflict'; theirs: DraftResponse };

interface Autosaved {
  /** The entries as they are now. */
  read: () => DraftContent;
  /** What the server has; null when it has nothing yet. */
  saved: DraftContent | null;
  /** Sends the entries. @throws ApiProblem */
  send: (content: DraftContent) => Promise<DraftResponse>;
  /** The server has these entries, as this version. */
  onSaved: (draft: DraftResponse) => void;
  onState: (state: SaveState) => void;
}

/** Saves while somebody types; made once for each open draft. */
export interface Autosave {
  /** Something may have changed: saves when the typing pauses. */
  changed: () => void;
  /** Saves at once. @returns whether the server now has every entry */
  now: () => Promise<boolean>;
  /** Goes on after a conflict was settled, from what the server has now. */
  settle: (saved: DraftContent) => void;
  /** Whether the server has every entry. */
  isClean: () => boolean;
  /** What the server had when this typing began; null when it had nothing. */
  acknowledged: () => DraftContent | null;
  /** The draft is left: what is not saved is sent, without waiting. */
  stop: () => void;
  /** Another saver takes over: nothing more is sent from here. */
  drop: () => void;
}

/**
 * One request at a time, 800 ms after the last keystroke. Without an answer it tries again every few seconds; a
 * conflict stops it until a person has chosen; any other refusal waits for the next keystroke.
 */
export function makeAutosave({ read, saved, send, onSaved, onState }: Autosaved): Autosave {
  let acknowledged = saved;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let running: Promise<void> | null = null;
  let isHalted = false;
  let atRest: SaveState = { kind: 'untouched' };

  const isClean = (): boolean => acknowledged !== null && isSameContent(read(), acknowledged);

  function later(milliseconds: number): void {
    clearTimeout(timer);
    timer = setTimeout(() => void run(), milliseconds);
  }

  function run(): Promise<void> {
    clearTimeout(timer);
    if (isHalted || isClean()) return running ?? Promise.resolve();
    running ??= attempt().finally(() => {
      running = null;
    });
    return running;
  }

  async function attempt(): Promise<void> {
    const content = structuredClone(read());
    try {
      await sendOnce(content);
      acknowledged = content;
      atRest = { kind: 'saved', at: Date.now() };
      onState(atRest);
      if (!isClean()) later(PAUSE_MS);
    } catch (error) {
      const state = stateAfter(error);
      isHalted = state.kind === 'conflict';
      onState(state);
      if (state.kind === 'unreachable') later(AGAIN_MS);
    }
  }

  /** A save whose answer was lost is met again as a conflict with itself. */
  async function sendOnce(content: DraftContent): Promise<void> {
    try {
      onSaved(await send(content));
    } catch (error) {
      const state = stateAfter(error);
      if (state.kind !== 'conflict' || !isSameContent(state.theirs.content, content)) throw error;
      onSaved(state.theirs);
    }
  }

  return {
    isClean,
    acknowledged: () => acknowledged,
    changed: () => {
      if (isHalted) return;
      if (isClean()) {
        clearTimeout(timer);
        onState(atRest);
        return;
      }
      onState({ kind: 'typing' });
      later(PAUSE_MS);
    },
    now: async () => {
      await running;
      await run();
      return isClean();
    },
    settle: (content) => {
      acknowledged = content;
      isHalted = false;
      atRest = { kind: 'saved', at: Date.now() };
      onState(atRest);
    },
    stop: () => {
      void run();
      clearTimeout(timer);
    },
    drop: () => clearTimeout(timer),
  };
}

function stateAfter(error: unknown): SaveState {
  if (!(error instanceof ApiProblem)) throw error;
  if (error.status === 0 || error.status >= 500 || error.status === 429) {
    return { kind: 'unreachable', isAnswered: error.status !== 0 };
  }
  const theirs = DraftResponseSchema.safeParse(error.document['current']);
  if (error.id === 'stale' && theirs.success) return { kind: 'conflict', theirs: theirs.data };
  return { kind: 'refused', error };
}
