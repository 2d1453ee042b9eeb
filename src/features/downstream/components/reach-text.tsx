import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { plainText, roundedText } from '../rounded.ts';

type Reach = DistanceResponse['reach'];

/** What a value can still carry as a reference: which classes, and until which day where its drift is known. */
export function ReachText({ reach }: { reach: Reach }) {
  const { bestText, textToday, classes, drift, driftBecause, until, reserves } = reach;
  if (bestText === null) return null;
  return (
    <Section title="What it can carry as a reference">
      <p className="text-ink-2">
        A weight of its nominal calibrated from it gets U of {bestText} at best
        {textToday !== null && textToday !== bestText && `, of ${textToday} if it is used today`}
        {classes.length > 0 ? '.' : ': too much for any class of its nominal.'}
      </p>
      {reserves.map((reserve) => (
        <p key={reserve} className="text-caution">
          {reserve}
        </p>
      ))}
      {drift ? (
        <>
          <p className="text-ink-2">
            <DriftText drift={drift} /> It is used at its certificate’s value: the drift counts in full, its
            uncertainty in quadrature.
          </p>
          {until.length > 0 && (
            <Table caption="Until when it can carry each class">
              <thead>
                <tr>
                  <Head>Class</Head>
                  <Head align="right">Can be reached until</Head>
                </tr>
              </thead>
              <tbody>
                {until.map((row) => (
                  <Row key={row.class}>
                    <Cell isHeading>{row.class}</Cell>
                    <Cell align="right">
                      {row.isPast && 'passed on '}
                      {row.last === null ? 'more than 50 years' : <DateText value={row.last} />}
                    </Cell>
                  </Row>
                ))}
              </tbody>
            </Table>
          )}
        </>
      ) : (
        <p className="text-ink-2">
          {classes.length > 0 && `Enough for ${classes.join(', ')} when it was calibrated. `}
          {driftBecause}
        </p>
      )}
    </Section>
  );
}

function DriftText({ drift }: { drift: NonNullable<Reach['drift']> }) {
  const uncertainty = <Quantity value={plainText(drift.u)} kind="uncertainty" shownIn="auto" />;
  if (drift.from === 'declared rate') {
    return <>Its laboratory declares a drift of 0 with a standard uncertainty of {uncertainty} a year.</>;
  }
  return (
    <>
      Its {drift.calibrations} calibrations of this epoch give a drift of{' '}
      {drift.perYear === 0 ? (
        '0'
      ) : (
        <Quantity value={roundedText(drift.perYear)} kind="deviation" shownIn="auto" />
      )}{' '}
      a year, with a standard uncertainty of {uncertainty} a year.
    </>
  );
}
