import { expect, it } from 'vitest';
import type { MendingPlace } from '#shared/rules/mending.ts';
import { mendingLink, type MendingPlaces } from './mending-link.ts';

const REFERENCE = {
  standardId: 'reference',
  registryNo: 'RL 0001',
  revisionId: 'reference-sheet',
  entersFor: 'lab',
};
const PLACES: MendingPlaces = {
  laboratory: { id: 'lab', name: 'Laboratory' },
  entersFor: 'lab',
  standardId: 'weight',
  revisionId: 'sheet',
  reference: REFERENCE,
};
const linkOf = (place: MendingPlace, changes: Partial<MendingPlaces> = {}) =>
  mendingLink({ place, step: '' }, { ...PLACES, ...changes });
const hrefOf = (...asked: Parameters<typeof linkOf>) => linkOf(...asked)?.href ?? null;

it('leads to a draft with weight, laboratory, issuer and reference filled in', () => {
  expect(hrefOf('new calibration')).toBe(
    '/calibrations/drafts/new?standard=weight&laboratory=lab&issuer=lab&reference=RL+0001',
  );
  expect(hrefOf('new calibration', { reference: null })).toBe(
    '/calibrations/drafts/new?standard=weight&laboratory=lab&issuer=lab',
  );
  expect(hrefOf('calibration of the reference')).toBe(
    '/calibrations/drafts/new?standard=reference&laboratory=lab',
  );
});

it('leads the holder of a weight that another laboratory calibrates to its next certificate', () => {
  expect(linkOf('new calibration', { entersFor: 'holder' })).toEqual({
    href: '/calibrations/drafts/new?standard=weight&laboratory=holder&issuer=lab',
    label: 'Enter the new certificate of Laboratory',
  });
});

it('leads to what is on record', () => {
  expect(hrefOf('programme')).toBe('/standards/reference');
  expect(hrefOf('weight')).toBe('/standards/weight');
  expect(hrefOf('certificate')).toBe('/calibrations/sheet');
  expect(hrefOf('certificate of the reference')).toBe('/calibrations/reference-sheet');
  expect(hrefOf('laboratory')).toBe('/network/lab');
});

it('leads nowhere that is not open to the person, or not theirs to do', () => {
  expect(hrefOf('new calibration', { entersFor: null })).toBeNull();
  expect(hrefOf('new calibration', { standardId: null })).toBeNull();
  expect(
    hrefOf('calibration of the reference', { reference: { ...REFERENCE, standardId: null } }),
  ).toBeNull();
  expect(hrefOf('calibration of the reference', { reference: { ...REFERENCE, entersFor: null } })).toBeNull();
  expect(hrefOf('programme', { reference: null })).toBeNull();
  expect(hrefOf('certificate', { revisionId: null })).toBeNull();
  expect(hrefOf('chain')).toBeNull();
});
