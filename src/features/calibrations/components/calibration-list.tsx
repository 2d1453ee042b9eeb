import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { paths } from '#src/app/paths.ts';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { can } from '#src/lib/abilities.ts';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { calibrationListQuery } from '../api.ts';
import { changeListSearch, isNarrowed, type ListSearch } from '../list-search.ts';
import { CalibrationPeek } from './calibration-peek.tsx';
import { CalibrationTable } from './calibration-table.tsx';
import { DraftTable } from './draft-table.tsx';
import { ListFilters } from './list-filters.tsx';

interface CalibrationListProps {
  search: ListSearch;
  onSearch: (change: Partial<ListSearch>) => void;
}

/** Every calibration this person may open, narrowed and sorted as the address says; drafts stand above. */
export function CalibrationList({ search, onSearch }: CalibrationListProps) {
  const { data, hasNextPage, isFetchingNextPage, fetchNextPage } = useSuspenseInfiniteQuery(
    calibrationListQuery(search),
  );
  const [first] = data.pages;
  const rows = data.pages.flatMap((page) => page.calibrations);
  const mayDraft = can(first, 'calibration:draft');
  const newLink = (
    <LinkButton to={paths.newDraft.href()} weight="primary">
      New, from a certificate
    </LinkButton>
  );
  const closed = changeListSearch(search, { open: undefined });

  async function showMore(): Promise<void> {
    const { data: more } = await fetchNextPage();
    const at = rows.length;
    onSearch({ pages: more?.pages.length });
    // The keyboard goes on where the new rows begin.
    requestAnimationFrame(() =>
      document.querySelectorAll<HTMLElement>('#calibrations [data-row]')[at]?.focus(),
    );
  }

  return (
    <Page title="Calibrations" value={mayDraft && <span className="font-sans text-base">{newLink}</span>}>
      {first && first.drafts.length > 0 && !isNarrowed(search) && (
        <Section title="Drafts" note="of your laboratories">
          <DraftTable drafts={first.drafts} />
        </Section>
      )}
      <Section
        title="Issued"
        note={first && `${formatDecimal(String(first.count))}${first.isCountExact ? '' : ' or more'}`}
      >
        <ListFilters search={search} onSearch={onSearch} />
        {rows.length > 0 ? (
          <div id="calibrations" className="pt-2">
            <CalibrationTable rows={rows} search={search} onSearch={onSearch} />
          </div>
        ) : isNarrowed(search) ? (
          <EmptyState
            action={
              <Button
                onClick={() =>
                  onSearch({
                    q: undefined,
                    laboratory: undefined,
                    issuedFrom: undefined,
                    issuedTo: undefined,
                    state: undefined,
                  })
                }
              >
                Show all
              </Button>
            }
          >
            No calibration fits. Search by part of a certificate number, or by the number or marking of a
            weight.
          </EmptyState>
        ) : (
          <EmptyState action={mayDraft && newLink}>
            Issued calibrations stand here: those your laboratories issued or entered, and those of weights
            they hold.{mayDraft && ' The first one is copied from its certificate.'}
          </EmptyState>
        )}
        {hasNextPage && (
          <div className="pt-2">
            <Button isBusy={isFetchingNextPage} onClick={() => void showMore()}>
              Show more
            </Button>
          </div>
        )}
      </Section>
      {search.open && (
        <CalibrationPeek revisionId={search.open} onClose={() => onSearch({ open: closed.open })} />
      )}
    </Page>
  );
}
