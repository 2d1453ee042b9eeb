import { useQuery } from '@tanstack/react-query';
import { Button } from '#src/components/ui/button.tsx';
import { ApiProblem } from '#src/lib/api-problem.ts';
import { weightById } from '../api.ts';

interface UnknownWeightProps {
  standardId: string;
  /** Takes the weight out of the line, so that another can be named; null where the draft is only read. */
  onRemove: (() => void) | null;
}

/** A weight that a line names and the draft does not know: named as soon as it is read, or told why it is not. */
export function UnknownWeight({ standardId, onRemove }: UnknownWeightProps) {
  const { data, error, refetch } = useQuery({
    queryKey: ['draft weight', standardId],
    queryFn: ({ signal }) => weightById(standardId, signal),
    retry: false,
  });
  const weight = data?.[0];
  if (weight) return <span className="text-ink-2">{weight.registryNo}</span>;
  if (!error) return <span className="text-ink-2">not loaded yet</span>;
  const isTheirs = !(error instanceof ApiProblem && [403, 404].includes(error.status));
  return (
    <span role="alert" className="flex max-w-44 flex-col items-start text-sm">
      {isTheirs
        ? 'This weight could not be read.'
        : 'This weight is not yours to open. Name a weight that your laboratory holds or keeps.'}
      {isTheirs && (
        <Button weight="text" onClick={() => void refetch()}>
          Try again
        </Button>
      )}
      {onRemove && (
        <Button weight="text" onClick={onRemove}>
          Name another
        </Button>
      )}
    </span>
  );
}
