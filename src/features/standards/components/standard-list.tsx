import type { ReactNode } from 'react';
import type { StandardListResponse, StandardResponse } from '#shared/contracts/standards.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import type { Choice } from '#src/components/ui/select-field.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { isNarrowed, type ListSearch } from '../list-search.ts';
import { StandardFilters } from './standard-filters.tsx';
import { StandardSheet } from './standard-sheet.tsx';
import { StandardTable } from './standard-table.tsx';

interface StandardListProps {
  pages: readonly StandardListResponse[];
  search: ListSearch;
  onChange: (change: Partial<ListSearch>) => void;
  laboratories: readonly Choice[];
  hrefOf: (standardId: string) => string;
  /** Asks for the next page; left out when there is none. */
  onMore?: (() => void) | undefined;
  isFetchingMore: boolean;
  /** Why the next page could not be read. */
  error: Error | null;
  /** Ways to register, for those who may. */
  registerActions: ReactNode;
  actionsFor: (sheet: StandardResponse) => ReactNode;
}

/** The standards this person reads in full. */
export function StandardList(props: StandardListProps) {
  const { pages, search, onChange, laboratories, hrefOf, onMore, registerActions } = props;
  const rows = pages.flatMap((page) => page.standards);
  return (
    <Page
      title="Standards"
      sub={countText(rows.length, pages[0])}
      value={registerActions && <Actions>{registerActions}</Actions>}
    >
      <StandardFilters search={search} laboratories={laboratories} onChange={onChange} />
      {rows.length > 0 ? (
        <StandardTable rows={rows} search={search} onSort={(sort) => onChange({ sort })} hrefOf={hrefOf} />
      ) : (
        <Empty search={search} onChange={onChange} registerActions={registerActions} />
      )}
      {props.error && <ErrorNotice error={props.error} onRetry={onMore} />}
      {onMore && (
        <div>
          <Button isBusy={props.isFetchingMore} onClick={onMore}>
            Show more
          </Button>
        </div>
      )}
      {search.open && (
        <StandardSheet
          standardId={search.open}
          onClose={() => onChange({ open: undefined })}
          actionsFor={props.actionsFor}
        />
      )}
    </Page>
  );
}

function Actions({ children }: { children: ReactNode }) {
  return (
    <span className="font-sans text-base">
      <Toolbar label="Register">{children}</Toolbar>
    </span>
  );
}

/** "50 of 640 standards"; beyond ten thousand nobody counts. */
function countText(shown: number, first: StandardListResponse | undefined): ReactNode {
  const all = formatDecimal(String(first?.count ?? 0)) + (first?.isCountExact === false ? '+' : '');
  const noun = first?.count === 1 && first.isCountExact ? 'standard' : 'standards';
  return (
    <span role="status">
      {shown === first?.count && first.isCountExact
        ? `${all} ${noun}`
        : `${formatDecimal(String(shown))} of ${all} ${noun}`}
    </span>
  );
}

function Empty({
  search,
  onChange,
  registerActions,
}: Pick<StandardListProps, 'search' | 'onChange' | 'registerActions'>) {
  if (!isNarrowed(search)) {
    return (
      <EmptyState action={registerActions && <Toolbar>{registerActions}</Toolbar>}>
        {registerActions
          ? 'The weights of your laboratory stand here, each with its value in force. Register one, or a whole set at once.'
          : 'The weights of the laboratories you read in full stand here, each with its value in force. There are none today.'}
      </EmptyState>
    );
  }
  const clear = { q: undefined, laboratory: undefined, class: undefined, kind: undefined };
  return (
    <EmptyState
      action={
        <Button
          onClick={() =>
            onChange({ ...clear, standing: undefined, nominalFrom: undefined, nominalTo: undefined })
          }
        >
          Show all standards
        </Button>
      }
    >
      No standard of the laboratories you read fits all of these.
    </EmptyState>
  );
}
