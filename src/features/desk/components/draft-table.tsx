import type { DeskResponse } from '#shared/contracts/desk.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';

/** Drafts of calibrations, each opened by its certificate number. */
export function DraftTable({ caption, drafts }: { caption: string; drafts: DeskResponse['drafts'] }) {
  return (
    <Table caption={caption}>
      <thead>
        <tr>
          <Head>Certificate</Head>
          <Head>Laboratory</Head>
          <Head>Issued by</Head>
          <Head align="right">Lines</Head>
          <Head>Saved</Head>
          <Head>By</Head>
        </tr>
      </thead>
      <tbody>
        {drafts.map((draft) => (
          <Row key={draft.id}>
            <Cell isHeading isMono>
              <RowLink to={paths.calibrationDraft.href(draft.id)}>
                {draft.certificateNo || 'no number yet'}
              </RowLink>
            </Cell>
            <Cell>{draft.laboratory.name}</Cell>
            <Cell>{draft.issuerName ?? 'not said yet'}</Cell>
            <Cell align="right">{draft.lines}</Cell>
            <Cell>
              <DateText value={draft.updatedAt} />
            </Cell>
            <Cell>{draft.updatedBy}</Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}
