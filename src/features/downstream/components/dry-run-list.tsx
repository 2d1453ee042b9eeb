import { useInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { dryRunListQuery } from '../api.ts';

/** Dry runs kept for one's laboratories; two of them can be laid side by side. */
export function DryRunList() {
  const list = useInfiniteQuery(dryRunListQuery);
  const [chosen, setChosen] = useState<readonly string[]>([]);
  const runs = list.data?.pages.flatMap((page) => page.runs) ?? [];
  const toggle = (id: string) =>
    setChosen((before) =>
      before.includes(id) ? before.filter((one) => one !== id) : [...before, id].slice(-2),
    );
  const [one, other] = chosen;
  return (
    <Page title="Dry runs kept" sub="Questions kept for your laboratories. Opened, they are answered anew.">
      <Toolbar>
        <LinkButton to={paths.whatIf.href()}>A new dry run</LinkButton>
        {one !== undefined && other !== undefined ? (
          <LinkButton weight="primary" to={paths.dryRunComparison.href(one, other)}>
            Lay the two side by side
          </LinkButton>
        ) : (
          runs.length > 1 && <p className="text-ink-2">Tick two to lay them side by side.</p>
        )}
      </Toolbar>
      {list.error && <ErrorNotice error={list.error} onRetry={() => void list.refetch()} />}
      {list.isPending && <Waiting>Reading the dry runs</Waiting>}
      {list.data && runs.length === 0 && (
        <EmptyState>
          A dry run that somebody of your laboratory keeps stands here. Suppose something, and keep it from
          the side of its answer.
        </EmptyState>
      )}
      {runs.length > 0 && (
        <Table caption="Dry runs kept">
          <thead>
            <tr>
              <Head>Name</Head>
              <Head align="right">Changes</Head>
              <Head>For</Head>
              <Head>By</Head>
              <Head>Kept</Head>
              <Head>Compare</Head>
            </tr>
          </thead>
          <tbody>
            {runs.map((run) => (
              <Row key={run.id}>
                <Cell isHeading>
                  <RowLink to={paths.dryRun.href(run.id)}>{run.name}</RowLink>
                </Cell>
                <Cell align="right">{run.changes}</Cell>
                <Cell>{run.laboratory.name}</Cell>
                <Cell>{run.savedBy}</Cell>
                <Cell>
                  <DateText value={run.savedAt} />
                </Cell>
                <Cell>
                  <Checkbox
                    label={<span className="sr-only">Compare {run.name}</span>}
                    checked={chosen.includes(run.id)}
                    onChange={() => toggle(run.id)}
                  />
                </Cell>
              </Row>
            ))}
          </tbody>
        </Table>
      )}
      {list.hasNextPage && (
        <div>
          <Button weight="text" isBusy={list.isFetchingNextPage} onClick={() => void list.fetchNextPage()}>
            Show older ones
          </Button>
        </div>
      )}
    </Page>
  );
}
