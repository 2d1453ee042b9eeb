import type { Person } from './session.ts';
import { writesFor } from './writes-for.ts';

/** Whether somebody may open the weights that a laboratory holds; the server decides again when it comes to it. */
export function opensHoldingsOf({ roles }: Person, holderId: string): boolean {
  return roles.some(({ role, laboratory }) => role === 'registrar' || laboratory?.id === holderId);
}

/**
 * The laboratory for which somebody may enter a new result of a weight: its holder, who also enters what others
 * calibrated. A draft of another laboratory would not know the weight.
 */
export function entersResultsFor(person: Person, holderId: string | null | undefined): string | null {
  return holderId && writesFor(person, holderId) ? holderId : null;
}
