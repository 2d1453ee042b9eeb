import type { z } from 'zod';
import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { issueCalibration, type IssuedCalibration } from '#server/modules/calibrations/index.ts';
import { registerStandard, type StandardRegistration } from '#server/modules/standards/index.ts';
import { freeRegistryNo } from './factories.ts';
import type { TestApp } from './test-app.ts';

type LineInput = z.input<typeof CalibrationLine>;
type Input = z.input<typeof CalibrationInput>;

/** A 1 kg weight of class E2 with a measured density. */
export async function makeStandard(
  app: TestApp,
  laboratoryId: string,
  changes: Partial<StandardRegistration> = {},
): Promise<{ id: string; registryNo: string; volumeSourceUid: string | null }> {
  return registerStandard(app.context(), {
    laboratoryId,
    registryNo: freeRegistryNo(),
    nominal: '1000',
    marking: '1 kg',
    serial: null,
    manufacturer: null,
    shape: 'knob',
    material: 'stainless steel',
    class: 'E2',
    density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' },
    inServiceFrom: '2020-01-01',
    intervalMonths: 24,
    ...changes,
  });
}

/** A line of 0.123 mg, U = 0.50 mg, k = 2; a recognized root unless it has references. */
export function lineOf(standardId: string, changes: Partial<LineInput> = {}): LineInput {
  return {
    standardId,
    quantity: 'conventional mass',
    deviation: '0.000123',
    reportedUnit: 'mg',
    reportedDecimals: 3,
    expandedU: '0.0005',
    reportedUDecimals: 2,
    k: '2',
    rootKind: changes.references ? null : 'recognized certificate',
    ...changes,
  };
}

/** A link of sensitivity 1, used on one day. */
export function useOf(valueUid: string, day: string, sensitivity = 1) {
  return { valueUid, sensitivity, usedBegin: day, usedEnd: day };
}

/** A calibration of one day, issued the same day, by the laboratory itself. */
export function inputOf(
  laboratoryId: string,
  day: string,
  lines: LineInput[],
  changes: Partial<Input> = {},
): Input {
  return {
    issuerId: laboratoryId,
    registeredById: laboratoryId,
    certificateNo: `C ${freeRegistryNo()}`,
    issuedOn: day,
    performedBegin: day,
    performedEnd: day,
    method: 'Substitution weighing',
    lines,
    ...changes,
  };
}

/** Issues `inputOf` as the product itself. */
export async function makeCalibration(
  app: TestApp,
  laboratoryId: string,
  day: string,
  lines: LineInput[],
  changes: Partial<Input> = {},
): Promise<IssuedCalibration> {
  return issueCalibration(app.context(), inputOf(laboratoryId, day, lines, changes));
}
