import { PublishNoticeBody } from '#shared/contracts/notices.ts';
import { createScaleVersion } from '#server/modules/network/index.ts';
import { publishNotice, type PublishedNotice } from '#server/modules/notices/index.ts';
import type { z } from 'zod';
import { freeRegistryNo } from './factories.ts';
import type { TestApp } from './test-app.ts';

export type NoticeChanges = Partial<z.input<typeof PublishNoticeBody>>;

/** A version of the mass scale under a name that no other test uses. */
export async function makeScale(app: TestApp): Promise<{ id: string; name: string }> {
  const name = `scale ${freeRegistryNo()}`;
  const { id } = await createScaleVersion(app.context(), {
    name,
    basis: 'invented for a test',
    validFrom: '2000-01-01',
    validTo: null,
  });
  return { id, name };
}

/** A term that covers every value of its issuer; grams per kilogram. */
export function termOf(shift: string, addedUPerKilogram = 0) {
  return { shiftPerKilogram: [{ on: '2000-01-01', shift }], addedUPerKilogram };
}

/** What is sent to publish a notice of effect from 2025, made known in 2024. */
export function noticeBody(issuerId: string, fromScaleId: string, changes: NoticeChanges = {}) {
  return {
    issuerId,
    number: freeRegistryNo(),
    kind: 'unit correction' as const,
    title: 'The maintained unit is corrected',
    reason: 'A new comparison with the prototype.',
    fromScaleId,
    effectiveOn: '2025-01-01',
    madeKnownOn: '2024-11-01',
    terms: [termOf('-0.00002')],
    ...changes,
  };
}

/** Publishes as the product itself. */
export async function makeNotice(
  app: TestApp,
  issuerId: string,
  fromScaleId: string,
  changes: NoticeChanges = {},
): Promise<PublishedNotice> {
  const parsed = PublishNoticeBody.parse({ ...noticeBody(issuerId, fromScaleId, changes), password: '-' });
  const { password: _, ...input } = parsed;
  return publishNotice(app.context(), input);
}
