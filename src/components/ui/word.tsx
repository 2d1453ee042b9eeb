import type { ReactNode } from 'react';

const TONES = {
  plain: 'text-ink-2',
  brass: 'text-brass',
  sound: 'text-sound',
  caution: 'text-caution',
  broken: 'text-broken',
  unjudged: 'text-unjudged',
};

/** A word that names a kind or a stage ("draft", "E2", "superseded"); what is judged takes a `StateMark`. */
export function Word({ tone = 'plain', children }: { tone?: keyof typeof TONES; children: ReactNode }) {
  return <span className={`font-medium whitespace-nowrap ${TONES[tone]}`}>{children}</span>;
}
