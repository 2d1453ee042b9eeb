import { permission, type Permission } from '#server/policy/permission.ts';
import { readsInFull, worksIn, writesFor, type User } from '#server/policy/user.ts';

/** Whose calibration it is: who issued it, who entered it, and who holds the weights. */
export interface CalibrationSubject {
  revisionId: string;
  issuerId: string;
  registeredById: string;
  holderIds: readonly string[];
}

/** Opening an issued calibration: for those who read its issuer, its registrant or a holder in full. */
export const readCalibration = permission<CalibrationSubject>(
  'calibration:read',
  (user, subject) =>
    [subject.issuerId, subject.registeredById].some((id) => readsInFull(user, id)) ||
    subject.holderIds.some((id) => readsInFull(user, id)),
);

/**
 * Withdrawing: a signature, so for a signatory. Who issued a certificate withdraws the certificate, whoever entered it;
 * who entered another laboratory's withdraws the entry.
 */
export const withdrawCalibrationPermission = permission<CalibrationSubject>(
  'calibration:withdraw',
  (user, { issuerId, registeredById }) =>
    [issuerId, registeredById].some((id) => worksIn(user, id, 'signatory')),
);

/** A calibration with whether this person may sign for who entered it today. */
export interface SignedCalibrationSubject extends CalibrationSubject {
  isAuthorised: boolean;
}

/** Correcting: issuing a further revision, so as issuing (ISO/IEC 17025:2017, 6.2.6). */
export const correctCalibrationPermission = permission<SignedCalibrationSubject>(
  'calibration:correct',
  (user, { registeredById, isAuthorised }) => isAuthorised && worksIn(user, registeredById, 'signatory'),
);

/** Of a laboratory: beginning drafts for it and looking up references. */
export const draftCalibration = permission<{ laboratoryId: string }>(
  'calibration:draft',
  (user, { laboratoryId }) => writesFor(user, laboratoryId),
);

/** Looking up what a result may name as reference: for those who write drafts. */
export const findReferences = permission<{ laboratoryId: string }>(
  'reference:find',
  (user, { laboratoryId }) => writesFor(user, laboratoryId),
);

/** A draft, with whether this person may sign for its laboratory today. */
export interface DraftSubject {
  draftId: string;
  laboratoryId: string;
  isAuthorised: boolean;
}

export const readDraftPermission = permission<DraftSubject>('draft:read', (user, { laboratoryId }) =>
  readsInFull(user, laboratoryId),
);

export const writeDraftPermission = permission<DraftSubject>('draft:write', (user, { laboratoryId }) =>
  writesFor(user, laboratoryId),
);

/** Sending a draft to sign, taking it back or discarding it; a signatory sends back what is not complete. */
export const sendDraftPermission = permission<DraftSubject>(
  'draft:send',
  (user, { laboratoryId }) => writesFor(user, laboratoryId) || worksIn(user, laboratoryId, 'signatory'),
);

/** Issuing: a signatory whose authorisation to sign calibrations is in force (ISO/IEC 17025:2017, 6.2.6). */
export const issueCalibrationPermission = permission<DraftSubject>(
  'calibration:issue',
  (user, { laboratoryId, isAuthorised }) => isAuthorised && worksIn(user, laboratoryId, 'signatory'),
);

/** Abilities over no record in particular: whether the person may begin something somewhere. */
export function somewhere<Subject extends { laboratoryId: string }>(
  user: User,
  wanted: Permission<Subject>,
): Record<string, boolean> {
  const may =
    user.isRegistrar ||
    user.memberships.some(({ laboratoryId }) => wanted.allows(user, { laboratoryId } as Subject));
  return { [wanted.name]: may };
}
