import type { z } from 'zod';
import type { AuditResult } from '#shared/contracts/audits.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { countText } from '#shared/numbers/count-text.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { SEVERITIES, severityWord } from '#shared/severity-words.ts';

/** What an audit found, in numbers: failing by severity, not judged, and how much was looked at. */
export function Figures({ result }: { result: z.infer<typeof AuditResult> }) {
  const { counts } = result;
  const sum = (chosen: typeof counts) => chosen.reduce((total, { count }) => total + count, 0);
  const failing = SEVERITIES.map((severity) => ({
    severity,
    count: sum(counts.filter((count) => count.outcome === 'fails' && count.severity === severity)),
  }));
  const of = (outcome: string) => sum(counts.filter((count) => count.outcome === outcome));
  return (
    <Section title="Found">
      <Facts
        facts={[
          ...failing
            .filter(({ count }) => count > 0)
            .map(
              ({ severity, count }) =>
                [
                  <StateMark key={severity} state={stateOfOutcome('fails', severity)}>
                    {`fails, ${severityWord(severity)}`}
                  </StateMark>,
                  countText(count),
                ] as const,
            ),
          [
            <StateMark key="n" state="not judged">
              cannot be judged
            </StateMark>,
            countText(of('cannot be judged')),
          ],
          [
            <StateMark key="h" state="sound">
              holds
            </StateMark>,
            countText(of('holds')),
          ],
          [
            <StateMark key="a" state="does not apply">
              does not apply
            </StateMark>,
            countText(of('does not apply')),
          ],
          ['Chains', countText(result.chains)],
          ['Values judged', countText(result.values)],
          ['Links judged', countText(result.links)],
        ]}
      />
    </Section>
  );
}
