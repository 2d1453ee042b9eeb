import { Link } from 'react-router';
import type { z } from 'zod';
import type { AuditComparison } from '#shared/contracts/audits.ts';
import { countText } from '#shared/numbers/count-text.ts';
import { severityWord } from '#shared/severity-words.ts';
import { paths } from '#src/app/paths.ts';
import { Notice } from '#src/components/ui/notice.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';

type Compared = z.infer<typeof AuditComparison>;

/** How a repeated audit compares with the one it repeats: the same, or where they differ and why. */
export function Comparison({ comparison }: { comparison: Compared }) {
  const first = (
    <Link to={paths.audit.href(comparison.of)} className="underline underline-offset-3">
      the audit it repeats
    </Link>
  );
  if (comparison.isSame) {
    return (
      <Notice tone="sound" title="Repeated: the same result" role="status">
        Findings, counts and every fact the rules were given are those of {first}.
      </Notice>
    );
  }
  return (
    <div className="flex flex-col gap-3">
      <Notice tone="broken" title="Repeated: the results differ" role="status">
        <ul className="list-disc pl-4">
          {reasonsOf(comparison).map((reason) => (
            <li key={reason}>{reason}</li>
          ))}
        </ul>
        Compared with {first}.
      </Notice>
      {comparison.differences.length > 0 && <Differences comparison={comparison} />}
    </div>
  );
}

function reasonsOf({ isIntact, ruleSet, engine, sameFacts, differenceCount }: Compared): string[] {
  const reasons: string[] = [];
  if (!isIntact)
    reasons.push('What is stored of the first audit is not what it recorded. Have the record verified.');
  if (ruleSet.then !== ruleSet.now)
    reasons.push(`The rule set was ${ruleSet.then} then and is ${ruleSet.now} now.`);
  if (engine.then !== engine.now)
    reasons.push(`The engine was ${engine.then} then and is ${engine.now} now.`);
  if (!sameFacts) reasons.push('The rules were not given the same facts.');
  const findings = differenceCount === 1 ? 'One finding differs.' : `${differenceCount} findings differ.`;
  return [...reasons, differenceCount === 0 ? 'No single finding differs.' : findings];
}

function Differences({ comparison }: { comparison: Compared }) {
  const { differences, differenceCount } = comparison;
  return (
    <>
      <Table caption="Findings that differ">
        <thead>
          <tr>
            <Head>Rule</Head>
            <Head>Weight</Head>
            <Head>Verdict</Head>
            <Head>Then</Head>
            <Head>Now</Head>
          </tr>
        </thead>
        <tbody>
          {differences.map((row, at) => (
            <Row key={at}>
              <Cell isHeading isMono>
                {row.rule}
              </Cell>
              <Cell isMono>{row.registryNo}</Cell>
              <Cell>{row.verdict === 'conduct' ? 'at use' : 'today'}</Cell>
              <Cell>{foundText(row.then)}</Cell>
              <Cell>{foundText(row.now)}</Cell>
            </Row>
          ))}
        </tbody>
      </Table>
      {differenceCount > differences.length && (
        <p className="text-ink-3">{`The first ${differences.length} of ${countText(differenceCount)}.`}</p>
      )}
    </>
  );
}

function foundText(found: Compared['differences'][number]['then']): string {
  return found ? `${found.outcome}, ${severityWord(found.severity)}` : 'no finding';
}
