import { createScaleVersion, assertAuthorisation } from '#server/modules/network/index.ts';
import { assertMembership } from '#server/modules/identity/index.ts';
import { publishNotice } from '#server/modules/notices/index.ts';
import { PublishNoticeBody } from '#shared/contracts/notices.ts';
import { makeLaboratory } from '#tests/support/factories.ts';
import type { Scene } from './scene.ts';

const ALWAYS = { state: 'granted', validFrom: '2000-01-01', validTo: null } as const;

/** What a notice of an institute would hold, of which home's signatory is a signatory as well. */
export async function noticeOf({ app, person }: Scene): Promise<Record<string, unknown>> {
  const institute = await makeLaboratory(app, 'national institute');
  const { accountId } = person('signatory');
  const membership = { accountId, laboratoryId: institute.id, ...ALWAYS };
  await assertMembership(app.context(), { ...membership, role: 'signatory' });
  await assertAuthorisation(app.context(), { ...membership, what: 'sign calibrations' });
  const scale = await createScaleVersion(app.context(), {
    name: `scale of ${institute.code}`,
    basis: 'its own realization',
    validFrom: '2016-01-01',
    validTo: null,
  });
  return {
    issuerId: institute.id,
    number: '1',
    kind: 'uncertainty added',
    title: 'An uncertainty is added',
    reason: 'The maintained unit was less stable than assumed.',
    fromScaleId: scale.id,
    effectiveOn: '2024-01-01',
    madeKnownOn: '2023-11-01',
    terms: [
      {
        shiftPerKilogram: [{ on: '2016-01-01', shift: '0' }],
        addedUPerKilogram: 0.00001,
        performedTo: '2023-12-31',
      },
    ],
  };
}

/** A published notice. */
export async function makeNotice(scene: Scene): Promise<{ id: string }> {
  const { password: _, ...input } = PublishNoticeBody.parse({ ...(await noticeOf(scene)), password: '-' });
  return publishNotice(scene.app.context(), input);
}
