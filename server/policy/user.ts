/** What a person may be in one laboratory. */
export type LaboratoryRole = 'laboratory administrator' | 'metrologist' | 'signatory' | 'reader';

/** The person behind a request, with the roles they hold today. Read anew for each request. */
export interface User {
  accountId: string;
  name: string;
  email: string;
  isRegistrar: boolean;
  isPilot: boolean;
  memberships: { laboratoryId: string; role: LaboratoryRole }[];
  /** Laboratories opened to this assessor by a dated grant that covers today. */
  assessedLaboratoryIds: string[];
}

/** Whether the person belongs to the laboratory, in one of the roles where any are named. */
export function worksIn(user: User, laboratoryId: string, ...roles: LaboratoryRole[]): boolean {
  return user.memberships.some(
    (membership) =>
      membership.laboratoryId === laboratoryId && (roles.length === 0 || roles.includes(membership.role)),
  );
}

/** Whether the person writes in the laboratory's name: its metrologists and administrators, and the registrar. */
export function writesFor(user: User, laboratoryId: string): boolean {
  return user.isRegistrar || worksIn(user, laboratoryId, 'metrologist', 'laboratory administrator');
}

/** Whether the person reads this laboratory's holdings in full: its own people, its assessor, the registrar. */
export function readsInFull(user: User, laboratoryId: string): boolean {
  return user.isRegistrar || worksIn(user, laboratoryId) || user.assessedLaboratoryIds.includes(laboratoryId);
}

/** The laboratories this person reads in full; `null` stands for all of them. */
export function readableLaboratoryIds(user: User): string[] | null {
  if (user.isRegistrar) return null;
  return [...new Set([...user.memberships.map((m) => m.laboratoryId), ...user.assessedLaboratoryIds])];
}
