import type { StandardRegistration, RegisteredStandard } from './register-standard.service.ts';
import { insertRows } from '#server/db/base-model.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { insertSources } from './create-source.service.ts';
import { epochModel, factModel, programmeModel, propertyModel, standardModel } from './standards.model.ts';
import { volumeUncertainty } from './volume-source.ts';

/** A standard with its identifier already given out. */
export type NewStandard = StandardRegistration & { id: string; kind: string };

const DEFAULT_PROGRAMME = {
  method: 'fixed interval',
  justification: 'Stated by the holder at registration.',
};

/**
 * Inserts standards with all that belongs to them, inside the open act and in one statement per table: a set
 * of 25 costs hardly more than one weight. Without a day of coming into service the facts hold from today.
 */
export async function insertStandards(
  context: Context,
  standards: NewStandard[],
): Promise<RegisteredStandard[]> {
  const { database } = context;
  await insertRows(standardModel(database), standards.map(standardRow));
  const begin = (standard: NewStandard) => ({
    standardId: standard.id,
    validFrom: standard.inServiceFrom ?? today(context),
    validTo: null,
  });
  await insertRows(
    epochModel(database),
    standards.map((standard) => ({
      id: newId(context),
      standardId: standard.id,
      n: 1,
      reason: 'new',
      beginsOn: begin(standard).validFrom,
      lastGoodOn: null,
      note: null,
    })),
  );
  await insertRows(
    factModel(database),
    standards.flatMap((standard) =>
      factsOf(standard).map((fact) => ({ id: newId(context), ...begin(standard), ...fact })),
    ),
  );
  await insertRows(
    programmeModel(database),
    standards.flatMap((standard) => {
      if (standard.intervalMonths === null) return [];
      const { laboratoryId, intervalMonths } = standard;
      return [{ id: newId(context), ...begin(standard), laboratoryId, intervalMonths, ...DEFAULT_PROGRAMME }];
    }),
  );
  const volumeSources = await insertDensities(context, standards, begin);
  return standards.map(({ id, registryNo }) => ({
    id,
    registryNo,
    volumeSourceUid: volumeSources.get(id) ?? null,
  }));
}

function standardRow(standard: NewStandard) {
  return {
    id: standard.id,
    registryNo: standard.registryNo,
    kind: standard.kind,
    nominal: standard.nominal,
    marking: standard.marking,
    serial: standard.serial,
    manufacturer: standard.manufacturer,
    shape: standard.shape,
    material: standard.material,
    inServiceFrom: standard.inServiceFrom,
    laboratoryId: standard.laboratoryId,
  };
}

function factsOf(standard: NewStandard) {
  const laboratoryId = standard.laboratoryId;
  return [
    { kind: 'owner', laboratoryId, value: null },
    { kind: 'custodian', laboratoryId, value: null },
    { kind: 'state', laboratoryId: null, value: 'in service' },
    ...(standard.class ? [{ kind: 'class', laboratoryId: null, value: standard.class }] : []),
  ];
}

/** Densities as properties; those with U also as the shared effect of the volume. Gives its uid by standard. */
async function insertDensities(
  context: Context,
  standards: NewStandard[],
  begin: (standard: NewStandard) => { standardId: string; validFrom: string; validTo: null },
): Promise<Map<string, string>> {
  const dense = standards.flatMap((standard) =>
    standard.density ? [{ standard, density: standard.density }] : [],
  );
  const shared = dense.flatMap(({ standard, density: { value, expandedU, k } }) =>
    expandedU && k
      ? [{ standard, u: volumeUncertainty(standard.nominal, { kind: 'density', value, expandedU, k }) }]
      : [],
  );
  const sources = await insertSources(
    context,
    shared.map(({ standard, u }) => ({
      kind: 'volume',
      name: `Volume of ${standard.registryNo}`,
      u,
      unit: 'cm3',
      standardId: standard.id,
      laboratoryId: standard.laboratoryId,
    })),
  );
  const sourceOf = new Map(shared.map(({ standard }, at) => [standard.id, sources[at]]));
  await insertRows(
    propertyModel(context.database),
    dense.map(({ standard, density }) => ({
      id: newId(context),
      ...begin(standard),
      kind: 'density',
      ...density,
      note: null,
      sourceId: sourceOf.get(standard.id)?.id ?? null,
    })),
  );
  return new Map([...sourceOf].flatMap(([id, source]) => (source ? [[id, source.uid]] : [])));
}
