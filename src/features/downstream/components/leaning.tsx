import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { allRows } from '../all-rows.ts';
import { downstreamPage, downstreamQuery, downstreamRowsQuery } from '../api.ts';
import { leaningHeadline } from '../headlines.ts';
import { openedFrom } from '../opened-from.ts';
import { leaningCsv } from '../rows-csv.ts';
import type { DownstreamSearch } from '../search.ts';
import { LeaningTable } from './leaning-table.tsx';
import { SaveAllRows } from './save-all-rows.tsx';
import { WaitingForGraph } from './waiting-for-graph.tsx';

interface LeaningProps {
  uid: string;
  search: DownstreamSearch;
  onOpen: (key: string | undefined) => void;
}

/** Who leans on a value, fetched in groups first and row by row where a group is opened. */
export function Leaning({ uid, search, onOpen }: LeaningProps) {
  const asked = { day: search.day, known: search.known, by: search.by };
  const groups = useQuery({ ...downstreamQuery(uid, asked), placeholderData: keepPreviousData });
  const rows = useInfiniteQuery({
    ...downstreamRowsQuery(uid, asked, search.group ?? ''),
    enabled: search.group !== undefined,
  });
  if (groups.error) return <ErrorNotice error={groups.error} onRetry={() => void groups.refetch()} />;
  if (!groups.data)
    return <WaitingForGraph because={groups.failureReason}>Reading who leans on it</WaitingForGraph>;
  const { total, question } = groups.data;
  return (
    <Section title={leaningHeadline(total)}>
      {total.count === 0 ? (
        <EmptyState>
          On {question.day}, as known on {question.known}, no value in force leans on this one. A weight that
          is calibrated against it will stand here.
        </EmptyState>
      ) : (
        <>
          {total.warned > 0 && (
            <p className="text-ink-2">
              Weights of others are told as laboratory and weight only, once each. Values on certificates that
              one’s own laboratory issued are told in full, each calibration as a row of its own.
            </p>
          )}
          <LeaningTable
            groups={groups.data.groups}
            by={question.by}
            open={search.group}
            opened={openedFrom(rows)}
            onOpen={onOpen}
          />
          <SaveAllRows
            key={`${uid} ${JSON.stringify(asked)}`}
            name="who-leans-on-it.csv"
            total={total.count}
            pages={(signal) =>
              allRows(
                groups.data.groups.map(({ key }) => key),
                (group, cursor) => downstreamPage(uid, asked, { group, cursor, signal }),
              )
            }
            toCsv={leaningCsv}
          />
        </>
      )}
    </Section>
  );
}
