import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { useZodForm } from './form.ts';
import { useLocalDraft } from './local-draft.ts';

const Note = z.strictObject({ text: z.string().min(1, 'Write something') });

function NoteForm({ owner }: { owner: string }) {
  const form = useZodForm(Note, { defaultValues: { text: '' } });
  const draft = useLocalDraft(owner, 'note', form);
  return (
    <form>
      <label>
        Note <input {...form.register('text')} />
      </label>
      {draft.restoredFrom !== null && <p>Filled again</p>}
      <button type="button" onClick={draft.clear}>
        Saved
      </button>
      <button type="button" onClick={draft.discard}>
        Discard
      </button>
    </form>
  );
}

const box = (): HTMLInputElement => screen.getByLabelText('Note');

describe('useLocalDraft', () => {
  it('fills the form again after the tab was closed, for its owner only', async () => {
    const first = render(<NoteForm owner="a" />);
    await userEvent.setup().type(box(), 'half a sentence');
    first.unmount();
    const second = render(<NoteForm owner="b" />);
    expect(box().value).toBe('');
    second.unmount();
    render(<NoteForm owner="a" />);
    expect(box().value).toBe('half a sentence');
    expect(screen.getByText('Filled again')).toBeTruthy();
  });

  it('forgets once the entries are saved', async () => {
    const user = userEvent.setup();
    const first = render(<NoteForm owner="a" />);
    await user.type(box(), 'done');
    first.unmount();
    const second = render(<NoteForm owner="a" />);
    await user.click(screen.getByText('Saved'));
    expect(screen.queryByText('Filled again')).toBeNull();
    second.unmount();
    render(<NoteForm owner="a" />);
    expect(box().value).toBe('');
  });

  it('empties the form when the entries are discarded', async () => {
    const user = userEvent.setup();
    const first = render(<NoteForm owner="a" />);
    await user.type(box(), 'never mind');
    first.unmount();
    render(<NoteForm owner="a" />);
    await user.click(screen.getByText('Discard'));
    expect(box().value).toBe('');
  });
});
