import { expect, it } from 'vitest';
import type { MendingPlace } from '#shared/rules/mending.ts';
import { mendingLink, type MendingPlaces } from './mending-link.ts';

const PLACES: MendingPlaces = {
  laboratory: { id: 'lab', name: 'Laboratory' },
  isOurs: true,
  standardId: 'weight',
  revisionId: 'sheet',
  reference: { standardId: 'reference', registryNo: 'RL 0001', revisionId: 'reference-sheet' },
};
const hrefOf = (place: MendingPlace, changes: Partial<MendingPlaces> = {}) =>
  mendingLink({ place, step: '' }, { ...PLACES, ...changes })?.href ?? null;

it('leads to a draft with weight, laboratory and reference filled in', () => {
  expect(hrefOf('new calibration')).toBe(
    '/calibrations/drafts/new?standard=weight&laboratory=lab&reference=RL+0001',
  );
  expect(hrefOf('new calibration', { reference: null })).toBe(
    '/calibrations/drafts/new?standard=weight&laboratory=lab',
  );
  expect(hrefOf('calibration of the reference')).toBe(
    '/calibrations/drafts/new?standard=reference&laboratory=lab',
  );
});

it('leads to what is on record', () => {
  expect(hrefOf('programme')).toBe('/standards/reference');
  expect(hrefOf('weight')).toBe('/standards/weight');
  expect(hrefOf('certificate')).toBe('/calibrations/sheet');
  expect(hrefOf('certificate of the reference')).toBe('/calibrations/reference-sheet');
  expect(hrefOf('laboratory')).toBe('/network/lab');
});

it('leads nowhere that is not open to the person, or not theirs to do', () => {
  expect(hrefOf('new calibration', { isOurs: false })).toBeNull();
  expect(
    hrefOf('calibration of the reference', { reference: { ...PLACES.reference!, standardId: null } }),
  ).toBeNull();
  expect(hrefOf('programme', { reference: null })).toBeNull();
  expect(hrefOf('certificate', { revisionId: null })).toBeNull();
  expect(hrefOf('chain')).toBeNull();
});
