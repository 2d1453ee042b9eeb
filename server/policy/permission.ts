import { AppError } from '#server/http/app-error.ts';
import type { User } from './user.ts';

/**
 * A named permission over a kind of subject. Each module declares its own in `<module>.policy.ts`; a route
 * cannot be declared without one.
 */
export interface Permission<Subject> {
  readonly name: string;
  /** True for the few routes that answer without sign-in. */
  readonly isPublic: boolean;
  allows(user: User, subject: Subject): boolean;
}

/** Declares a permission, `<noun>:<verb>`. */
export function permission<Subject>(
  name: `${string}:${string}`,
  allows: (user: User, subject: Subject) => boolean,
): Permission<Subject> {
  return { name, isPublic: false, allows };
}

/** The explicit absence of a permission: anyone may ask, signed in or not. */
export const anyone: Permission<void> = { name: 'anyone', isPublic: true, allows: () => true };

/** Any signed-in person; what they see is narrowed by the query, not by the door. */
export const signedIn: Permission<void> = { name: 'signed-in', isPublic: false, allows: () => true };

/**
 * Refuses what the person may not do.
 * @throws AppError `not-permitted`
 */
export function authorize<Subject>(user: User, wanted: Permission<Subject>, subject: Subject): void {
  if (!wanted.allows(user, subject)) {
    throw new AppError('not-permitted', `Your roles do not include "${wanted.name}" here.`);
  }
}

/** The abilities sent with a record: what this person may do with it, by permission name. */
export function abilitiesFor<Subject>(
  user: User,
  subject: Subject,
  permissions: readonly Permission<Subject>[],
): Record<string, boolean> {
  return Object.fromEntries(permissions.map((wanted) => [wanted.name, wanted.allows(user, subject)]));
}
