import type { DraftCheck } from '#shared/contracts/calibrations.ts';
import { Button } from '#src/components/ui/button.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { stateOfOutcome } from '#src/lib/states.ts';
import { Section } from '#src/components/layout/page.tsx';
import { useDraft } from './draft-context.ts';

interface ChecksAsideProps {
  checks: readonly DraftCheck[];
  weightOf: (line: number) => string | null;
}

/** The rules held against each line, those that do not hold first. */
export function ChecksAside({ checks, weightOf }: ChecksAsideProps) {
  const judged = checks.filter(({ outcome }) => outcome !== 'does not apply');
  if (judged.length === 0) return null;
  const loud = judged.filter(({ outcome }) => outcome !== 'holds');
  const quiet = judged.filter(({ outcome }) => outcome === 'holds');
  return (
    <Section title="Checks" note={`${quiet.length} of ${judged.length} hold`}>
      {loud.length > 0 && <CheckList checks={loud} weightOf={weightOf} />}
      {quiet.length > 0 && (
        <details>
          <summary className="min-h-6 text-ink-2">Those that hold</summary>
          <CheckList checks={quiet} weightOf={weightOf} />
        </details>
      )}
    </Section>
  );
}

function CheckList({ checks, weightOf }: ChecksAsideProps) {
  const { goTo } = useDraft();
  return (
    <ul className="border-t border-rule">
      {checks.map((check, index) => (
        <li key={index} className="border-b border-rule py-1">
          <StateMark state={stateOfOutcome(check.outcome, check.severity)}>{check.outcome}</StateMark>{' '}
          <Button weight="text" onClick={() => goTo(`lines.${check.line}.value`)}>
            Line {check.line + 1}
            {weightOf(check.line) && `, ${weightOf(check.line)}`}
          </Button>{' '}
          <span className="text-ink-2">{check.sentence}</span>{' '}
          <span className="text-sm text-ink-3">
            {check.rule}, {check.clause}
          </span>
        </li>
      ))}
    </ul>
  );
}
