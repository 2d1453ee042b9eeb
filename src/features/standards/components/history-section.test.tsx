import { render, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { MemoryRouter } from 'react-router';
import { describe, expect, it, vi } from 'vitest';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { HistorySection } from './history-section.tsx';

const LABORATORY = { id: '019256f8-d100-768f-b25c-537f2ac54de9', code: 'TV', name: 'Tarn Valley Standards' };

function value(day: string, changes: Partial<StandardResponse['history'][number]> = {}) {
  return {
    uid: day,
    revisionId: day,
    certificateNo: `C-${day}`,
    revisionN: 1,
    issuer: LABORATORY,
    quantity: 'conventional mass',
    medium: 'air',
    stage: null,
    epochN: 1,
    deviation: '0.000041',
    expandedU: '0.000045',
    k: '2',
    performedEnd: day,
    datePrecision: 'day',
    issuedOn: day,
    state: 'in force',
    stateSince: null,
    change: null,
    ...changes,
  } as StandardResponse['history'][number];
}

function show(history: StandardResponse['history']) {
  const chosen = vi.fn();
  const sheet = {
    standard: { class: 'E1', nominal: '1000' },
    maximumPermissibleError: '0.0005',
    epochs: [
      { n: 1, reason: 'new', beginsOn: '2009-05-18', lastGoodOn: null, note: null },
      { n: 2, reason: 'adjusted', beginsOn: '2021-03-02', lastGoodOn: null, note: null },
    ],
    programme: { dueOn: '2026-09-12' },
    history,
  } as unknown as StandardResponse;
  render(
    <MemoryRouter>
      <HistorySection sheet={sheet} quantity="conventional mass" onQuantity={chosen} firstStep={null} />
    </MemoryRouter>,
  );
  return chosen;
}

describe('HistorySection', () => {
  it('describes the drawing in words and holds the same facts in its table', () => {
    show([
      value('2018-02-27', { deviation: '-0.000031' }),
      value('2023-05-04', { epochN: 2 }),
      value('2024-09-12', { epochN: 2, change: { deviation: '-0.000006', ratio: 0.0873 } }),
    ]);
    const drawing = screen.getByRole('img', { name: /3 values from 2018-02-27 to 2024-09-12/ });
    expect(drawing.textContent).toContain('New epoch on 2021-03-02, adjusted.');
    expect(within(drawing).getByText(/adjusted 2021-03-02, new epoch/)).toBeTruthy();
    const rows = screen
      .getAllByRole('row')
      .slice(1)
      .map((row) => row.textContent);
    expect(rows[0]).toContain('2024-09-12C-2024-09-12Tarn Valley StandardsTV+41');
    expect(rows[0]).toContain('E = 0.09');
    expect(rows[1]).toContain('new epoch');
    expect(rows[2]).not.toContain('new epoch');
  });

  it('invents no U', () => {
    show([value('1948-12-31', { expandedU: null, k: null, datePrecision: 'year' })]);
    const [, row] = screen.getAllByRole('row');
    expect(row!.textContent).toContain('1948C-');
    expect(row!.textContent).toContain('not stated');
    expect(screen.getByText(/^No bar: U not stated on the certificate/)).toBeTruthy();
  });

  it('says since when a value no longer stands', () => {
    show([value('2020-06-15', { state: 'superseded', stateSince: '2020-08-01' })]);
    expect(screen.getAllByRole('row')[1]!.textContent).toContain('superseded 2020-08-01');
  });

  it('shows one quantity at a time', async () => {
    const chosen = show([
      value('2024-09-12'),
      value('2024-09-12', { uid: 'm', quantity: 'mass', certificateNo: 'M' }),
    ]);
    expect(screen.getAllByRole('row')).toHaveLength(2);
    await userEvent.setup().click(screen.getByRole('radio', { name: 'Mass' }));
    expect(chosen).toHaveBeenCalledWith('mass');
  });

  it('says what belongs there when there is no value', () => {
    show([]);
    expect(screen.getByText(/Values stand here once a calibration/)).toBeTruthy();
    expect(screen.queryByRole('img')).toBeNull();
  });
});
