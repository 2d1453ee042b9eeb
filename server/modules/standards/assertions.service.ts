import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { insertSources } from './create-source.service.ts';
import { standardSubject } from './standard-laboratory.queries.ts';
import { factModel, programmeModel, propertyModel } from './standards.model.ts';
import { volumeUncertainty } from './volume-source.ts';

/** The days of the world an assertion covers; no `validTo` is an open end. */
interface Covered {
  validFrom: string;
  validTo?: string | null;
}

export interface FactInput extends Covered {
  standardId: string;
  kind: 'owner' | 'custodian' | 'class' | 'state';
  /** For owner and custodian. */
  laboratoryId?: string | null;
  /** For class and state. */
  value?: string | null;
}

export interface PropertyInput extends Covered {
  standardId: string;
  kind: 'density' | 'volume' | 'susceptibility' | 'polarisation';
  /** kg/m3, cm3, 1 or uT, as text. */
  value: string;
  expandedU?: string | null;
  k?: string | null;
  origin: 'measured' | 'assumed' | 'manufacturer';
  note?: string | null;
}

export interface ProgrammeInput extends Covered {
  standardId: string;
  laboratoryId: string;
  intervalMonths: number;
  method: string;
  justification: string;
}

/**
 * Asserts who owns or keeps a standard, its class or its state, for days of the world. The assertion recorded
 * last wins on the days it covers; earlier ones stay for the questions of earlier days.
 * @throws AppError `not-found` for the standard, `unprocessable` on validTo
 */
export async function assertFact(context: Context, input: FactInput): Promise<{ id: string }> {
  refuseEmptyStretch(input);
  const subject = await standardSubject(context.database, input.standardId, today(context));
  return inAct(context, { kind: 'standard.state', laboratoryId: subject.ownerId }, async (act) => {
    const row = {
      id: newId(context),
      standardId: input.standardId,
      kind: input.kind,
      laboratoryId: input.laboratoryId ?? null,
      value: input.value ?? null,
      validFrom: input.validFrom,
      validTo: input.validTo ?? null,
    };
    await insertRow(factModel(context.database), row);
    act.record({ subject: { type: 'standard', id: input.standardId }, after: row });
    return { id: row.id };
  });
}

/**
 * Asserts a property of a standard. A density or volume with U also becomes the shared effect that its own
 * calibration and its uses as reference lean on.
 * @returns the uid of that effect, or null
 * @throws AppError `not-found` for the standard, `unprocessable` on k or validTo
 */
export async function assertProperty(
  context: Context,
  input: PropertyInput,
): Promise<{ id: string; sourceUid: string | null }> {
  refuseEmptyStretch(input);
  const subject = await standardSubject(context.database, input.standardId, today(context));
  return inAct(context, { kind: 'standard.property', laboratoryId: subject.ownerId }, async (act) => {
    const source = await volumeSourceOf(context, input, subject);
    const row = {
      id: newId(context),
      standardId: input.standardId,
      kind: input.kind,
      value: input.value,
      expandedU: input.expandedU ?? null,
      k: input.k ?? null,
      origin: input.origin,
      note: input.note ?? null,
      sourceId: source?.id ?? null,
      validFrom: input.validFrom,
      validTo: input.validTo ?? null,
    };
    await insertRow(propertyModel(context.database), row);
    act.record({ subject: { type: 'standard', id: input.standardId }, after: row });
    return { id: row.id, sourceUid: source?.uid ?? null };
  });
}

/**
 * Asserts a laboratory's own rule for how long it relies on a calibration of this standard.
 * @throws AppError `not-found` for the standard, `unprocessable` on validTo
 */
export async function assertProgramme(context: Context, input: ProgrammeInput): Promise<{ id: string }> {
  refuseEmptyStretch(input);
  await standardSubject(context.database, input.standardId, today(context));
  return inAct(context, { kind: 'standard.programme', laboratoryId: input.laboratoryId }, async (act) => {
    const row = { ...input, id: newId(context), validTo: input.validTo ?? null };
    await insertRow(programmeModel(context.database), row);
    act.record({ subject: { type: 'standard', id: input.standardId }, after: row });
    return { id: row.id };
  });
}

async function volumeSourceOf(
  context: Context,
  input: PropertyInput,
  subject: { nominal: string; registryNo: string; ownerId: string },
): Promise<{ id: number; uid: string } | undefined> {
  const { kind, value, expandedU, k } = input;
  if ((kind !== 'density' && kind !== 'volume') || !expandedU) return undefined;
  if (!k) {
    throw fieldError('k', {
      message: 'Give the coverage factor: without k this U cannot be used.',
      received: 'nothing',
      expected: 'k as printed, usually 2',
      clause: 'JCGM 100:2008, 6.3.1',
    });
  }
  const [source] = await insertSources(context, [
    {
      kind: 'volume',
      name: `Volume of ${subject.registryNo}`,
      u: volumeUncertainty(subject.nominal, { kind, value, expandedU, k }),
      unit: 'cm3',
      standardId: input.standardId,
      laboratoryId: subject.ownerId,
      determinedOn: input.origin === 'measured' ? input.validFrom : null,
    },
  ]);
  return source;
}

function refuseEmptyStretch({ validFrom, validTo }: Covered): void {
  if (!validTo || validTo >= validFrom) return;
  throw fieldError('validTo', {
    message: 'The stretch ends before it begins.',
    received: validTo,
    expected: `${validFrom} or later`,
  });
}
