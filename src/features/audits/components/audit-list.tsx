import { useSuspenseInfiniteQuery } from '@tanstack/react-query';
import { countText } from '#shared/numbers/count-text.ts';
import { paths } from '#src/app/paths.ts';
import { Page } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { auditListQuery } from '../api.ts';
import { subjectText } from '../words.ts';
import { AuditState } from './audit-state.tsx';
import { NewAudit } from './new-audit.tsx';

/** The audits in one's reach, and the place where one begins. */
export function AuditList({ onAsked }: { onAsked: (auditId: string) => void }) {
  const { data, hasNextPage, isFetchingNextPage, fetchNextPage } = useSuspenseInfiniteQuery(auditListQuery);
  const audits = data.pages.flatMap((page) => page.audits);
  const { mayAudit } = data.pages[0]!;
  const maySome = mayAudit.network || mayAudit.laboratories.length > 0;
  return (
    <Page
      title="Audits"
      sub="What the rules find, kept with the rule set and what it saw, so that it can be asked again. No verdict of conformity."
    >
      {maySome && <NewAudit mayAudit={mayAudit} onAsked={onAsked} />}
      {audits.length === 0 ? (
        <EmptyState action={<LinkButton to={paths.chains.href()}>Go to the chains</LinkButton>}>
          {maySome
            ? 'No audit was asked for yet. Begin one above, or audit a single chain from its own screen.'
            : 'Audits belong to a laboratory. A single chain that you may read can be audited from its own screen.'}
        </EmptyState>
      ) : (
        <Table caption="Audits">
          <thead>
            <tr>
              <Head>Of</Head>
              <Head>In force on</Head>
              <Head>As known on</Head>
              <Head>Asked by</Head>
              <Head>Asked</Head>
              <Head>Found</Head>
              <Head align="right">Not judged</Head>
            </tr>
          </thead>
          <tbody>
            {audits.map((audit) => (
              <Row key={audit.id}>
                <Cell isHeading>
                  <RowLink to={paths.audit.href(audit.id)}>{subjectText(audit)}</RowLink>
                </Cell>
                <Cell>
                  <DateText value={audit.day} />
                </Cell>
                <Cell>
                  <DateText value={audit.known} />
                </Cell>
                <Cell>{audit.askedBy}</Cell>
                <Cell>
                  <DateText value={audit.askedAt} />
                </Cell>
                <Cell>
                  <AuditState audit={audit} />
                </Cell>
                <Cell align="right">{audit.figures && countText(audit.figures.notJudged)}</Cell>
              </Row>
            ))}
          </tbody>
        </Table>
      )}
      {hasNextPage && (
        <p>
          <Button isBusy={isFetchingNextPage} onClick={() => void fetchNextPage()}>
            Show earlier ones
          </Button>
        </p>
      )}
    </Page>
  );
}
