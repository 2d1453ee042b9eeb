import { useState, type ReactNode } from 'react';
import { useQuery } from '@tanstack/react-query';
import { paths } from '#src/app/paths.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { LinkButton } from '#src/components/ui/button.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { ValueCells } from '#src/components/ui/value-cells.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { nominalUnit } from '#shared/numbers/nominal.ts';
import { chainChoicesQuery } from '../api.ts';

interface ChainChooserProps {
  q: string;
  /** Only what fails in the newest audit of its laboratory. */
  isFailing: boolean;
  onSearch: (q: string, isFailing: boolean) => void;
  hrefOf: (valueUid: string) => string;
  /** Where else chains lead: beside the search. */
  actions?: ReactNode;
}

/** Which chain to open: the newest values of one's own weights, or those found by registry number. */
export function ChainChooser({ q, isFailing, onSearch, hrefOf, actions }: ChainChooserProps) {
  const [typed, setTyped] = useState(q);
  const { data, error, refetch } = useQuery(chainChoicesQuery(q, isFailing));
  return (
    <Page title="Chains" sub="Each value back to the SI, with the uncertainty that really reaches it.">
      <Toolbar>
        <TextField
          label="Registry number"
          className="max-w-72"
          isMono
          type="search"
          value={typed}
          onChange={(event) => {
            setTyped(event.target.value);
            onSearch(event.target.value.trim(), isFailing);
          }}
        />
        <Checkbox
          label="failing in the newest audit"
          checked={isFailing}
          onChange={(event) => onSearch(typed.trim(), event.target.checked)}
        />
        {actions}
      </Toolbar>
      {error && <ErrorNotice error={error} onRetry={() => void refetch()} />}
      {!data && !error && <Waiting>Looking for values</Waiting>}
      {data?.values.length === 0 && isFailing && (
        <EmptyState action={<LinkButton to={paths.audits.href()}>Go to the audits</LinkButton>}>
          {q
            ? `No value of a weight whose number begins with "${q}" fails in the newest audit.`
            : 'No value that you hold or issued fails in the newest audit of your laboratory, or none was made yet.'}
        </EmptyState>
      )}
      {data?.values.length === 0 && !isFailing && (
        <EmptyState>
          {q
            ? `No value in force of a weight whose number begins with "${q}".`
            : 'The chains of your weights stand here once a calibration of them is issued.'}
        </EmptyState>
      )}
      {data && data.values.length > 0 && (
        <Table
          caption={
            isFailing
              ? 'Values held or issued by your laboratory that fail in its newest audit'
              : 'Values in force'
          }
        >
          <thead>
            <tr>
              <Head>Weight</Head>
              <Head align="right">Nominal</Head>
              <Head>Held by</Head>
              <Head>Certificate</Head>
              <Head>Calibrated</Head>
              <Head>Quantity</Head>
              <Head align="right">Deviation</Head>
              <Head align="right">U</Head>
            </tr>
          </thead>
          <tbody>
            {data.values.map((value) => (
              <Row key={value.uid}>
                <Cell isMono>
                  <RowLink to={hrefOf(value.uid)}>{value.registryNo}</RowLink>
                </Cell>
                <Cell align="right">
                  <Quantity value={value.nominal} shownIn={nominalUnit(value.nominal)} />
                </Cell>
                <Cell>{value.holder.name}</Cell>
                <Cell isMono>{value.certificateNo}</Cell>
                <Cell>
                  <DateText value={value.performedEnd} />
                </Cell>
                <Cell>{value.quantity === 'mass' ? 'mass' : 'conventional'}</Cell>
                <ValueCells {...value} />
              </Row>
            ))}
          </tbody>
        </Table>
      )}
    </Page>
  );
}
