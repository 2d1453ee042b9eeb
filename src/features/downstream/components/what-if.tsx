import { keepPreviousData, useInfiniteQuery, useQuery } from '@tanstack/react-query';
import type { WhatIfChange, WhatIfResponse, WhatIfSort } from '#shared/contracts/downstream.ts';
import { Section } from '#src/components/layout/page.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { whatIfQuery, whatIfRowsQuery } from '../api.ts';
import { whatIfHeadline } from '../headlines.ts';
import { openedFrom } from '../opened-from.ts';
import { roundedText } from '../rounded.ts';
import type { DownstreamSearch, Suppose } from '../search.ts';
import { WhatIfTable } from './what-if-table.tsx';

interface WhatIfProps {
  change: WhatIfChange;
  suppose: Suppose;
  search: DownstreamSearch;
  onOpen: (key: string | undefined) => void;
  onSort: (sort: WhatIfSort) => void;
}

/** What one change would do, fetched in groups first and row by row where a group is opened. */
export function WhatIf({ change, suppose, search, onOpen, onSort }: WhatIfProps) {
  const { day, known, by, sort } = search;
  const asked = { changes: [change], threshold: search.beyond / 100, day, known, by, sort };
  const answer = useQuery({ ...whatIfQuery(asked), placeholderData: keepPreviousData });
  const rows = useInfiniteQuery({
    ...whatIfRowsQuery(asked, search.group ?? ''),
    enabled: search.group !== undefined,
  });
  if (answer.error) return <ErrorNotice error={answer.error} onRetry={() => void answer.refetch()} />;
  if (!answer.data) return <Waiting>Working it out</Waiting>;
  return (
    <Section
      title={whatIfHeadline(answer.data.total)}
      note={<span className="inline-block">a dry run: nothing was changed</span>}
    >
      <Totals answer={answer.data} suppose={suppose} />
      {answer.data.total.count > 0 && (
        <WhatIfTable
          groups={answer.data.groups}
          suppose={suppose}
          by={answer.data.question.by}
          sort={sort}
          open={search.group}
          opened={openedFrom(rows)}
          onOpen={onOpen}
          onSort={onSort}
        />
      )}
    </Section>
  );
}

function Totals({ answer, suppose }: { answer: WhatIfResponse; suppose: Suppose }) {
  const { total, groups, beyondLimit } = answer;
  const shifts = groups.flatMap(({ largestShift }) => (largestShift === null ? [] : [largestShift]));
  return (
    <>
      <p role="status" className="text-ink-2">
        None {total.words.none}, material {total.words.material}, verdict changes {total.words.verdictChanges}
        .
        {suppose === 'shift' && shifts.length > 0 && (
          <>
            {' '}
            The largest shift is <Quantity value={roundedText(Math.max(...shifts))} shownIn="auto" />.
          </>
        )}
        {total.warned > 0 && ' Weights of others are told with their shift and one word only.'}
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
