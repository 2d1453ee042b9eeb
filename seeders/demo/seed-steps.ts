import type { z } from 'zod';
import type { CalibrationInput } from '#shared/contracts/calibration-input.ts';
import type { Context } from '#server/http/context.ts';
import {
  issueCalibration,
  reviseCalibration,
  withdrawCalibration,
} from '#server/modules/calibrations/index.ts';
import { assertScopeLine } from '#server/modules/network/index.ts';
import { assertProperty, openEpoch, registerSet, registerStandard } from '#server/modules/standards/index.ts';
import type { PlannedCertificate, Step } from './plan.ts';
import { scopeLines, type Admitted } from './seed-network.ts';
import type { Weight } from './weight.ts';

/** Does one step of the plan through the services. */
export async function runStep(context: Context, step: Step, admitted: Admitted): Promise<void> {
  switch (step.does) {
    case 'register set':
      return addSet(context, step, admitted);
    case 'register weight':
      return addWeight(context, step.weight, admitted);
    case 'open epoch': {
      const { reason, note, day } = step;
      const standardId = known(admitted.standardIds, step.registryNo);
      await openEpoch(context, standardId, { reason, note, beginsOn: day, lastGoodOn: null });
      return;
    }
    case 'state property': {
      const standardId = known(admitted.standardIds, step.registryNo);
      await assertProperty(context, { standardId, ...step.property, validFrom: step.day });
      return;
    }
    case 'issue':
      return issue(context, step.certificate, step.keys, admitted);
    case 'revise':
      return revise(context, step, admitted);
    case 'withdraw': {
      const { revisionId } = known(admitted.calibrations, step.certificateNo);
      await withdrawCalibration(context, revisionId, { reason: step.reason, effectiveOn: step.effectiveOn });
      return;
    }
    case 'suspend scope':
      return suspendScope(context, step, admitted);
  }
}

function known<T>(map: ReadonlyMap<string, T>, key: string): T {
  const found = map.get(key);
  if (found === undefined) throw new Error(`The plan names ${key} before it is in the register`);
  return found;
}

async function addSet(
  context: Context,
  step: Extract<Step, { does: 'register set' }>,
  admitted: Admitted,
): Promise<void> {
  const [first] = step.weights;
  if (!first) return;
  const set = await registerSet(context, {
    laboratoryId: known(admitted.laboratoryIds, first.owner),
    registryNo: step.registryNo,
    name: step.name,
    manufacturer: null,
    inServiceFrom: first.inServiceFrom,
    intervalMonths: first.intervalMonths,
    members: step.weights.map(weightBody),
  });
  for (const member of set.members) remember(member, admitted);
}

async function addWeight(context: Context, weight: Weight, admitted: Admitted): Promise<void> {
  const registered = await registerStandard(context, {
    ...weightBody(weight),
    laboratoryId: known(admitted.laboratoryIds, weight.owner),
    registryNo: weight.registryNo,
    manufacturer: null,
    inServiceFrom: weight.inServiceFrom,
    intervalMonths: weight.intervalMonths,
    kind: weight.kind,
  });
  remember(registered, admitted);
}

function weightBody({ nominal, marking, serial, shape, material, class: weightClass, density }: Weight) {
  const stated = density && { ...density, k: '2' };
  return { nominal, marking, serial, shape, material, class: weightClass, density: stated };
}

function remember(
  { id, registryNo, volumeSourceUid }: { id: string; registryNo: string; volumeSourceUid: string | null },
  admitted: Admitted,
): void {
  admitted.standardIds.set(registryNo, id);
  if (volumeSourceUid) admitted.sourceUids.set(`V:${registryNo}`, volumeSourceUid);
}

async function issue(
  context: Context,
  certificate: PlannedCertificate,
  keys: readonly string[],
  admitted: Admitted,
): Promise<void> {
  const { calibrationId, revisionId, valueUids } = await issueCalibration(
    context,
    inputOf(certificate, admitted),
    signerOf(certificate, admitted),
  );
  admitted.calibrations.set(certificate.certificateNo, { calibrationId, revisionId });
  for (const [at, key] of keys.entries()) admitted.valueUids.set(key, valueUids[at]!);
}

function signerOf({ issuer, signedBy }: PlannedCertificate, admitted: Admitted): string | null {
  if (signedBy === 'metrologist') return known(admitted.metrologistIds, issuer);
  return admitted.signatories.get(issuer)?.accountId ?? null;
}

async function revise(
  context: Context,
  { certificate, reason, effectiveOn, keys }: Extract<Step, { does: 'revise' }>,
  admitted: Admitted,
): Promise<void> {
  const { calibrationId } = known(admitted.calibrations, certificate.certificateNo);
  const input = { ...inputOf(certificate, admitted), calibrationId, reason, effectiveOn };
  const signer = signerOf(certificate, admitted);
  const { revisionId, valueUids } = await reviseCalibration(context, input, signer);
  admitted.calibrations.set(certificate.certificateNo, { calibrationId, revisionId });
  for (const [at, key] of keys.entries()) admitted.valueUids.set(key, valueUids[at]!);
}

function inputOf(certificate: PlannedCertificate, admitted: Admitted): z.input<typeof CalibrationInput> {
  const { issuer, registeredBy, signedBy: _, lines, ...rest } = certificate;
  return {
    ...rest,
    issuerId: known(admitted.laboratoryIds, issuer),
    registeredById: known(admitted.laboratoryIds, registeredBy),
    lines: lines.map(({ registryNo, scale, references, sources, ...line }) => ({
      ...line,
      standardId: known(admitted.standardIds, registryNo),
      scaleVersionId: scale === null ? null : known(admitted.scaleIds, scale),
      references: references.map(({ value, ...used }) => ({
        ...used,
        valueUid: known(admitted.valueUids, value),
      })),
      sources: sources.map(({ source, sensitivity }) => ({
        sourceUid: known(admitted.sourceUids, source),
        sensitivity,
      })),
    })),
  };
}

/** The whole scope rests for some days; afterwards the earlier assertion holds again. */
async function suspendScope(
  context: Context,
  { laboratory, from, to }: Extract<Step, { does: 'suspend scope' }>,
  admitted: Admitted,
): Promise<void> {
  const laboratoryId = known(admitted.laboratoryIds, laboratory);
  for (const line of scopeLines(laboratory)) {
    const days = { state: 'suspended', validFrom: from, validTo: to } as const;
    await assertScopeLine(context, { laboratoryId, ...line, ...days });
  }
}
