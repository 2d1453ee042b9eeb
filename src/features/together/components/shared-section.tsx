import type { TogetherResponse } from '#shared/contracts/together.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Cell, Head, Row, RowLink, Table } from '#src/components/ui/table.tsx';

/** What two or more of the weights lean on, and which of them do: a mark in a weight's column says that it does. */
export function SharedSection({ together }: { together: TogetherResponse }) {
  const { shared, weights, valueUids } = together;
  return (
    <Section title="What they share">
      {shared.length === 0 ? (
        <p className="text-ink-2">Nothing that the register knows of: they are independent.</p>
      ) : (
        <>
          <p className="text-ink-2">
            What two or more lean on, the oldest first. A disc stands where a weight leans on it.
          </p>
          <Table caption="What they share" isScrolled>
            <thead>
              <tr>
                <Head>Leans on</Head>
                {weights.map((weight, at) => (
                  <Head key={valueUids[at]} align="right">
                    <span className="font-mono text-xs">{weight.registryNo}</span>
                  </Head>
                ))}
              </tr>
            </thead>
            <tbody>
              {shared.map(({ uid, type, label, places }) => (
                <Row key={uid}>
                  <Cell isHeading>
                    {type === 'value' ? (
                      <span className="font-mono text-sm whitespace-nowrap">
                        <RowLink to={paths.chain.href(uid)}>{label}</RowLink>
                      </span>
                    ) : (
                      label
                    )}
                  </Cell>
                  {weights.map((weight, at) => (
                    <Cell key={valueUids[at]} align="right">
                      <Mark isThere={places.includes(at)} name={weight.registryNo} />
                    </Cell>
                  ))}
                </Row>
              ))}
            </tbody>
          </Table>
        </>
      )}
    </Section>
  );
}

function Mark({ isThere, name }: { isThere: boolean; name: string }) {
  if (!isThere) return <span className="sr-only">not {name}</span>;
  return (
    <svg viewBox="0 0 10 10" role="img" aria-label={name} className="inline-block size-2.5">
      <circle cx="5" cy="5" r="4" className="fill-brass" />
    </svg>
  );
}
