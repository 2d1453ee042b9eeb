import type { Model, ModelStatic } from 'sequelize';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import type { Recorded } from '#server/db/register-model.ts';
import { fieldError } from '#server/http/app-error.ts';
import { newId, type Context } from '#server/http/context.ts';
import {
  authorisationModel,
  laboratoryModel,
  policyVersionModel,
  recognitionModel,
  scaleVersionModel,
  scopeLineModel,
  type AuthorisationRow,
  type LaboratoryRow,
  type PolicyVersionRow,
  type RecognitionRow,
  type ScaleVersionRow,
  type ScopeLineRow,
} from './network.model.ts';

type New<Row> = Omit<Row, 'id'>;
type Made = Promise<{ id: string }>;

/**
 * Admits a laboratory to the register.
 * @throws AppError `duplicate` for a code that is taken
 */
export function createLaboratory(context: Context, laboratory: New<LaboratoryRow>): Made {
  return insertInAct(context, 'laboratory.create', null, laboratoryModel(context.database), laboratory);
}

/** Asserts how a laboratory's competence stands: granted, suspended or withdrawn, over some days. */
export function assertRecognition(context: Context, recognition: New<RecognitionRow>): Made {
  refuseReversedDays(recognition);
  const { laboratoryId } = recognition;
  return insertInAct(
    context,
    'recognition.assert',
    laboratoryId,
    recognitionModel(context.database),
    recognition,
  );
}

/** Asserts one line of a laboratory's scope over some days. */
export function assertScopeLine(context: Context, line: New<ScopeLineRow>): Made {
  refuseReversedDays(line);
  return insertInAct(context, 'scope.assert', line.laboratoryId, scopeLineModel(context.database), line);
}

/** Asserts that a person may sign for a laboratory over some days, or no longer may. */
export function assertAuthorisation(context: Context, authorisation: New<AuthorisationRow>): Made {
  refuseReversedDays(authorisation);
  const { laboratoryId } = authorisation;
  return insertInAct(
    context,
    'authorisation.assert',
    laboratoryId,
    authorisationModel(context.database),
    authorisation,
  );
}

/** Adds a version of the mass scale that values can be stated on. */
export function createScaleVersion(context: Context, version: New<ScaleVersionRow>): Made {
  refuseReversedDays(version);
  return insertInAct(context, 'scale.create', null, scaleVersionModel(context.database), version);
}

/** Puts an edition of a network policy into force. Its content is data: no policy is built in. */
export function adoptPolicy(context: Context, policy: New<PolicyVersionRow>): Made {
  refuseReversedDays(policy);
  return insertInAct(context, 'policy.adopt', null, policyVersionModel(context.database), policy);
}

/** One row, one act: what was asserted is what the act says. */
async function insertInAct<Row extends { id: string }>(
  context: Context,
  kind: `${string}.${string}`,
  laboratoryId: string | null,
  model: ModelStatic<Model<Row & Recorded, Row & Recorded>>,
  asserted: Omit<Row, 'id'>,
): Made {
  return inAct(context, { kind, laboratoryId }, async (act) => {
    const id = newId(context);
    await insertRow(model as ModelStatic<Model>, { ...asserted, id });
    act.record({ subject: { type: model.tableName, id }, after: asserted });
    return { id };
  });
}

function refuseReversedDays(assertion: { validFrom: string; validTo: string | null }): void {
  if (assertion.validTo === null || assertion.validTo >= assertion.validFrom) return;
  throw fieldError('validTo', {
    message: 'The last day lies before the first.',
    received: assertion.validTo,
    expected: `${assertion.validFrom} or later, or none`,
  });
}
