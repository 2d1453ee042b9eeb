import { Link } from 'react-router';
import type { DraftLine } from '#shared/contracts/drafts.ts';
import { paths } from '#src/app/paths.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { stateOfValue } from '#shared/states.ts';
import { useKnown } from './known.ts';

/** How each value that the results lean on stands today. */
export function ReferencesAside({ lines }: { lines: readonly DraftLine[] }) {
  const known = useKnown();
  const uids = new Set(lines.flatMap(({ references }) => references.map(({ valueUid }) => valueUid)));
  const references = [...uids].flatMap((uid) => known.references.get(uid) ?? []);
  if (references.length === 0) return null;
  return (
    <Section title="References, today">
      <Table caption="References, today">
        <thead className="sr-only">
          <tr>
            <Head>Reference</Head>
            <Head>Stands</Head>
            <Head>Newest</Head>
          </tr>
        </thead>
        <tbody>
          {references.map(({ valueUid, registryNo, marking, performedEnd, state, isNewest }) => (
            <Row key={valueUid}>
              <Cell isHeading className="whitespace-nowrap">
                <Link to={paths.chain.href(valueUid)} className="hover:underline">
                  <span className="font-mono text-sm">{registryNo}</span>, {marking}
                </Link>
              </Cell>
              <Cell className="whitespace-nowrap">
                <StateMark state={stateOfValue(state)}>{state}</StateMark>
              </Cell>
              <Cell className="whitespace-nowrap">
                <StateMark state={isNewest ? 'sound' : 'caution'}>
                  {isNewest ? `newest, ${performedEnd}` : `newer than ${performedEnd} exists`}
                </StateMark>
              </Cell>
            </Row>
          ))}
        </tbody>
      </Table>
    </Section>
  );
}
