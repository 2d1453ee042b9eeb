import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router';
import { describe, expect, it, vi } from 'vitest';
import type { StandardListResponse } from '#shared/contracts/standards.ts';
import { readListSearch } from '../list-search.ts';
import { StandardList } from './standard-list.tsx';

const LABORATORY = { id: '019256f8-d100-768f-b25c-537f2ac54de9', code: 'TV', name: 'Tarn Valley Standards' };

function row(registryNo: string, changes: Partial<StandardListResponse['standards'][number]> = {}) {
  return {
    id: registryNo,
    registryNo,
    kind: 'weight',
    nominal: '1000',
    marking: '1 kg',
    class: 'E2',
    holder: LABORATORY,
    set: null,
    value: null,
    dueOn: null,
    ...changes,
  } as StandardListResponse['standards'][number];
}

function show(page: Partial<StandardListResponse>, address = '') {
  const changed = vi.fn();
  const more = vi.fn();
  const whole = { standards: [], nextCursor: null, count: 0, isCountExact: true, abilities: {}, ...page };
  render(
    <QueryClientProvider client={new QueryClient()}>
      <MemoryRouter>
        <StandardList
          pages={[whole]}
          search={readListSearch(new URLSearchParams(address))}
          onChange={changed}
          laboratories={[]}
          hrefOf={(id) => `?open=${id}`}
          onMore={whole.nextCursor ? more : undefined}
          isFetchingMore={false}
          error={null}
          registerActions={null}
          actionsFor={() => null}
        />
      </MemoryRouter>
    </QueryClientProvider>,
  );
  return { changed, more, user: userEvent.setup() };
}

describe('StandardList', () => {
  it('says how many of how many it shows', () => {
    show({ standards: [row('TV 0001'), row('TV 0002')], count: 640, nextCursor: 'x' });
    expect(screen.getByText('2 of 640 standards')).toBeTruthy();
  });

  it('does not pretend to have counted beyond ten thousand', () => {
    show({ standards: [row('TV 0001')], count: 10_000, isCountExact: false, nextCursor: 'x' });
    expect(screen.getByText(/^1 of 10\s000\+ standards$/)).toBeTruthy();
  });

  it('never shows a U that no certificate states', () => {
    const value = {
      uid: 'v',
      revisionId: 'r',
      quantity: 'mass' as const,
      deviation: '0.0001',
      expandedU: null,
      k: null,
      performedEnd: '1948-12-31',
      datePrecision: 'year' as const,
      certificateNo: 'C 1948',
    };
    show({ standards: [row('TV 0001', { value }), row('TV 0002')], count: 2 });
    const [, first, second] = screen.getAllByRole('row');
    expect(first!.textContent).toContain('not statedmass1948');
    expect(second!.textContent).toContain('no value in force');
  });

  it('sorts by a click on a head, and asks for more', async () => {
    const { changed, more, user } = show(
      { standards: [row('TV 0001')], count: 60, nextCursor: 'x' },
      'sort=nominal',
    );
    await user.click(screen.getByRole('button', { name: /Nominal/ }));
    expect(changed).toHaveBeenCalledWith({ sort: '-nominal' });
    expect(screen.getByRole('columnheader', { name: /Nominal/ }).getAttribute('aria-sort')).toBe('ascending');
    await user.click(screen.getByRole('button', { name: 'Show more' }));
    expect(more).toHaveBeenCalledOnce();
  });

  it('asks for a nominal once it is complete', async () => {
    const { changed, user } = show({ standards: [row('TV 0001')], count: 1 });
    await user.type(screen.getByLabelText('Nominal, from'), '1 k');
    expect(changed).not.toHaveBeenCalled();
    await user.keyboard('g{Enter}');
    expect(changed).toHaveBeenCalledWith({ nominalFrom: '1000' });
  });

  it('tells an empty register from a question without an answer', async () => {
    const { changed, user } = show({}, 'class=E1&q=x');
    await user.click(screen.getByRole('button', { name: 'Show all standards' }));
    expect(changed.mock.calls[0]?.[0]).toMatchObject({ q: undefined, class: undefined });
  });

  it('says what belongs there before anything is registered', () => {
    show({});
    expect(screen.getByText(/The weights of the laboratories you read in full stand here/)).toBeTruthy();
  });
});
