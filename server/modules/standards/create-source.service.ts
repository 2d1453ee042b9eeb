import { insertRows } from '#server/db/base-model.ts';
import { inAct } from '#server/db/act.ts';
import { readRow } from '#server/db/read.ts';
import { newId, type Context } from '#server/http/context.ts';
import { fieldError } from '#server/http/app-error.ts';
import { sourceModel } from './standards.model.ts';

/** An effect shared by several values: a root with value 0 and its own standard uncertainty. */
export interface SourceInput {
  kind: 'volume' | 'air' | 'drift' | 'apparatus' | 'scale version';
  name: string;
  /** Standard uncertainty in `unit`. */
  u: number;
  /** cm3, kg/m3, g/a or g. */
  unit: string;
  standardId?: string | null;
  laboratoryId?: string | null;
  degreesOfFreedom?: number | null;
  /** Name of the variance estimate behind u; equal names count once. */
  estimate?: string | null;
  determinedOn?: string | null;
}

/**
 * Registers a shared effect that calibrations then lean on by its uid.
 * @throws AppError `unprocessable` where u is not a number above or at zero
 */
export async function createSource(
  context: Context,
  input: SourceInput,
): Promise<{ id: number; uid: string }> {
  if (!Number.isFinite(input.u) || input.u < 0) {
    throw fieldError('u', {
      message: 'A standard uncertainty is a number, zero or above.',
      received: String(input.u),
      expected: '0 or more',
    });
  }
  return inAct(context, { kind: 'source.create', laboratoryId: input.laboratoryId ?? null }, async (act) => {
    const [made] = await insertSources(context, [input]);
    if (!made) throw new Error('The source that was just made is not there');
    act.record({ subject: { type: 'source', id: made.uid }, after: { ...input, uid: made.uid } });
    return made;
  });
}

/** Inserts sources inside the open act. Ids are given out here: acts are serialised, so they follow commits. */
export async function insertSources(
  context: Context,
  inputs: SourceInput[],
): Promise<{ id: number; uid: string }[]> {
  if (inputs.length === 0) return [];
  const last = await readRow<{ id: number | null }>(context.database, 'SELECT MAX(id) AS id FROM source');
  const rows = inputs.map((input, at) => ({
    id: (last?.id ?? 0) + 1 + at,
    uid: newId(context),
    kind: input.kind,
    name: input.name,
    u: input.u,
    unit: input.unit,
    degreesOfFreedom: input.degreesOfFreedom ?? null,
    estimate: input.estimate ?? null,
    standardId: input.standardId ?? null,
    laboratoryId: input.laboratoryId ?? null,
    determinedOn: input.determinedOn ?? null,
  }));
  await insertRows(sourceModel(context.database), rows);
  return rows.map(({ id, uid }) => ({ id, uid }));
}
