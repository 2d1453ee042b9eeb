import type { ReactNode } from 'react';

const SIDES = {
  narrow: 'columns:grid-cols-[minmax(0,1fr)_minmax(18rem,22rem)]',
  normal: 'columns:grid-cols-[minmax(0,7fr)_minmax(25rem,3fr)]',
  wide: 'columns:grid-cols-[minmax(0,6fr)_minmax(24rem,5fr)]',
};

interface TwoColumnsProps {
  /** The work. */
  children: ReactNode;
  /** What the work means. */
  side: ReactNode;
  /** @default 'normal' */
  sideWidth?: keyof typeof SIDES;
  /** Below 640 px the side comes first: where the work is a drawing and the side says the same in words. */
  isSideFirstOnPhones?: boolean;
  /** One below the other at every width: the work takes the page. */
  isStacked?: boolean;
}

/** The work at the left, what it means at the right; one below the other on narrow screens. */
export function TwoColumns({
  children,
  side,
  sideWidth = 'normal',
  isSideFirstOnPhones = false,
  isStacked = false,
}: TwoColumnsProps) {
  return (
    <div className={`grid min-w-0 grid-cols-1 gap-x-8 gap-y-6 ${isStacked ? '' : SIDES[sideWidth]}`}>
      <div className="flex min-w-0 flex-col gap-6">{children}</div>
      <div className={`flex min-w-0 flex-col gap-6 ${isSideFirstOnPhones ? 'max-sm:-order-1' : ''}`}>
        {side}
      </div>
    </div>
  );
}

const GAPS = { tight: 'gap-2', normal: 'gap-4', loose: 'gap-6' };

/** One thing below the other, evenly spaced. */
export function Stack({ gap = 'normal', children }: { gap?: keyof typeof GAPS; children: ReactNode }) {
  return <div className={`flex min-w-0 flex-col ${GAPS[gap]}`}>{children}</div>;
}

/** Controls in a line: filters and switches above a table, actions below a form. They wrap; paper has none. */
export function Toolbar({ label, children }: { label?: string; children: ReactNode }) {
  return (
    <div
      role={label ? 'group' : undefined}
      aria-label={label}
      className="flex flex-wrap items-end gap-x-4 gap-y-2 print:hidden"
    >
      {children}
    </div>
  );
}
