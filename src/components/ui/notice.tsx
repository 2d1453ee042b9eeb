import type { ReactNode } from 'react';

const EDGES = {
  plain: 'border-rule',
  brass: 'border-brass',
  sound: 'border-sound',
  caution: 'border-caution',
  broken: 'border-broken',
  unjudged: 'border-unjudged',
};

interface NoticeProps {
  /** @default 'plain' */
  tone?: keyof typeof EDGES;
  title?: ReactNode;
  children?: ReactNode;
  /** Two or three `Button weight="text"`: the answers to a question, or the next steps. */
  answers?: ReactNode;
  /** `alert` interrupts a screen reader, `status` waits its turn. */
  role?: 'alert' | 'status';
}

/** A remark beside the work, set off by one coloured edge; a question is put as a sentence with its answers. */
export function Notice({ tone = 'plain', title, children, answers, role }: NoticeProps) {
  return (
    <div role={role} className={`border-l-3 py-1.5 pl-3.5 ${EDGES[tone]}`}>
      {title && <p className="font-semibold">{title}</p>}
      {children && <div className="text-ink-2">{children}</div>}
      {answers && <p className="mt-0.5 flex flex-wrap gap-x-3 gap-y-1">{answers}</p>}
    </div>
  );
}
