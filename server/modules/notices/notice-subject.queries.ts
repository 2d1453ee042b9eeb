import { readRows } from '#server/db/read.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { isAuthorisedToSign } from '#server/modules/calibrations/index.ts';
import { publishNoticePermission, type NoticeSubject } from './notices.policy.ts';

interface Named {
  id: string;
  code: string;
  name: string;
}

/** What the permission asks of a laboratory. */
export async function noticeSubject(context: SignedInContext, issuerId: string): Promise<NoticeSubject> {
  return { issuerId, isAuthorised: await isAuthorisedToSign(context, issuerId) };
}

/** The national institutes in whose name this person may publish. */
export async function publishesFor(context: SignedInContext): Promise<Named[]> {
  const ids = context.user.memberships.flatMap(({ laboratoryId, role }) =>
    role === 'signatory' ? [laboratoryId] : [],
  );
  if (ids.length === 0) return [];
  const institutes = await readRows<Named>(
    context.database,
    "SELECT id, code, name FROM laboratory WHERE id IN (:ids) AND kind = 'national institute' ORDER BY code",
    { ids },
  );
  const subjects = await Promise.all(institutes.map(({ id }) => noticeSubject(context, id)));
  return institutes.filter((_, at) => publishNoticePermission.allows(context.user, subjects[at]!));
}
