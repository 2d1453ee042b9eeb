import { useSearchParams } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { LinkButton } from '#src/components/ui/button.tsx';
import { ChainChooser } from '#src/features/chains/components/chain-chooser.tsx';

/** Which chain to open. */
export function Component() {
  const [parameters, setParameters] = useSearchParams();
  const search = (q: string, isFailing: boolean) =>
    setParameters({ ...(q && { q }), ...(isFailing && { failing: '1' }) }, { replace: true });
  return (
    <ChainChooser
      q={parameters.get('q') ?? ''}
      isFailing={parameters.get('failing') === '1'}
      onSearch={search}
      hrefOf={paths.chain.href}
      actions={
        <>
          <LinkButton to={paths.together.href()}>Weights together</LinkButton>
          <LinkButton to={paths.whatIf.href()}>What if</LinkButton>
          <LinkButton to={paths.dryRuns.href()}>Dry runs kept</LinkButton>
        </>
      }
    />
  );
}
