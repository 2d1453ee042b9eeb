import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Combobox, type ComboboxOption } from './combobox.tsx';

const WEIGHTS: ComboboxOption[] = [
  { id: '1', label: 'W 1', detail: '1 kg' },
  { id: '2', label: 'W 2', detail: '500 g' },
];

describe('Combobox', () => {
  it('offers what it finds and takes the choice from the keyboard', async () => {
    const chosen = vi.fn();
    const search = vi.fn(async (text: string) => WEIGHTS.filter((weight) => weight.label.includes(text)));
    const user = userEvent.setup();
    render(<Combobox label="Reference" value={null} onChange={chosen} search={search} />);
    const box = screen.getByRole('combobox', { name: 'Reference' });
    await user.type(box, 'W');
    expect(await screen.findAllByRole('option')).toHaveLength(2);
    await user.keyboard('{ArrowDown}{Enter}');
    expect(chosen).toHaveBeenCalledWith(WEIGHTS[1]);
    expect(box.getAttribute('aria-expanded')).toBe('false');
  });

  it('asks only about the last thing typed', async () => {
    const search = vi.fn(async () => WEIGHTS);
    const user = userEvent.setup();
    render(<Combobox label="Reference" value={null} onChange={() => undefined} search={search} />);
    await user.type(screen.getByRole('combobox'), 'W 12');
    await screen.findAllByRole('option');
    expect(search.mock.calls).toEqual([['W 12', expect.any(AbortSignal)]]);
  });

  it('says so when nothing is found, and closes on Escape', async () => {
    const user = userEvent.setup();
    render(
      <Combobox
        label="Reference"
        value={WEIGHTS[0] ?? null}
        onChange={() => undefined}
        search={async () => []}
      />,
    );
    const box = screen.getByRole<HTMLInputElement>('combobox');
    await user.type(box, 'x');
    expect(await screen.findByText('Nothing found')).toBeTruthy();
    await user.keyboard('{Escape}');
    expect(box.value).toBe('W 1');
  });
});
