import type { DistanceResponse } from '#shared/contracts/distance.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { withSigns } from '../signs.ts';
import { ReachText } from './reach-text.tsx';

const LONGEST_LIST = 8;

/** How wrong each ancestor may be before the value leaves its class, the nearest first, and what it can still carry. */
export function DistanceSection({ distance }: { distance: DistanceResponse }) {
  const limited = distance.ancestors
    .filter((ancestor) => ancestor.text !== null)
    .toSorted((a, b) => nearer(a) - nearer(b));
  const shown = limited.slice(0, LONGEST_LIST);
  return (
    <>
      <Section title="Distance to failure">
        {distance.because && <p className="text-ink-2">Not told. {distance.because}</p>}
        {distance.rule && (
          <p className="text-ink-2">
            How wrong each may be before {distance.registryNo} no longer keeps {distance.class}.{' '}
            {withSigns(distance.rule)}
          </p>
        )}
        {shown.length > 0 && (
          <Table caption="Distance to failure by ancestor">
            <thead>
              <tr>
                <Head>Leans on</Head>
                <Head align="right">May be wrong by</Head>
              </tr>
            </thead>
            <tbody>
              {shown.map((ancestor) => (
                <Row key={ancestor.uid}>
                  <Cell isMono>{ancestor.registryNo}</Cell>
                  <Cell align="right" className="whitespace-nowrap">
                    {ancestor.text}
                  </Cell>
                </Row>
              ))}
            </tbody>
          </Table>
        )}
        {limited.length > shown.length && (
          <p className="text-sm text-ink-3">{limited.length - shown.length} more may be further off.</p>
        )}
      </Section>
      <ReachText reach={distance.reach} />
    </>
  );
}

function nearer({ upwards, downwards }: DistanceResponse['ancestors'][number]): number {
  return Math.min(upwards ?? Infinity, downwards ?? Infinity);
}
