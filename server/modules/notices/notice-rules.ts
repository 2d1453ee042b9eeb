import { Decimal } from '#shared/decimal.ts';
import type { NoticeTerm, PublishNoticeBody } from '#shared/contracts/notices.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { AppError, fieldError } from '#server/http/app-error.ts';
import { today, type Context } from '#server/http/context.ts';

/** What a notice is published with, its signature taken off. */
export type NoticeInput = Omit<PublishNoticeBody, 'password'>;

/**
 * Refuses what cannot be a notice, field by field: asked inside the act, so that what is read is the newest.
 * @throws AppError `unprocessable` with the field, the value received and the way out; `duplicate` for a number
 */
export async function refuseNotice(context: Context, input: NoticeInput): Promise<void> {
  await refuseIssuer(context, input);
  await refuseNumber(context, input);
  refuseDays(context, input);
  await refuseScales(context, input);
  refuseTerms(input.terms);
  await refuseReplaced(context, input);
  await refuseSecond(context, input);
}

async function refuseIssuer(context: Context, { issuerId }: NoticeInput): Promise<void> {
  const issuer = await readRow<{ name: string; kind: string }>(
    context.database,
    'SELECT name, kind FROM laboratory WHERE id = :issuerId',
    { issuerId },
  );
  if (issuer?.kind === 'national institute') return;
  throw fieldError('issuerId', {
    message: issuer
      ? `${issuer.name} is a ${issuer.kind}: notices on the mass scale are published by the national institute.`
      : 'No laboratory of the register has this identifier.',
    received: issuerId,
    expected: 'a national institute',
  });
}

async function refuseNumber(context: Context, { issuerId, number }: NoticeInput): Promise<void> {
  const taken = await readRow<{ title: string }>(
    context.database,
    'SELECT title FROM notice WHERE issuer_id = :issuerId AND number = :number',
    { issuerId, number },
  );
  if (!taken) return;
  const message = `Notice ${number} is published already: "${taken.title}". Take the next number.`;
  throw new AppError('duplicate', message, { fields: { number: { message, received: number } } });
}

/** Of effect before it was made known: back-dated, and said. Made known in the future: nobody can have read it. */
function refuseDays(context: Context, { madeKnownOn }: NoticeInput): void {
  const day = today(context);
  if (madeKnownOn === undefined || madeKnownOn <= day) return;
  throw fieldError('madeKnownOn', {
    message: 'A notice is made known today or was in the past; the day it takes effect may lie ahead.',
    received: madeKnownOn,
    expected: `a day up to ${day}`,
  });
}

async function refuseScales(
  context: Context,
  { fromScaleId, toScaleId, newScale }: NoticeInput,
): Promise<void> {
  const rows = await readRows<{ id: string; name: string }>(
    context.database,
    'SELECT id, name FROM scale_version WHERE id IN (:fromScaleId, :toScaleId) OR name = :name',
    { fromScaleId, toScaleId: toScaleId ?? fromScaleId, name: newScale?.name ?? '' },
  );
  for (const [field, id] of Object.entries({ fromScaleId, toScaleId })) {
    if (id === null || rows.some((row) => row.id === id)) continue;
    throw fieldError(field, {
      message: 'No scale version of the register has this identifier. Choose one from the list.',
      received: id,
    });
  }
  if (fromScaleId === toScaleId) {
    throw fieldError('toScaleId', {
      message:
        'The notice leads from this scale version: name the one it leads to, or none where the scale stays.',
      received: toScaleId,
    });
  }
  if (newScale && rows.some((row) => row.name === newScale.name)) {
    throw fieldError('newScale.name', {
      message: 'A scale version has this name already. Choose it instead, or give the new one another name.',
      received: newScale.name,
    });
  }
}

function refuseTerms(terms: readonly NoticeTerm[]): void {
  for (const [at, term] of terms.entries()) {
    const isNothing = term.shiftPerKilogram.every(({ shift }) => new Decimal(shift).isZero());
    if (isNothing && term.addedUPerKilogram === 0) {
      throw fieldError(`terms.${at}.shiftPerKilogram`, {
        message:
          'These values get neither a shift nor an uncertainty. Give one of the two, or leave the line out.',
        received: '0',
      });
    }
    const other = terms.slice(0, at).findIndex((each) => overlaps(each, term));
    if (other === -1) continue;
    throw fieldError(`terms.${at}.performedFrom`, {
      message: `Some values are covered by line ${other + 1} already. Let days, nominals or quantities tell the lines apart.`,
      received: rangeText(term),
    });
  }
}

async function refuseReplaced(
  context: Context,
  { issuerId, replacesId, effectiveOn }: NoticeInput,
): Promise<void> {
  if (replacesId === null) return;
  const replaced = await readRow<{
    issuerId: string;
    number: string;
    effectiveOn: string;
    by: string | null;
  }>(
    context.database,
    `SELECT n.issuer_id AS issuerId, n.number, n.effective_on AS effectiveOn, r.number AS \`by\`
     FROM notice n LEFT JOIN notice r ON r.replaces_id = n.id WHERE n.id = :replacesId`,
    { replacesId },
  );
  const refuse = (message: string) => {
    throw fieldError('replacesId', { message, received: replaced?.number ?? replacesId });
  };
  if (!replaced) return refuse('No notice of the register has this identifier.');
  if (replaced.issuerId !== issuerId)
    return refuse('Another institute published this notice: only that one ends it.');
  if (replaced.by !== null) return refuse(`Notice ${replaced.by} has replaced it already. Replace that one.`);
  if (effectiveOn < replaced.effectiveOn) {
    throw fieldError('effectiveOn', {
      message: `Notice ${replaced.number} takes effect on ${replaced.effectiveOn}: what replaces it cannot before.`,
      received: effectiveOn,
      expected: `${replaced.effectiveOn} or later`,
    });
  }
}

interface StandingTerm {
  number: string;
  quantity: NoticeTerm['quantity'];
  performedFrom: string | null;
  performedTo: string | null;
  nominalFrom: string | null;
  nominalTo: string | null;
}

/** Two notices of one kind that start from one scale and cover the same values would be counted twice. */
async function refuseSecond(context: Context, input: NoticeInput): Promise<void> {
  const standing = await readRows<StandingTerm>(
    context.database,
    `SELECT n.number, t.quantity, t.performed_from AS performedFrom, t.performed_to AS performedTo,
       t.nominal_from AS nominalFrom, t.nominal_to AS nominalTo
     FROM notice n JOIN notice_term t ON t.notice_id = n.id
     LEFT JOIN notice r ON r.replaces_id = n.id
     WHERE n.issuer_id = :issuerId AND n.kind = :kind AND n.from_scale_id = :fromScaleId AND r.id IS NULL
       AND (:replacesId IS NULL OR n.id <> :replacesId)`,
    {
      issuerId: input.issuerId,
      kind: input.kind,
      fromScaleId: input.fromScaleId,
      replacesId: input.replacesId,
    },
  );
  for (const [at, term] of input.terms.entries()) {
    const other = standing.find((each) => overlaps(each, term));
    if (!other) continue;
    throw fieldError(`terms.${at}.performedFrom`, {
      message: `Notice ${other.number} of the same kind covers some of these values already, and they would be moved twice. Replace that notice, or narrow this one.`,
      received: rangeText(term),
    });
  }
}

type Range = Pick<NoticeTerm, 'quantity' | 'performedFrom' | 'performedTo' | 'nominalFrom' | 'nominalTo'>;

/** Whether some value could be covered by both. */
function overlaps(a: Range, b: Range): boolean {
  const isQuantity = a.quantity === null || b.quantity === null || a.quantity === b.quantity;
  const isDay = reaches(a.performedFrom, b.performedTo) && reaches(b.performedFrom, a.performedTo);
  const nominal = (text: string | null) => (text === null ? null : new Decimal(text).toNumber());
  const isNominal =
    reaches(nominal(a.nominalFrom), nominal(b.nominalTo)) &&
    reaches(nominal(b.nominalFrom), nominal(a.nominalTo));
  return isQuantity && isDay && isNominal;
}

function reaches<T extends string | number>(from: T | null, to: T | null): boolean {
  return from === null || to === null || from <= to;
}

function rangeText({ performedFrom, performedTo }: Range): string {
  return `${performedFrom ?? 'the beginning'} to ${performedTo ?? 'any day'}`;
}
