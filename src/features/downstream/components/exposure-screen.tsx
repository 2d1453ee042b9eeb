import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { allRows } from '../all-rows.ts';
import { exposurePage, exposureQuery, exposureRowsQuery } from '../api.ts';
import type { ExposureSearch } from '../exposure-search.ts';
import { GROUPINGS } from '../groups.ts';
import { leaningHeadline } from '../headlines.ts';
import { openedFrom } from '../opened-from.ts';
import { leaningCsv } from '../rows-csv.ts';
import { LeaningTable } from './leaning-table.tsx';
import { SaveAllRows } from './save-all-rows.tsx';
import { WaitingForGraph } from './waiting-for-graph.tsx';

interface ExposureScreenProps {
  standardId: string;
  registryNo: string;
  sub: ReactNode;
  search: ExposureSearch;
  onChange: (change: Partial<ExposureSearch>) => void;
}

/** Everything that leaned on a weight between the day on which it was last known good and the first on which it was bad. */
export function ExposureScreen({ standardId, registryNo, sub, search, onChange }: ExposureScreenProps) {
  const { lastGood, firstBad, by } = search;
  return (
    <Page title={`What leaned on ${registryNo} while it was in doubt`} sub={sub}>
      <Toolbar label="What is asked">
        <DayField label="Last good" value={lastGood ?? ''} onDay={(day) => onChange({ lastGood: day })} />
        <DayField label="First bad" value={firstBad ?? ''} onDay={(day) => onChange({ firstBad: day })} />
        <Switch
          label="Grouped by"
          value={by}
          onChange={(next) => onChange({ by: next })}
          choices={GROUPINGS}
        />
      </Toolbar>
      {lastGood && firstBad && lastGood > firstBad ? (
        <Notice tone="caution" role="status" title="The last good day lies after the first bad one">
          It was good on {lastGood} and bad on {firstBad} already: change one of the two days.
        </Notice>
      ) : lastGood && firstBad ? (
        <Exposed {...{ standardId, search, lastGood, firstBad }} onOpen={(group) => onChange({ group })} />
      ) : (
        <EmptyState>
          Say on which day the weight was last known to be good, and on which it was first found bad. What
          used it in between, either day included, and everything below that stands here.
        </EmptyState>
      )}
    </Page>
  );
}

interface ExposedProps {
  standardId: string;
  search: ExposureSearch;
  lastGood: string;
  firstBad: string;
  onOpen: (group: string | undefined) => void;
}

function Exposed({ standardId, search: { by, group }, lastGood, firstBad, onOpen }: ExposedProps) {
  const asked = { lastGood, firstBad, by };
  const answer = useQuery({ ...exposureQuery(standardId, asked), placeholderData: keepPreviousData });
  const rows = useInfiniteQuery({
    ...exposureRowsQuery(standardId, asked, group ?? ''),
    enabled: group !== undefined && !answer.error,
  });
  if (answer.error) return <ErrorNotice error={answer.error} onRetry={() => void answer.refetch()} />;
  if (!answer.data)
    return <WaitingForGraph because={answer.failureReason}>Reading what leaned on it</WaitingForGraph>;
  const { total, groups } = answer.data;
  return (
    <Section title={total.count === 0 ? 'Nothing leaned on it' : exposedHeadline(total)}>
      {total.count === 0 ? (
        <EmptyState>
          From {lastGood} to {firstBad} no value in force today used this weight.
        </EmptyState>
      ) : (
        <>
          <p className="text-ink-2">
            Used from {lastGood} to {firstBad}, either day included, or leaning on what was. Values in force
            today are counted.
            {total.warned > 0 && ' Weights of others are told as laboratory and weight only.'}
          </p>
          <LeaningTable
            groups={groups}
            by={answer.data.question.by}
            open={group}
            opened={openedFrom(rows)}
            onOpen={onOpen}
          />
          <SaveAllRows
            key={`${standardId} ${JSON.stringify(asked)}`}
            name="what-leaned-on-it.csv"
            total={total.count}
            pages={(signal) =>
              allRows(
                groups.map(({ key }) => key),
                (key, cursor) => exposurePage(standardId, asked, { group: key, cursor, signal }),
              )
            }
            toCsv={leaningCsv}
          />
        </>
      )}
    </Section>
  );
}

function exposedHeadline(total: { count: number; warned: number }): string {
  return leaningHeadline(total).replace(/leans? on it$/, 'leaned on it');
}
