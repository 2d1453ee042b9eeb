import { inAct, type Act } from '#server/db/act.ts';
import { insertRow, insertRows } from '#server/db/base-model.ts';
import { newId, today, type Context } from '#server/http/context.ts';
import { createScaleVersion } from '#server/modules/network/index.ts';
import { refuseNotice, type NoticeInput } from './notice-rules.ts';
import { noticeModel, noticeShiftModel, noticeTermModel } from './notices.model.ts';

/** A notice as it was recorded. */
export interface PublishedNotice {
  id: string;
  number: string;
  isBackDated: boolean;
  newScaleId: string | null;
}

/**
 * Publishes a notice, with the scale version it leads to where that is new, in one act. It is never changed; a later
 * notice may replace it.
 * @throws AppError `unprocessable` on the field that cannot be, `duplicate` for a number that is taken
 */
export async function publishNotice(context: Context, input: NoticeInput): Promise<PublishedNotice> {
  const { issuerId, reason } = input;
  return inAct(context, { kind: 'notice.publish', laboratoryId: issuerId, reason }, async (act) => {
    await refuseNotice(context, input);
    const newScale =
      input.newScale && (await createScaleVersion(context, { ...input.newScale, validTo: null }));
    const toScaleId = newScale?.id ?? input.toScaleId;
    return insertNotice(context, act, { ...input, toScaleId }, newScale?.id ?? null);
  });
}

async function insertNotice(
  context: Context,
  act: Act,
  { terms, newScale, madeKnownOn, ...notice }: NoticeInput,
  newScaleId: string | null,
): Promise<PublishedNotice> {
  const id = newId(context);
  const row = { ...notice, id, madeKnownOn: madeKnownOn ?? today(context) };
  await insertRow(noticeModel(context.database), row);
  await insertRows(
    noticeTermModel(context.database),
    terms.map(({ shiftPerKilogram: _, addedUPerKilogram: addedU, ...term }, n) => ({
      ...term,
      noticeId: id,
      n,
      addedU,
    })),
  );
  await insertRows(
    noticeShiftModel(context.database),
    terms.flatMap(({ shiftPerKilogram }, n) =>
      shiftPerKilogram.map(({ on, shift }) => ({ noticeId: id, n, performedOn: on, shift })),
    ),
  );
  const isBackDated = row.effectiveOn < row.madeKnownOn;
  act.record({
    subject: { type: 'notice', id },
    after: { ...row, terms, newScale: newScale && { id: newScaleId, ...newScale }, isBackDated },
  });
  return { id, number: row.number, isBackDated, newScaleId };
}
