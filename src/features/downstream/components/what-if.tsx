import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import type { WhatIfChange, WhatIfResponse, WhatIfSort } from '#shared/contracts/downstream.ts';
import { OTHERS_BEYOND } from '../search.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { allRows } from '../all-rows.ts';
import { suppositionOf, whatIfPage, whatIfQuery, whatIfRowsQuery } from '../api.ts';
import { GROUPED_BY, groupName } from '../groups.ts';
import { whatIfHeadline } from '../headlines.ts';
import { openedFrom } from '../opened-from.ts';
import { roundedText } from '../rounded.ts';
import { groupsCsv, whatIfCsv } from '../rows-csv.ts';
import { saveText } from '../save-text.ts';
import type { AskedOfRows } from '../what-if-search.ts';
import { SaveAllRows } from './save-all-rows.tsx';
import { columnsOf } from './what-if-columns.tsx';
import { WhatIfTable } from './what-if-table.tsx';
import { WaitingForGraph } from './waiting-for-graph.tsx';

interface WhatIfProps {
  changes: WhatIfChange[];
  search: AskedOfRows;
  onOpen: (key: string | undefined) => void;
  onSort: (sort: WhatIfSort) => void;
}

/** What changes would do, fetched in groups first and row by row where a group is opened. */
export function WhatIf({ changes, search, onOpen, onSort }: WhatIfProps) {
  const asked = suppositionOf(changes, search);
  const answer = useQuery({ ...whatIfQuery(asked), placeholderData: keepPreviousData });
  const rows = useInfiniteQuery({
    ...whatIfRowsQuery(asked, search.group ?? ''),
    enabled: search.group !== undefined,
  });
  const { decimalMark } = usePreferences();
  if (answer.error) return <ErrorNotice error={answer.error} onRetry={() => void answer.refetch()} />;
  if (!answer.data) return <WaitingForGraph because={answer.failureReason}>Working it out</WaitingForGraph>;
  const { groups, total } = answer.data;
  const { by } = answer.data.question;
  return (
    <Section
      title={whatIfHeadline(total)}
      note={<span className="inline-block">a dry run: nothing was changed</span>}
    >
      {total.count > 0 && (
        <>
          <Totals answer={answer.data} />
          <WhatIfTable
            groups={groups}
            columns={columnsOf(changes)}
            by={by}
            sort={search.sort}
            open={search.group}
            opened={openedFrom(rows)}
            onOpen={onOpen}
            onSort={onSort}
          />
          <div className="flex flex-wrap items-start gap-x-5">
            <SaveAllRows
              key={JSON.stringify(asked)}
              name="what-it-would-do.csv"
              total={total.count}
              pages={(signal) =>
                allRows(
                  groups.map(({ key }) => key),
                  (group, cursor) => whatIfPage(asked, { group, cursor, signal }),
                )
              }
              toCsv={whatIfCsv}
            />
            <Button
              weight="text"
              className="mt-1"
              onClick={() =>
                saveText(
                  'what-it-would-do-by-group.csv',
                  groupsCsv(groups, GROUPED_BY[by], (group) => groupName(group, by, decimalMark)),
                )
              }
            >
              Save the groups as CSV
            </Button>
          </div>
        </>
      )}
    </Section>
  );
}

function Totals({ answer }: { answer: WhatIfResponse }) {
  const { total, groups, beyondLimit } = answer;
  const shifts = groups.flatMap(({ largestShift }) => (largestShift === null ? [] : [largestShift]));
  const largest = Math.max(0, ...shifts);
  return (
    <>
      <p role="status" className="text-ink-2">
        None {total.words.none}, material {total.words.material}, verdict changes {total.words.verdictChanges}
        .
        {largest > 0 && (
          <>
            {' '}
            The largest shift is <Quantity value={roundedText(largest)} shownIn="auto" />.
          </>
        )}
        {total.warned > 0 &&
          ` Weights of others are told with their shift and one word only: beyond ${OTHERS_BEYOND} % of U, whatever is asked for one’s own, with the shift and the added u counted up to the next of 1, 2, 5, 10. Each counts once, however often it was calibrated; the list of who leans on it counts every value that one’s own laboratory issued.`}
      </p>
      {beyondLimit.length > 0 && (
        <Notice tone="caution" title="A class limit would no longer cover what was used by it">
          {beyondLimit.map(({ registryNo }) => registryNo).join(', ')} would leave the class by whose limit
          what is below was calibrated.
        </Notice>
      )}
    </>
  );
}
