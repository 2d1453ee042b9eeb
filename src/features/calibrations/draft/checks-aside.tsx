import type { DraftCheck } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { stateOfOutcome } from '#shared/states.ts';
import { useDraft } from './draft-context.ts';
import { gatherChecks, type GatheredCheck } from './gather-checks.ts';
import { runsOf } from './gather-points.ts';

const SHOWN_AT_ONCE = 8;

interface ChecksAsideProps {
  checks: readonly DraftCheck[];
  weightOf: (line: number) => string | null;
}

/** The rules held against each line, those that do not hold first. */
export function ChecksAside({ checks, weightOf }: ChecksAsideProps) {
  const judged = checks.filter(({ outcome }) => outcome !== 'does not apply');
  if (judged.length === 0) return null;
  const gathered = gatherChecks(judged);
  const loud = gathered.filter(({ check }) => check.outcome !== 'holds');
  const quiet = gathered.filter(({ check }) => check.outcome === 'holds');
  const holding = judged.filter(({ outcome }) => outcome === 'holds').length;
  const list = (shown: GatheredCheck[]) => (
    <ul className="border-t border-rule">
      {shown.map((one, index) => (
        <CheckItem key={index} {...one} weightOf={weightOf} />
      ))}
    </ul>
  );
  return (
    <Section title="Checks" note={`${holding} of ${judged.length} hold`}>
      {loud.length > 0 && list(loud.slice(0, SHOWN_AT_ONCE))}
      {loud.length > SHOWN_AT_ONCE && (
        <details>
          <summary className="min-h-6 text-ink-2">and {loud.length - SHOWN_AT_ONCE} more</summary>
          {list(loud.slice(SHOWN_AT_ONCE))}
        </details>
      )}
      {quiet.length > 0 && (
        <details>
          <summary className="min-h-6 text-ink-2">Those that hold</summary>
          {list(quiet)}
        </details>
      )}
    </Section>
  );
}

function CheckItem({ check, lines, weightOf }: GatheredCheck & Pick<ChecksAsideProps, 'weightOf'>) {
  const { goTo } = useDraft();
  const weight = weightOf(check.line);
  const where =
    lines.length > 1 ? `Lines ${runsOf(lines)}` : `Line ${check.line + 1}${weight ? `, ${weight}` : ''}`;
  return (
    <li className="border-b border-rule py-1">
      <StateMark state={stateOfOutcome(check.outcome, check.severity)}>{check.outcome}</StateMark>{' '}
      <Button weight="text" onClick={() => goTo(`lines.${check.line}.value`)}>
        {where}
      </Button>{' '}
      <span className="text-ink-2">{check.sentence}</span>{' '}
      <span className="text-sm text-ink-3">
        {check.rule}, {check.clause}
      </span>
    </li>
  );
}
