import { createContext, useContext } from 'react';
import type { SessionResponse } from '#shared/contracts/identity.ts';

/** The signed-in person, with the roles held today. */
export type Person = NonNullable<SessionResponse['person']>;

/** Filled by the root layout, which lets nobody past without sign-in. */
export const PersonContext = createContext<Person | null>(null);

/** The person at work. Only for screens behind sign-in. */
export function usePerson(): Person {
  const person = useContext(PersonContext);
  if (!person) throw new Error('usePerson is for screens behind sign-in');
  return person;
}

/** The laboratories this person has any role in, each once. */
export function laboratoriesOf(person: Person): NonNullable<Person['roles'][number]['laboratory']>[] {
  const byId = new Map(
    person.roles.flatMap(({ laboratory }) => (laboratory ? [[laboratory.id, laboratory]] : [])),
  );
  return [...byId.values()];
}
