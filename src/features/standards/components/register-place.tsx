import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { paths } from '#src/app/paths.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import type { Choice } from '#src/components/ui/select-field.tsx';
import { usePerson } from '#src/lib/session.ts';
import { laboratoryChoicesQuery } from '../api.ts';

interface RegisterPlaceProps {
  /** The form, for the laboratories this person may register for. */
  children: (laboratories: Choice[]) => ReactNode;
}

/** The form of a registration, or at once why there is none: nobody fills a form that is refused at its end. */
export function RegisterPlace({ children }: RegisterPlaceProps) {
  const laboratories = useWritingFor();
  if (!laboratories) return null;
  if (laboratories.length > 0) return children(laboratories);
  return (
    <EmptyState action={<LinkButton to={paths.standards.href()}>Go to the standards</LinkButton>}>
      Weights are registered by a metrologist or the administrator of the laboratory that holds them. You have
      neither role today; the administrator of your laboratory gives it.
    </EmptyState>
  );
}

/** The laboratories for which this person writes, for the registrar all; null until they are read. The server decides again. */
function useWritingFor(): Choice[] | null {
  const { roles } = usePerson();
  const isRegistrar = roles.some(({ role }) => role === 'registrar');
  const { data } = useQuery({ ...laboratoryChoicesQuery, enabled: isRegistrar });
  if (isRegistrar) return data ? data.laboratories.map(({ id, name }) => ({ value: id, label: name })) : null;
  const writing = roles.filter(({ role }) => role === 'metrologist' || role === 'laboratory administrator');
  const byId = new Map(
    writing.flatMap(({ laboratory }) => (laboratory ? [[laboratory.id, laboratory]] : [])),
  );
  return [...byId.values()].map(({ id, name }) => ({ value: id, label: name }));
}
