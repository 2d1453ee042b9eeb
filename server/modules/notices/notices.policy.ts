import { permission } from '#server/policy/permission.ts';
import { worksIn } from '#server/policy/user.ts';

/** The laboratory in whose name a notice is published, with whether this person may sign for it today. */
export interface NoticeSubject {
  issuerId: string;
  isAuthorised: boolean;
}

/** Publishing a notice: a signature, so for a signatory whose authorisation is in force (ISO/IEC 17025:2017, 6.2.6). */
export const publishNoticePermission = permission<NoticeSubject>(
  'notice:publish',
  (user, { issuerId, isAuthorised }) => isAuthorised && worksIn(user, issuerId, 'signatory'),
);
