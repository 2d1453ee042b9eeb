import type { TogetherResponse } from '#shared/contracts/together.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { U } from './u.tsx';

type Combined = TogetherResponse['sum'];

/** Sum and difference with their uncertainty: with what the weights share, and as it would look without. */
export function CombinedSection({ together }: { together: TogetherResponse }) {
  const { sum, signed, signs, notAdded, standardUncertainties: us, undeclared, weights } = together;
  if (notAdded !== null) {
    return (
      <Notice tone="caution" title="No sum is given">
        {notAdded} Choose values of one kind.
      </Notice>
    );
  }
  const isDifference = signs.includes(-1);
  const independent = us.every((u) => u !== null) ? Math.hypot(...us.map((u) => u!)) : null;
  return (
    <Section title={isDifference ? 'Sum and difference' : 'Their sum'}>
      <Table caption="Sum and difference" isScrolled>
        <thead>
          <tr>
            <Head>All weights</Head>
            <Head align="right">Value</Head>
            <Head align="right">u with covariance</Head>
            <Head align="right">u if independent</Head>
            <Head align="right">u at most</Head>
          </tr>
        </thead>
        <tbody>
          <CombinedRow name="On one pan: sum" combined={sum} independent={independent} />
          {isDifference && (
            <CombinedRow name="As they lie: difference" combined={signed} independent={independent} isSmall />
          )}
        </tbody>
      </Table>
      <p className="text-ink-2">
        At most: the sum of the standard uncertainties, as if every two moved together (the linear bound).
        {us.includes(null) && ' Of at least one weight no uncertainty is known: no uncertainty is given.'}
      </p>
      {undeclared.length > 0 && (
        <Notice
          tone="unjudged"
          title="A covariance is not declared: where it is missing stands the largest it can be"
        >
          <ul>
            {undeclared.map(({ pair: [i, j], because }) => (
              <li key={`${i} ${j}`}>
                {weights[i]!.registryNo} and {weights[j]!.registryNo}: {because}
              </li>
            ))}
          </ul>
        </Notice>
      )}
    </Section>
  );
}

interface CombinedRowProps {
  name: string;
  combined: Combined;
  independent: number | null;
  /** A difference is read in the unit that suits it. */
  isSmall?: boolean;
}

function CombinedRow({ name, combined, independent, isSmall = false }: CombinedRowProps) {
  const { u, bound, linear, total } = combined;
  const known = u ?? bound;
  return (
    <Row>
      <Cell isHeading>{name}</Cell>
      <Cell align="right">
        {total !== null && (
          <Quantity
            value={total}
            expandedUncertainty={known === null || known === 0 ? null : String(2 * known)}
            coverageFactor="2"
            hidesUncertainty
            {...(isSmall && { kind: 'deviation', shownIn: 'auto' })}
          />
        )}
      </Cell>
      <Cell align="right">
        {u === null ? (
          <>
            <span className="text-ink-2">at most </span>
            <U grams={bound} />
          </>
        ) : (
          <U grams={u} />
        )}
      </Cell>
      <Cell align="right">
        <U grams={independent} />
      </Cell>
      <Cell align="right">
        <U grams={linear} />
      </Cell>
    </Row>
  );
}
