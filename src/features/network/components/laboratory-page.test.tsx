import { render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import type { LaboratoryResponse } from '#shared/contracts/network.ts';
import { LaboratoryPage } from './laboratory-page.tsx';

const SHEET: LaboratoryResponse = {
  laboratory: {
    id: '019256f8-d100-768f-b25c-537f2ac54de9',
    code: 'TV',
    name: 'Tarn Valley Standards',
    kind: 'calibration laboratory',
    country: 'QV',
    place: 'Tarnford',
    recognition: 'suspended',
    recognitionBody: 'Quorra Accreditation Board',
    scopeLines: 1,
  },
  recognitions: [
    {
      kind: 'accreditation',
      body: 'Quorra Accreditation Board',
      number: 'K-1',
      arrangement: 'Mutual arrangement',
      state: 'suspended',
      validFrom: '2020-01-01',
      validTo: null,
    },
  ],
  scope: [
    {
      line: 2,
      quantity: 'conventional mass',
      nominalFrom: '1',
      nominalTo: '500',
      method: 'Subdivision',
      bestUConstant: '0.0000008',
      bestURelative: 5e-8,
      k: '2',
      coverage: '0.9545',
      state: 'granted',
      validFrom: '2020-01-01',
      validTo: null,
    },
  ],
  people: null,
  abilities: {},
};

describe('LaboratoryPage', () => {
  it('writes the best U as a function of the nominal and at both ends', () => {
    render(<LaboratoryPage sheet={SHEET} />);
    const row = screen.getAllByRole('row')[1]!.textContent!.replace(/\s/g, ' ');
    expect(row).toContain('1 g to 500 g');
    expect(row).toContain('0.8 µg + 5 × 10−8 m');
    expect(row).toContain('0.85 µg, 26 µg');
  });

  it('marks how its recognition stands', () => {
    render(<LaboratoryPage sheet={SHEET} />);
    expect(screen.getByText('suspended')).toBeTruthy();
  });

  it('shows people only where they were sent', () => {
    const { rerender } = render(<LaboratoryPage sheet={SHEET} />);
    expect(screen.queryByRole('heading', { name: 'People' })).toBeNull();
    const people = [
      {
        accountId: SHEET.laboratory.id,
        name: 'Ina Holm',
        role: 'metrologist',
        validFrom: '2020-01-01',
        validTo: null,
      },
    ];
    rerender(<LaboratoryPage sheet={{ ...SHEET, people }} />);
    expect(screen.getByText('Ina Holm')).toBeTruthy();
  });

  it('says what belongs there without a scope', () => {
    render(<LaboratoryPage sheet={{ ...SHEET, scope: [] }} />);
    expect(screen.getByText(/stands here once the registrar has entered its scope/)).toBeTruthy();
  });
});
