import type { OpenPoint } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { useDraft } from './draft-context.ts';
import { gatherPoints } from './gather-points.ts';
import { pointLine } from './points.ts';

const SHOWN_AT_ONCE = 12;

interface OpenPointsProps {
  points: readonly OpenPoint[];
  weightOf: (line: number) => string | null;
}

/** What keeps the draft from being issued, field by field; each leads to its field. */
export function OpenPoints({ points, weightOf }: OpenPointsProps) {
  const { goTo } = useDraft();
  const blocking = points.filter(({ kind }) => kind === 'missing' || kind === 'wrong');
  const notes = points.filter(({ kind }) => kind === 'note');
  if (blocking.length + notes.length === 0) return null;
  const items = [...gatherPoints(blocking, weightOf), ...gatherPoints(notes, weightOf)].map(
    ({ point, where }, index) => (
      <li key={`${point.field} ${index}`} className="border-b border-rule py-1">
        <Button weight="text" className="text-left" onClick={() => goTo(point.field)}>
          {where}
        </Button>{' '}
        <span className={point.kind === 'wrong' ? 'text-broken' : 'text-ink-2'}>{pointLine(point)}</span>
      </li>
    ),
  );
  return (
    <Section title={countOf(blocking.length)} note={blocking.length > 0 && 'before it can be issued'}>
      <ul className="border-t border-rule">{items.slice(0, SHOWN_AT_ONCE)}</ul>
      {items.length > SHOWN_AT_ONCE && (
        <details>
          <summary className="text-ink-2">and {items.length - SHOWN_AT_ONCE} more</summary>
          <ul className="border-t border-rule">{items.slice(SHOWN_AT_ONCE)}</ul>
        </details>
      )}
    </Section>
  );
}

/** "No open points", "One open point", "7 open points"; questions are counted by themselves. */
export function countOf(points: number, questions = 0): string {
  const open = points === 1 ? 'One open point' : `${points === 0 ? 'No' : points} open points`;
  if (questions === 0) return open;
  return `${open}, ${questions === 1 ? 'one question' : `${questions} questions`}`;
}
