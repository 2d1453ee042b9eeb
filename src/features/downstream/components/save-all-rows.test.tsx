import { fireEvent, render, screen } from '@testing-library/react';
import { describe, expect, it, vi } from 'vitest';
import { saveText } from '../save-text.ts';
import { SaveAllRows } from './save-all-rows.tsx';

vi.mock('../save-text.ts', () => ({ saveText: vi.fn() }));

const toCsv = (rows: readonly number[], isFirst: boolean) =>
  `${isFirst ? 'head,' : ''}${rows.map((row) => `${row},`).join('')}`;

function show(pages: (signal: AbortSignal) => AsyncIterable<readonly number[]>) {
  render(<SaveAllRows name="rows.csv" total={3} pages={pages} toCsv={toCsv} />);
  fireEvent.click(screen.getByRole('button', { name: 'Save all 3 rows as CSV' }));
}

describe('SaveAllRows', () => {
  it('writes every page into one file, its head once', async () => {
    show(async function* () {
      yield [1, 2];
      yield [3];
    });
    await screen.findByRole('button', { name: 'Save all 3 rows as CSV' });
    expect(saveText).toHaveBeenLastCalledWith('rows.csv', 'head,1,2,3,');
  });

  it('says how far it has come, and stops when told to', async () => {
    vi.mocked(saveText).mockClear();
    let stopped = false;
    show(async function* (signal) {
      yield [1, 2];
      await new Promise((resolve) => signal.addEventListener('abort', resolve));
      stopped = signal.aborted;
      throw new Error('aborted');
    });
    expect(await screen.findByText('Gathering rows: 2 of 3')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Stop' }));
    await screen.findByRole('button', { name: 'Save all 3 rows as CSV' });
    expect(stopped).toBe(true);
    expect(saveText).not.toHaveBeenCalled();
  });

  it('says that a page failed, keeps nothing half, and offers it again', async () => {
    // eslint-disable-next-line require-yield -- the first page is the one that fails
    show(async function* () {
      throw new Error('The connection was lost');
    });
    expect(await screen.findByRole('button', { name: 'Try again' })).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Save all 3 rows as CSV' })).toBeTruthy();
    expect(saveText).not.toHaveBeenCalled();
  });
});
