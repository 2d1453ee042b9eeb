import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { MemoryRouter } from 'react-router';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { NoticeOwnRow, NoticeRow } from '#shared/contracts/notices.ts';
import { NoticeForm } from './notice-form.tsx';
import { OwnValues } from './own-values.tsx';

const LABORATORY = { id: '01550af9-f000-757e-8b57-e8b94d4a37fd', code: 'PA', name: 'Port Alder Calibration' };
const OWN: NoticeOwnRow = {
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
  expandedU: '0.0003',
  k: '2',
  performedEnd: '2018-08-18',
  datePrecision: 'day',
  issuedOn: '2018-08-20',
  shift: '-0.000007',
  addedU: 0.00001,
  deviationBefore: '0.00062',
  deviationAfter: '0.000613',
  expandedUBefore: 0.0003,
  expandedUAfter: 0.000301,
  ratio: -0.000007 / 0.0003,
  classBefore: 'keeps',
  classAfter: 'keeps',
  word: 'none',
};

function showRows(...rows: NoticeRow[]): string {
  const warned = rows.filter((row) => row.view === 'warning').length;
  const words = { none: 1, material: 0, verdictChanges: 0 };
  const { container } = render(
    <MemoryRouter>
      <OwnValues
        total={{ count: rows.length, warned, words, fullWords: words }}
        rows={rows}
        isFetchingMore={false}
      />
    </MemoryRouter>,
  );
  return container.textContent.replace(/\s/g, ' ');
}

describe('one’s own values under a notice', () => {
  it('need no action below a tenth of U, and say why', () => {
    const text = showRows(OWN);
    expect(text).toContain('No action needed, because the shift is 2.3 % of U and U grows by 0.33 %.');
    expect(text).toContain('−0.02');
  });

  it('say that the shifts of earlier notices count with it', () => {
    const text = showRows({ ...OWN, ratio: -0.15, word: 'material' });
    expect(text).toContain(
      'Material: the shift, with earlier notices, is 15 % of U and U grows by 0.33 %. Use the value after.',
    );
  });

  it('tell a small part of U as small, not as zero', () => {
    const text = showRows({ ...OWN, ratio: 0.001 });
    expect(text).toContain('below 0.01');
    expect(text).not.toContain('0.00 ');
  });

  it('never hide a verdict that changes', () => {
    expect(showRows({ ...OWN, classAfter: 'does not keep', word: 'verdict changes' })).toContain(
      'With this notice it does not keep class E2.',
    );
  });

  it('are asked about where the certificate states no U', () => {
    const unknown = { ...OWN, expandedU: null, expandedUBefore: null, expandedUAfter: null, ratio: null };
    expect(showRows(unknown)).toContain('its certificate states no U to weigh it by');
  });

  it('tell weights of others by one word', () => {
    const others: NoticeRow = {
      view: 'warning',
      laboratory: LABORATORY,
      registryNo: 'HM 0002',
      nominal: '2000',
      class: 'F1',
      shift: '-0.000014',
      word: 'none',
    };
    const text = showRows(others);
    expect(text).toContain('HM 0002');
    expect(text).toContain('no action needed');
  });

  it('say so where there are none', () => {
    expect(showRows()).toContain('reaches no value in force that you may see');
  });
});

const SCALE = {
  id: '01550af9-f000-7c45-ad97-50f7b6acc4ad',
  name: 'Kilogram as realized',
  basis: 'Realizations',
  validFrom: '2016-06-01',
  validTo: null,
  values: 12,
};

describe('a new notice', () => {
  afterEach(() => {
    vi.unstubAllGlobals();
    localStorage.clear();
  });

  function showForm() {
    const answer = vi.fn((_: string, __: RequestInit) =>
      Promise.resolve(
        new Response(JSON.stringify({ id: OWN.uid, number: 'N 1', isBackDated: true, newScaleId: null }), {
          status: 201,
          headers: { 'Content-Type': 'application/json' },
        }),
      ),
    );
    vi.stubGlobal('fetch', answer);
    const onPublished = vi.fn();
    render(
      <QueryClientProvider client={new QueryClient()}>
        <NoticeForm
          accountId="a"
          publishesFor={[LABORATORY]}
          scaleVersions={[SCALE]}
          notices={[]}
          from={null}
          day="2026-12-01"
          onPublished={onPublished}
        />
      </QueryClientProvider>,
    );
    return { answer, onPublished };
  }
  const type = (label: string | RegExp, value: string) =>
    fireEvent.change(screen.getByLabelText(label), { target: { value } });

  it('names every field that is missing, and sends nothing', async () => {
    const { answer } = showForm();
    fireEvent.click(screen.getByRole('button', { name: 'Publish the notice' }));
    expect(await screen.findByText('Give the notice a number')).toBeTruthy();
    expect(screen.getByText('Type your password again: it is your signature')).toBeTruthy();
    expect(answer).not.toHaveBeenCalled();
  });

  it('keeps what was typed over a closed tab, and never the password', async () => {
    showForm();
    type('Title', 'Half a notice');
    type(/^Your password/, 'very secret');
    await waitFor(() => expect(JSON.stringify(localStorage)).toContain('Half a notice'));
    expect(JSON.stringify(localStorage)).not.toContain('very secret');
    cleanup();
    showForm();
    expect(screen.getByText(/Filled again with what you typed/)).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('Title').value).toBe('Half a notice');
    expect(screen.getByLabelText<HTMLInputElement>(/^Your password/).value).toBe('');
  });

  it('is sent in grams, and says beforehand that it is back-dated', async () => {
    const { answer, onPublished } = showForm();
    type('Number', 'N 1');
    type('Title', 'A correction');
    type('Why it is published', 'Because.');
    type('Takes effect on', '2026-11-01');
    type(/^Shift at 1 kg/, '-7');
    type(/^Your password/, 'secret');
    expect(screen.getByText(/It takes effect before it was made known/)).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Publish the notice' }));
    await waitFor(() => expect(onPublished).toHaveBeenCalledWith(OWN.uid));
    const body = JSON.parse(String(answer.mock.calls[0]![1].body));
    expect(body).toMatchObject({ issuerId: LABORATORY.id, fromScaleId: SCALE.id, effectiveOn: '2026-11-01' });
    expect(body.terms[0].shiftPerKilogram).toEqual([{ on: '2000-01-01', shift: '-0.000007' }]);
  });
});
