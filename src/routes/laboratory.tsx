import { useSuspenseQuery } from '@tanstack/react-query';
import { useParams, type LoaderFunctionArgs } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { laboratoryQuery } from '#src/features/network/api.ts';
import { LaboratoryPage } from '#src/features/network/components/laboratory-page.tsx';

/** Primes the laboratory while its module is still on the way. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...laboratoryQuery(params.laboratoryId!), staleTime: 5_000 });
  return null;
}

/** One laboratory; whoever sees its people reads its standards too. */
export function Component() {
  const { laboratoryId } = useParams();
  const { data } = useSuspenseQuery(laboratoryQuery(laboratoryId!));
  return (
    <LaboratoryPage
      sheet={data}
      actions={
        data.people && (
          <LinkButton to={`${paths.standards.href()}?laboratory=${data.laboratory.id}`}>
            Its standards
          </LinkButton>
        )
      }
    />
  );
}
