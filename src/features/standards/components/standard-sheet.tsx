import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { SideSheet } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { standardQuery } from '../api.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { ShortFacts } from './short-facts.tsx';

interface StandardSheetProps {
  standardId: string;
  onClose: () => void;
  /** Where one can go from here. */
  actionsFor: (sheet: StandardResponse) => ReactNode;
}

/** One row of the list, opened beside it: the short facts and the ways on. */
export function StandardSheet({ standardId, onClose, actionsFor }: StandardSheetProps) {
  const { data, error, refetch } = useQuery(standardQuery(standardId));
  return (
    <SideSheet title={data ? titleOf(data) : 'Standard'} onClose={onClose}>
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Waiting>Reading the standard</Waiting>}
      {data && (
        <>
          <ShortFacts sheet={data} />
          <Toolbar>{actionsFor(data)}</Toolbar>
        </>
      )}
    </SideSheet>
  );
}

function titleOf({ standard }: StandardResponse): string {
  const nominal = nominalText(standard.nominal);
  return `${standard.registryNo}, ${nominal}${standard.class ? `, class ${standard.class}` : ''}`;
}
