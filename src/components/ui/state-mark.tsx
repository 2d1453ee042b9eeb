import type { ReactNode } from 'react';
import type { State } from '#shared/states.ts';

const COLOURS: Record<State, string> = {
  sound: 'text-sound',
  caution: 'text-caution',
  broken: 'text-broken',
  'not judged': 'text-unjudged',
  'does not apply': 'text-ink-3',
};

const PATHS: Record<State, string> = {
  sound: 'M2.5 7.5 5.5 10.5 11.5 3.5',
  caution: 'M7 2.2 12.4 11.6H1.6Z',
  broken: 'M3 3 11 11M11 3 3 11',
  'not judged': 'M7 2.2a4.8 4.8 0 1 0 .01 0Z',
  'does not apply': 'M3 7H11',
};

interface StateMarkProps {
  state: State;
  /** The word after the mark; the state's own name when left out. */
  children?: ReactNode;
  /** Draws the mark alone, where the word stands beside it already; screen readers still hear the state. */
  isMarkOnly?: boolean;
  className?: string;
}

/** A mark and a word for a state, in the state's colour: never colour alone. */
export function StateMark({ state, children, isMarkOnly = false, className = '' }: StateMarkProps) {
  return (
    <span className={`inline-flex items-baseline gap-1 ${COLOURS[state]} ${className}`}>
      <StateGlyph state={state} />
      <span className={isMarkOnly ? 'sr-only' : ''}>{children ?? state}</span>
    </span>
  );
}

/** The bare mark, 14 by 14 units, drawn in the current colour; for plates and links of a drawing. */
export function StateGlyph({ state }: { state: State }) {
  return (
    <svg viewBox="0 0 14 14" className="size-[0.85em] shrink-0 translate-y-[0.08em]" aria-hidden="true">
      <path
        d={PATHS[state]}
        fill="none"
        stroke="currentColor"
        strokeWidth="1.6"
        strokeDasharray={state === 'not judged' ? '2.2 1.6' : undefined}
      />
    </svg>
  );
}
