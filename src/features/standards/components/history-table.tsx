import type { ReactNode } from 'react';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';
import { ValueCells } from '#src/components/ui/value-cells.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { usePreferences } from '#src/lib/preferences.ts';
import { stateOfValue } from '#shared/states.ts';
import { dateAsKnown } from '../history/days.ts';
import type { PlotValue } from '../history/plot-geometry.ts';

/** The values of one quantity, newest first; a row opens its calibration. */
export function HistoryTable({ sheet }: { sheet: StandardResponse }) {
  const firstOfEpoch = firstValues(sheet.history);
  return (
    <Table caption="Values of this standard">
      <thead>
        <tr>
          <Head>Calibrated</Head>
          <Head>Certificate</Head>
          <Head>By</Head>
          <Head align="right">Deviation</Head>
          <Head align="right">U</Head>
          <Head>Change</Head>
          <Head>Stands</Head>
        </tr>
      </thead>
      <tbody>
        {sheet.history.toReversed().map((value) => (
          <Row key={value.uid}>
            <Cell isHeading className="whitespace-nowrap">
              <RowLink to={paths.calibration.href(value.revisionId)}>{dateAsKnown(value)}</RowLink>
            </Cell>
            <Cell isMono>
              {value.certificateNo}
              {value.revisionN > 1 && `, rev. ${value.revisionN}`}
            </Cell>
            <Cell className="max-w-56 truncate">
              <span className="max-[84rem]:hidden">{value.issuer.name}</span>
              <span className="font-mono text-sm min-[84rem]:hidden" title={value.issuer.name}>
                {value.issuer.code}
              </span>
            </Cell>
            <ValueCells {...value} />
            <Cell className="whitespace-nowrap">
              <Change value={value} isFirstAfter={value.epochN > 1 && firstOfEpoch.has(value.uid)} />
            </Cell>
            <Cell>
              <StateMark state={stateOfValue(value.state)}>
                {value.state}
                {value.state !== 'in force' && value.stateSince && (
                  <>
                    {' '}
                    <DateText value={value.stateSince} />
                  </>
                )}
              </StateMark>
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}

/** Since the value before it in the same epoch, and how that compares with both U. */
function Change({ value, isFirstAfter }: { value: PlotValue; isFirstAfter: boolean }): ReactNode {
  const { decimalMark } = usePreferences();
  const conditions = [value.stage, value.medium === 'air' ? null : `in ${value.medium}`]
    .filter(Boolean)
    .join(', ');
  const suffix = conditions && <span className="text-ink-2"> {conditions}</span>;
  if (isFirstAfter) return <>new epoch{suffix && <>,{suffix}</>}</>;
  if (!value.change) return suffix || null;
  const { deviation, ratio } = value.change;
  return (
    <>
      <Quantity
        value={deviation}
        expandedUncertainty={value.expandedU}
        coverageFactor={value.k}
        kind="deviation"
        shownIn="auto"
        hidesUncertainty
      />
      {ratio !== null && `, E = ${formatDecimal(String(ratio), { decimals: 2, decimalMark })}`}
      {suffix && <>,{suffix}</>}
    </>
  );
}

function firstValues(history: readonly PlotValue[]): Set<string> {
  const seen = new Map<string, string>();
  for (const { epochN, medium, uid } of history) {
    const key = `${epochN} ${medium}`;
    if (!seen.has(key)) seen.set(key, uid);
  }
  return new Set(seen.values());
}
