import { describe, expect, it } from 'vitest';
import type { WhatIfRow } from '#shared/contracts/downstream.ts';
import { whatIfCsv } from './rows-csv.ts';

const WARNING: WhatIfRow = {
  view: 'warning',
  laboratory: { id: '01550af9-f000-75d8-8c88-e38391ce1e39', code: 'TV', name: 'Tarn, "Valley"' },
  registryNo: '=TV 1',
  nominal: '1000',
  class: null,
  shift: -0.0001,
  word: 'material',
};

describe('whatIfCsv', () => {
  const [head, row] = whatIfCsv([WARNING]).split('\r\n');

  it('has a field for every head and leaves empty what is not told', () => {
    expect(head!.split(',')).toHaveLength(15);
    expect(row).toContain(',,,,,-0.0001,,,,,,material');
  });

  it('quotes what needs it and starts no formula', () => {
    expect(row).toMatch(/^'=TV 1,1000,,"Tarn, ""Valley""",/);
  });
});
