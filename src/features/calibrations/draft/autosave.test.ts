import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { DraftResponse, type DraftContent } from '#shared/contracts/drafts.ts';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { makeAutosave, type SaveState } from './autosave.ts';
import { contentOf, emptyDraft } from './draft-values.ts';

const ID = '0190f0aa-1111-7abc-8000-000000000001';

const answer = (content: DraftContent, version = 2): DraftResponse =>
  DraftResponse.parse({
    id: ID,
    version,
    state: 'open',
    laboratory: { id: ID, code: 'L', name: 'Laboratory' },
    content,
    document: null,
    standards: [],
    references: [],
    points: [],
    checks: [],
    revisionId: null,
    updatedAt: '2025-02-20T14:02:41.000Z',
    updatedBy: 'A. Metrologist',
    abilities: {},
  });

const problem = (status: number, members: Record<string, unknown> = {}) =>
  new ApiProblem({ type: '/problems/stale', title: 'No', status, ...members });

let content: DraftContent;
let states: SaveState['kind'][];
const onSaved = vi.fn<(draft: DraftResponse) => void>();
const send = vi.fn<(sent: DraftContent) => Promise<DraftResponse>>();

const start = () =>
  makeAutosave({
    read: () => content,
    saved: contentOf(emptyDraft()),
    send,
    onSaved,
    onState: (state) => states.push(state.kind),
  });
const type = (certificateNo: string): void => {
  content = { ...content, certificateNo };
};

beforeEach(() => {
  vi.useFakeTimers();
  content = contentOf(emptyDraft());
  states = [];
  onSaved.mockReset();
  send.mockReset().mockImplementation(async (sent) => answer(sent));
});
afterEach(() => vi.useRealTimers());

describe('makeAutosave', () => {
  it('sends nothing that the server has', async () => {
    const autosave = start();
    autosave.changed();
    expect(await autosave.now()).toBe(true);
    expect(send).not.toHaveBeenCalled();
  });

  it('waits for a pause in the typing and sends the newest entries once', async () => {
    const autosave = start();
    for (const text of ['T', 'TV', 'TV-2']) {
      type(text);
      autosave.changed();
      await vi.advanceTimersByTimeAsync(700);
    }
    expect(send).not.toHaveBeenCalled();
    await vi.advanceTimersByTimeAsync(100);
    expect(send.mock.calls.map(([sent]) => sent.certificateNo)).toEqual(['TV-2']);
    expect(states.at(-1)).toBe('saved');
  });

  it('sends again what was typed while a request was under way, never two at once', async () => {
    const autosave = start();
    let finish: () => void = () => undefined;
    send.mockImplementationOnce((sent) => new Promise((resolve) => (finish = () => resolve(answer(sent)))));
    type('A');
    autosave.changed();
    await vi.advanceTimersByTimeAsync(800);
    type('AB');
    autosave.changed();
    await vi.advanceTimersByTimeAsync(800);
    expect(send).toHaveBeenCalledTimes(1);
    finish();
    await vi.advanceTimersByTimeAsync(800);
    expect(send.mock.calls.map(([sent]) => sent.certificateNo)).toEqual(['A', 'AB']);
    expect(autosave.isClean()).toBe(true);
  });

  it('is at rest again when what was typed is taken back', async () => {
    const autosave = start();
    type('A');
    autosave.changed();
    type('');
    autosave.changed();
    expect(states).toEqual(['typing', 'untouched']);
    await vi.advanceTimersByTimeAsync(5000);
    expect(send).not.toHaveBeenCalled();
  });

  it('tries again while the server does not answer', async () => {
    const autosave = start();
    send.mockRejectedValueOnce(problem(0));
    type('A');
    autosave.changed();
    await vi.advanceTimersByTimeAsync(800);
    expect(states.at(-1)).toBe('unreachable');
    await vi.advanceTimersByTimeAsync(5000);
    expect(states.at(-1)).toBe('saved');
  });

  it('stops at a conflict until it is settled', async () => {
    const autosave = start();
    const theirs = answer({ ...content, certificateNo: 'B' }, 7);
    send.mockRejectedValueOnce(problem(409, { current: theirs }));
    type('A');
    autosave.changed();
    await vi.advanceTimersByTimeAsync(800);
    expect(states.at(-1)).toBe('conflict');
    autosave.changed();
    await vi.advanceTimersByTimeAsync(20_000);
    expect(send).toHaveBeenCalledTimes(1);
    autosave.settle(theirs.content);
    autosave.changed();
    await vi.advanceTimersByTimeAsync(800);
    expect(send).toHaveBeenCalledTimes(2);
  });

  it('takes a conflict with its own lost answer for what it is', async () => {
    const autosave = start();
    type('A');
    send.mockRejectedValueOnce(problem(409, { current: answer(content, 3) }));
    expect(await autosave.now()).toBe(true);
    expect(states.at(-1)).toBe('saved');
    expect(onSaved.mock.calls.map(([draft]) => draft.version)).toEqual([3]);
  });

  it('says what was refused and waits for the next keystroke', async () => {
    const autosave = start();
    send.mockRejectedValueOnce(problem(422));
    type('A');
    expect(await autosave.now()).toBe(false);
    expect(states.at(-1)).toBe('refused');
    await vi.advanceTimersByTimeAsync(20_000);
    expect(send).toHaveBeenCalledTimes(1);
  });

  it('sends what is left when the draft is left', async () => {
    const autosave = start();
    type('A');
    autosave.changed();
    autosave.stop();
    await vi.advanceTimersByTimeAsync(0);
    expect(send).toHaveBeenCalledTimes(1);
  });
});
