import type { ReactNode } from 'react';

interface EmptyStateProps {
  /** What belongs here, as a sentence. */
  children: ReactNode;
  /** The first step: a `LinkButton` or a `Button`. */
  action?: ReactNode;
}

/** What an empty list says: what belongs there, and how the first one comes in. */
export function EmptyState({ children, action }: EmptyStateProps) {
  return (
    <div className="flex max-w-prose flex-col items-start gap-3 border-t border-rule py-4 text-ink-2">
      <p>{children}</p>
      {action}
    </div>
  );
}
