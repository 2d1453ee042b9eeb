import { useSuspenseQuery } from '@tanstack/react-query';
import { useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router';
import { QuantityKind } from '#shared/contracts/common.ts';
import { paths } from '#src/app/paths.ts';
import { queryClient } from '#src/app/query-client.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { standardQuery } from '#src/features/standards/api.ts';
import { StandardPage } from '#src/features/standards/components/standard-page.tsx';
import { can } from '#src/lib/abilities.ts';

/** Primes the standard while its module is still on the way. */
export async function loader({ params }: LoaderFunctionArgs): Promise<null> {
  await queryClient.query({ ...standardQuery(params.standardId!), staleTime: 5_000 });
  return null;
}

/** One standard; which of its quantities is drawn stands in the address. */
export function Component() {
  const { standardId } = useParams();
  const [parameters, setParameters] = useSearchParams();
  const { data } = useSuspenseQuery(standardQuery(standardId!));
  const asked = QuantityKind.safeParse(parameters.get('quantity')).data;
  const known = asked && data.history.some((value) => value.quantity === asked) ? asked : undefined;
  const { value } = data.standard;
  const canChange = can(data, 'standard:change');
  return (
    <StandardPage
      sheet={data}
      quantity={known ?? value?.quantity ?? data.history.at(-1)?.quantity ?? 'conventional mass'}
      onQuantity={(quantity) => setParameters({ quantity }, { replace: true, preventScrollReset: true })}
      actions={
        <>
          {value && (
            <LinkButton weight="primary" to={paths.chain.href(value.uid)}>
              Open the chain
            </LinkButton>
          )}
          {value && <LinkButton to={paths.exposure.href(data.standard.id)}>Exposure</LinkButton>}
          {canChange && (
            <LinkButton weight={value ? 'plain' : 'primary'} to={paths.newDraft.href(data.standard.id)}>
              Record a calibration
            </LinkButton>
          )}
        </>
      }
    />
  );
}
