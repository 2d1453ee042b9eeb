import { useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useRef, useState } from 'react';
import type { UseFormReturn } from 'react-hook-form';
import type { DraftContent, DraftResponse } from '#shared/contracts/drafts.ts';
import { useLostSince } from '#src/lib/connection-state.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { usePerson } from '#src/lib/session.ts';
import { createDraft, draftQuery, saveDraft } from '../api.ts';
import { makeAutosave, type Autosave, type SaveState } from './autosave.ts';
import { contentOf, type DraftValues } from './draft-values.ts';

/** Longer than the local copy waits before it is written. */
const FORGET_AFTER_MS = 500;

/** How the draft is being kept. */
export interface Saving {
  state: SaveState;
  /** When what the form was filled with was typed, where it had not reached the server; else null. */
  restoredFrom: number | null;
  /** Saves at once; says whether the server now has every entry. */
  saveNow: () => Promise<boolean>;
  /** What the server had when this typing began; null where that is not known. */
  base: () => DraftContent | null;
  /** Takes these values as what should stand, upon the version the server has. */
  settle: (theirs: DraftResponse, values: DraftValues) => void;
  /** The person has seen that entries were restored. */
  dismiss: () => void;
}

/**
 * Keeps a draft: in this browser at once, on the server when the typing pauses. The first change creates it.
 * @param draft what the server has; null for a draft that does not exist yet
 * @param laboratoryId whose draft a new one becomes
 */
export function useAutosave(
  form: UseFormReturn<DraftValues, unknown, DraftValues>,
  draft: DraftResponse | null,
  laboratoryId: string,
  onCreated: (draft: DraftResponse) => void,
): Saving {
  const queries = useQueryClient();
  const { accountId } = usePerson();
  const [state, setState] = useState<SaveState>({ kind: 'untouched' });
  const local = useLocalDraft(accountId, `calibration:${draft?.id ?? 'new'}`, form);
  const { clear } = local;
  const [restoredFrom, setRestoredFrom] = useState<number | null>(null);
  /** Entries restored from this browser may have begun from any version. */
  const isBaseKnown = useRef(true);
  const keptAt = useRef(local.restoredFrom);
  const latest = useRef({ draft, laboratoryId, onCreated, clear });
  useEffect(() => {
    latest.current = { draft, laboratoryId, onCreated, clear };
  });
  const saver = useRef<Autosave | null>(null);
  /** Forgets the copy kept under the name "new" once the draft has one of its own. */
  const clearNew = useRef<(() => void) | null>(null);

  useEffect(() => {
    let id = latest.current.draft?.id ?? null;
    let isLeft = false;
    const read = () => contentOf(form.getValues());
    let forgetting: ReturnType<typeof setTimeout> | undefined;
    // What the server has needs no copy here, and the copy's own last write must not bring it back.
    const forgetLater = (): void => {
      clearTimeout(forgetting);
      if (autosave.isClean()) forgetting = setTimeout(() => latest.current.clear(), FORGET_AFTER_MS);
    };
    const autosave = makeAutosave({
      read,
      // A sheet that was only looked at makes no draft.
      saved: latest.current.draft?.content ?? contentOf(form.formState.defaultValues as DraftValues),
      send: (content) =>
        id === null
          ? createDraft(latest.current.laboratoryId, content)
          : saveDraft(id, form.getValues('version'), content),
      onSaved: (answer) => {
        const isNew = id === null;
        id = answer.id;
        form.setValue('version', answer.version);
        queries.setQueryData(draftQuery(answer.id).queryKey, answer);
        void queries.invalidateQueries({ queryKey: ['calibrations', 'list'] });
        void queries.invalidateQueries({ queryKey: ['desk'] });
        isBaseKnown.current = true;
        if (isLeft) latest.current.clear();
        else if (isNew) {
          clearNew.current = latest.current.clear;
          latest.current.onCreated(answer);
        }
      },
      onState: (next) => {
        // Every keystroke says "typing"; the screen needs to hear it once.
        setState((before) => (before.kind === 'typing' && next.kind === 'typing' ? before : next));
        forgetLater();
      },
    });
    saver.current = autosave;
    const unsubscribe = form.subscribe({ formState: { values: true }, callback: autosave.changed });
    if (!autosave.isClean() && keptAt.current !== null) {
      isBaseKnown.current = false;
      setRestoredFrom(keptAt.current);
    }
    // What was restored from this browser goes to the server now.
    autosave.changed();
    return () => {
      isLeft = true;
      clearTimeout(forgetting);
      unsubscribe();
      // In development React takes every effect back once and does it again: then nobody has left.
      queueMicrotask(() => (saver.current === autosave ? autosave.stop() : autosave.drop()));
    };
  }, [form, queries]);

  useEffect(() => {
    clearNew.current?.();
    clearNew.current = null;
  }, [draft?.id]);

  useEffect(() => {
    // Somebody else's version arrived while nothing was being typed here.
    if (!draft || draft.version <= form.getValues('version') || !saver.current?.isClean()) return;
    form.reset({ ...draft.content, version: draft.version });
    saver.current?.settle(draft.content);
  }, [draft, form]);

  const lostSince = useLostSince();
  useEffect(() => {
    if (lostSince === null) return undefined;
    // Runs as the connection comes back.
    return () => void saver.current?.now();
  }, [lostSince]);

  const settle = useCallback(
    (theirs: DraftResponse, values: DraftValues) => {
      saver.current?.settle(theirs.content);
      form.reset({ ...values, version: theirs.version });
      saver.current?.changed();
      queries.setQueryData(draftQuery(theirs.id).queryKey, theirs);
    },
    [form, queries],
  );
  const saveNow = useCallback(() => saver.current?.now() ?? Promise.resolve(false), []);
  const base = useCallback(() => (isBaseKnown.current ? (saver.current?.acknowledged() ?? null) : null), []);
  const dismiss = useCallback(() => setRestoredFrom(null), []);
  return { state, restoredFrom, saveNow, base, settle, dismiss };
}
