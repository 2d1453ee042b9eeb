import type { Abilities } from '#shared/contracts/common.ts';

/**
 * Whether this person may do something with a record, by the abilities the server sent with it. Screens show or
 * hide by this, never by the name of a role; the server decides again when it comes to the act.
 * @param ability the permission's name, for example `standard:update`
 */
export function can(record: { abilities?: Abilities } | null | undefined, ability: string): boolean {
  return record?.abilities?.[ability] ?? false;
}
