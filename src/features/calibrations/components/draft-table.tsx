import type { CalibrationListResponse } from '#shared/contracts/calibrations.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { Word } from '#src/components/ui/word.tsx';

/** Drafts, each opened by its certificate number. */
export function DraftTable({ drafts }: { drafts: CalibrationListResponse['drafts'] }) {
  return (
    <Table caption="Drafts">
      <thead>
        <tr>
          <Head>Certificate</Head>
          <Head>Issued by</Head>
          <Head>Laboratory</Head>
          <Head align="right">Lines</Head>
          <Head>State</Head>
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
            <Cell>{draft.issuerName ?? 'not said yet'}</Cell>
            <Cell>{draft.laboratory.name}</Cell>
            <Cell align="right">{draft.lines}</Cell>
            <Cell>
              <Word tone={draft.state === 'sent to sign' ? 'brass' : 'plain'}>{draft.state}</Word>
            </Cell>
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
