import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { MemoryRouter } from 'react-router';
import { describe, expect, it, vi } from 'vitest';
import type { WhatIfChange, WhatIfResponse } from '#shared/contracts/downstream.ts';
import type { NamedSubject } from '#shared/contracts/dry-runs.ts';
import { PersonContext, type Person } from '#src/lib/session.ts';
import { namedQuery, whatIfQuery, type Supposition } from '../api.ts';
import { RealActs, type ActDialogs } from './real-acts.tsx';

const INSTITUTE = { id: '01550af9-f000-757e-8b57-e8b94d4a37fd', code: 'OI', name: 'Orrin Institute' };
const VALUE = '01a01e2f-2000-7738-adb1-8fcf65fde7c6';
const REVISION = '01a01e2f-2000-731a-ba28-aff65b53f3bf';
const SHIFT: WhatIfChange = { kind: 'shift', valueUid: VALUE, shift: '0.00002' };
const WITHDRAW: WhatIfChange = { kind: 'withdraw', revisionId: REVISION };
const NOTICE: WhatIfChange = {
  kind: 'notice',
  issuerId: INSTITUTE.id,
  shiftPerKilogram: [{ on: '2015-01-01', shift: '-0.00002' }],
  addedUPerKilogram: 0,
};

const valueSubject = (abilities: Record<string, boolean>): NamedSubject => ({
  about: 'value',
  uid: VALUE,
  registryNo: 'OI 0020',
  nominal: '1000',
  class: 'E1',
  certificateNo: 'OI-24-002',
  issuer: INSTITUTE,
  deviation: '-0.000064',
  expandedU: '0.000039',
  k: '2',
  revisionId: REVISION,
  abilities,
});

const ANSWER: WhatIfResponse = {
  question: { day: '2026-12-01', known: '2026-12-01', by: 'laboratory', sort: 'word', threshold: 0.1 },
  total: { count: 15, warned: 9, words: { none: 0, material: 14, verdictChanges: 1 } },
  groups: [],
  page: null,
  beyondLimit: [],
};

function person(role: Person['roles'][number]['role']): Person {
  const laboratory = { ...INSTITUTE, isNationalInstitute: true };
  return { roles: [{ role, laboratory }] } as Person;
}

function show(
  changes: WhatIfChange[],
  subjects: NamedSubject[],
  { role = 'signatory', dialogs }: { role?: Person['roles'][number]['role']; dialogs?: ActDialogs } = {},
) {
  const asked: Supposition = { changes, threshold: 0.1, by: 'laboratory', sort: 'word' };
  const queries = new QueryClient({ defaultOptions: { queries: { staleTime: Infinity } } });
  queries.setQueryData(namedQuery(changes).queryKey, { subjects });
  queries.setQueryData(whatIfQuery(asked).queryKey, ANSWER);
  const none: ActDialogs = { withdraw: () => null, correct: () => null };
  const onDone = vi.fn();
  render(
    <MemoryRouter>
      <QueryClientProvider client={queries}>
        <PersonContext value={person(role)}>
          <RealActs asked={asked} dialogs={dialogs ?? none} onDone={onDone} />
        </PersonContext>
      </QueryClientProvider>
    </MemoryRouter>,
  );
  return onDone;
}

describe('RealActs', () => {
  it('offers no act to who may do none, and says who may', () => {
    show([SHIFT], [valueSubject({ 'calibration:correct': false, 'calibration:withdraw': true })]);
    expect(screen.queryByRole('button')).toBeNull();
    expect(screen.getByText(/Only who signs/)).toBeTruthy();
  });

  it('names an act by what it does, with the counts of the dry run', () => {
    show([SHIFT], [valueSubject({ 'calibration:correct': true })]);
    expect(screen.getByRole('button', { name: 'Correct certificate OI-24-002' })).toBeTruthy();
    expect(screen.getByText(/^What this will touch/).textContent).toBe(
      'What this will touch: 15 in all; verdict changes 1, material 14, none 0.',
    );
  });

  it('hands the supposed numbers to the dialog and the act’s number on', () => {
    const correct = vi.fn(({ onDone }: Parameters<ActDialogs['correct']>[0]) => (
      <button type="button" onClick={() => onDone(693)}>
        sign
      </button>
    ));
    const subject = valueSubject({ 'calibration:correct': true });
    const onDone = show([SHIFT], [subject], { dialogs: { withdraw: () => null, correct } });
    fireEvent.click(screen.getByRole('button', { name: 'Correct certificate OI-24-002' }));
    expect(correct.mock.lastCall![0]).toMatchObject({
      revisionId: REVISION,
      supposed: { deviation: '-0.000044', expandedU: '0.000039' },
    });
    fireEvent.click(screen.getByRole('button', { name: 'sign' }));
    expect(onDone).toHaveBeenCalledWith(693);
    expect(screen.queryByRole('button', { name: 'sign' })).toBeNull();
  });

  it('offers each of several changes its own act, and says that the counts are of all', () => {
    const certificate: NamedSubject = {
      about: 'certificate',
      revisionId: REVISION,
      certificateNo: 'OI-24-002',
      issuer: INSTITUTE,
      issuedOn: '2024-11-25',
      values: 6,
      abilities: { 'calibration:withdraw': true },
    };
    const issuer: NamedSubject = { about: 'issuer', issuer: INSTITUTE, abilities: {} };
    show([WITHDRAW, NOTICE], [certificate, issuer]);
    expect(screen.getByRole('button', { name: 'Withdraw certificate OI-24-002' })).toBeTruthy();
    const link = screen.getByRole('link', { name: 'Publish as a notice' });
    const change = new URL(link.getAttribute('href')!, 'http://x').searchParams.get('change');
    expect(JSON.parse(change!)).toEqual(NOTICE);
    expect(screen.getByText(/of all changes together/)).toBeTruthy();
  });

  it('corrects a value once by all that is supposed of it, and names the weights of two on one certificate', () => {
    const correct = vi.fn(() => null);
    const subject = valueSubject({ 'calibration:correct': true });
    const further = { ...subject, uid: REVISION, registryNo: 'OI 0021' } as NamedSubject;
    const other: WhatIfChange = { kind: 'shift', valueUid: REVISION, shift: '0.00001' };
    show([SHIFT, SHIFT], [subject, subject], { dialogs: { withdraw: () => null, correct } });
    fireEvent.click(screen.getByRole('button', { name: 'Correct certificate OI-24-002' }));
    expect(correct).toHaveBeenLastCalledWith(
      expect.objectContaining({ supposed: { deviation: '-0.000024', expandedU: '0.000039' } }),
    );
    cleanup();
    show([SHIFT, other], [subject, further]);
    expect(screen.getAllByRole('button').map((button) => button.textContent)).toEqual([
      'Correct certificate OI-24-002 for OI 0020',
      'Correct certificate OI-24-002 for OI 0021',
    ]);
  });

  it('offers the notice to who signs for the institute alone', () => {
    show([NOTICE], [{ about: 'issuer', issuer: INSTITUTE, abilities: {} }], { role: 'metrologist' });
    expect(screen.queryByRole('link')).toBeNull();
  });
});
