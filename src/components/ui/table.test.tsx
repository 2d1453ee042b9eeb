import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { Cell, Head, Row, RowButton, Table } from './table.tsx';

function Weights({ numbers, onOpen }: { numbers: string[]; onOpen: (number: string) => void }) {
  return (
    <Table caption="Weights">
      <thead>
        <tr>
          <Head sort="ascending" onSort={() => onOpen('sort')}>
            Number
          </Head>
          <Head>Holder</Head>
        </tr>
      </thead>
      <tbody>
        {numbers.map((number) => (
          <Row key={number}>
            <Cell isHeading>
              <RowButton onClick={() => onOpen(number)}>{number}</RowButton>
            </Cell>
            <Cell>holder of {number}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

const focused = (): string | null | undefined => document.activeElement?.textContent;

describe('Table', () => {
  it('is one tab stop after its heads; arrows, Home and End move, Enter opens', async () => {
    const opened = vi.fn();
    const user = userEvent.setup();
    render(<Weights numbers={['W 1', 'W 2', 'W 3']} onOpen={opened} />);
    await user.tab();
    await user.tab();
    expect(focused()).toBe('W 1');
    await user.keyboard('{ArrowDown}{ArrowDown}{ArrowDown}');
    expect(focused()).toBe('W 3');
    await user.keyboard('{ArrowUp}{Enter}');
    expect(opened.mock.calls).toEqual([['W 2']]);
    await user.keyboard('{Home}');
    expect(focused()).toBe('W 1');
    await user.tab();
    expect(document.activeElement).toBe(document.body);
  });

  it('keeps a tab stop when the rows are exchanged', async () => {
    const user = userEvent.setup();
    const { rerender } = render(<Weights numbers={['W 1', 'W 2']} onOpen={() => undefined} />);
    rerender(<Weights numbers={['W 7', 'W 8']} onOpen={() => undefined} />);
    await vi.waitFor(() => expect(screen.getByText('W 7').tabIndex).toBe(0));
    await user.tab();
    await user.tab();
    expect(focused()).toBe('W 7');
  });

  it('opens from anywhere on the row, once', async () => {
    const opened = vi.fn();
    const user = userEvent.setup();
    render(<Weights numbers={['W 1', 'W 2']} onOpen={opened} />);
    await user.click(screen.getByText('holder of W 2'));
    await user.click(screen.getByText('W 1'));
    expect(opened.mock.calls).toEqual([['W 2'], ['W 1']]);
  });

  it('says which way a column sorts', async () => {
    const opened = vi.fn();
    render(<Weights numbers={['W 1']} onOpen={opened} />);
    expect(screen.getByRole('columnheader', { name: /Number/ }).getAttribute('aria-sort')).toBe('ascending');
    await userEvent.setup().click(screen.getByRole('button', { name: /Number/ }));
    expect(opened).toHaveBeenCalledWith('sort');
  });
});
