import type { Person } from './session.ts';

/** Whether somebody may begin a calibration in a laboratory's name; the server decides again when it comes to it. */
export function writesFor({ roles }: Person, laboratoryId: string): boolean {
  return roles.some(
    ({ role, laboratory }) =>
      role === 'registrar' ||
      (laboratory?.id === laboratoryId && (role === 'metrologist' || role === 'laboratory administrator')),
  );
}
