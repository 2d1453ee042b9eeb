import { fireEvent, render, screen, within } from '@testing-library/react';
import { MemoryRouter } from 'react-router';
import { describe, expect, it, vi } from 'vitest';
import type { WhatIfGroup, WhatIfRow } from '#shared/contracts/downstream.ts';
import { columnsOf } from './what-if-columns.tsx';
import { WhatIfForm } from './what-if-form.tsx';
import { WhatIfTable } from './what-if-table.tsx';

const LABORATORY = { id: '01550af9-f000-757e-8b57-e8b94d4a37fd', code: 'PA', name: 'Port Alder Calibration' };
const GROUP: WhatIfGroup = {
  key: LABORATORY.id,
  laboratory: LABORATORY,
  count: 2,
  warned: 1,
  words: { none: 0, material: 1, verdictChanges: 1 },
  largestShift: 0.0012,
  largestRatio: 10.9,
};
const OWN: WhatIfRow = {
  view: 'full',
  uid: '01a01e2f-2000-7738-adb1-8fcf65fde7c6',
  standardId: '015be712-9758-7539-8e40-32677de812db',
  revisionId: '01a01e2f-2000-731a-ba28-aff65b53f3bf',
  registryNo: 'PA 0412',
  marking: '1 kg',
  nominal: '1000',
  class: 'E2',
  holder: LABORATORY,
  issuer: LABORATORY,
  certificateNo: 'PA-26-003',
  quantity: 'conventional mass',
  deviation: '0.00062',
  expandedU: '0.00011',
  k: '2',
  performedEnd: '2026-08-18',
  datePrecision: 'day',
  issuedOn: '2026-08-20',
  shift: 0.0012,
  deviationAfter: '0.00182',
  ratio: 10.9,
  expandedUAfter: 0.00011,
  classBefore: 'keeps',
  classAfter: 'does not keep',
  isBeyondLimit: false,
  word: 'verdict changes',
};
const OTHERS: WhatIfRow = {
  view: 'warning',
  laboratory: LABORATORY,
  registryNo: 'HM 0002',
  nominal: '2000',
  class: 'F1',
  shift: 0.0012,
  word: 'material',
};

function showTable(open: string | undefined) {
  const onOpen = vi.fn();
  const onSort = vi.fn();
  const opened = { rows: [OWN, OTHERS], isWaiting: false, isFetchingMore: false, error: null };
  render(
    <MemoryRouter>
      <WhatIfTable
        groups={[GROUP]}
        columns={columnsOf([
          { kind: 'shift', valueUid: '01a01e2f-2000-7738-adb1-8fcf65fde7c6', shift: '0.0012' },
        ])}
        by="laboratory"
        sort="word"
        {...{ open, opened, onOpen, onSort }}
      />
    </MemoryRouter>,
  );
  return { onOpen, onSort };
}

const textOf = (element: HTMLElement) => element.textContent!.replace(/\s/g, ' ');

describe('WhatIfTable', () => {
  it('opens a group in place and sorts by a head', () => {
    const { onOpen, onSort } = showTable(undefined);
    const group = screen.getByRole('button', { name: 'Port Alder Calibration' });
    expect(group.getAttribute('aria-expanded')).toBe('false');
    fireEvent.click(group);
    fireEvent.click(screen.getByRole('button', { name: 'Shift/U' }));
    expect(onOpen).toHaveBeenCalledWith(GROUP.key);
    expect(onSort).toHaveBeenCalledWith('ratio');
  });

  it('tells one’s own weight with shift over U and both verdicts, and links its chain', () => {
    showTable(GROUP.key);
    const link = screen.getByRole('link', { name: 'PA 0412' });
    expect(link.getAttribute('href')).toBe(`/chains/${OWN.uid}`);
    const row = textOf(link.closest('tr')!);
    expect(row).toContain('+10.90');
    expect(row).toContain('keeps E2, then does not');
    expect(row).toContain('verdict changes');
  });

  it('tells a weight of others with its shift and one word, and no way further', () => {
    showTable(GROUP.key);
    const row = screen.getByText('HM 0002').closest('tr')!;
    expect(within(row).queryByRole('link')).toBeNull();
    expect(textOf(row)).toBe('HM 00022 kg, F1material+1.2 mg');
  });
});

describe('WhatIfForm', () => {
  function showForm(asked = {}, onRefused = vi.fn()) {
    const onAsk = vi.fn();
    render(
      <WhatIfForm
        asked={{ beyond: 10, ...asked } as Parameters<typeof WhatIfForm>[0]['asked']}
        certificateNo={null}
        onAsk={onAsk}
        onRefused={onRefused}
        onLeave={() => undefined}
      />,
    );
    return onAsk;
  }

  it('reads a shift back with its direction before it is asked', () => {
    const onAsk = showForm();
    fireEvent.change(screen.getByLabelText('Shift, with its unit'), { target: { value: '-20ug' } });
    expect(textOf(screen.getByText(/^Read as/))).toBe('Read as 20 µg lighter');
    fireEvent.click(screen.getByRole('button', { name: 'Work it out' }));
    expect(onAsk).toHaveBeenCalledWith({ suppose: 'shift', amount: '-20 ug', beyond: 10 });
  });

  it('asks nothing without a unit, and says so', () => {
    const onRefused = vi.fn();
    const onAsk = showForm({}, onRefused);
    fireEvent.change(screen.getByLabelText('Shift, with its unit'), { target: { value: '20' } });
    fireEvent.click(screen.getByRole('button', { name: 'Work it out' }));
    expect(screen.getByText(/Write the unit/)).toBeTruthy();
    // The screen takes the former answer away, which is not this question's.
    expect(onRefused).toHaveBeenCalledOnce();
    expect(onAsk).not.toHaveBeenCalled();
  });

  it('offers no withdrawal of a certificate that is not open to the reader', () => {
    showForm({ suppose: 'withdraw' });
    expect(screen.getByLabelText('Shift, with its unit')).toBeTruthy();
    expect(screen.queryByRole('option', { name: 'Its certificate is withdrawn' })).toBeNull();
  });
});
