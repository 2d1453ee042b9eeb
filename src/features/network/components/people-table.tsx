import type { LaboratoryResponse } from '#shared/contracts/network.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';

/** Who works in a laboratory, in which role, since when. */
export function PeopleTable({ people }: { people: NonNullable<LaboratoryResponse['people']> }) {
  return (
    <Table caption="People" isScrolled>
      <thead>
        <tr>
          <Head>Name</Head>
          <Head>Role</Head>
          <Head>Since</Head>
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <Row key={`${person.accountId} ${person.role}`}>
            <Cell isHeading>{person.name}</Cell>
            <Cell>{person.role}</Cell>
            <Cell className="whitespace-nowrap">
              <DateText value={person.validFrom} />
              {person.validTo && (
                <>
                  {' to '}
                  <DateText value={person.validTo} />
                </>
              )}
            </Cell>
          </Row>
        ))}
      </tbody>
    </Table>
  );
}
