import type { ReactNode } from 'react';

interface PageProps {
  /** One line that names the thing; also the title of the browser's tab. */
  title: string;
  /** Who holds it, where it stands, since when. */
  sub?: ReactNode;
  /** The value of record, a `Quantity`, or the steps of the work. */
  value?: ReactNode;
  /** What the value is: kind, k, day. */
  valueNote?: ReactNode;
  children: ReactNode;
}

/** The frame of every screen: one serif line that names the thing, its value at the right, a hairline, the work. */
export function Page({ title, sub, value, valueNote, children }: PageProps) {
  return (
    <div className="flex min-w-0 flex-col px-4 pb-12 rail:px-7">
      <title>{`${title} · Exagium`}</title>
      <header className="flex flex-wrap items-start justify-between gap-x-8 gap-y-2 border-b border-rule pt-4 pb-3.5">
        <div className="min-w-0">
          <h1 className="font-serif text-2xl text-balance">{title}</h1>
          {sub && <div className="mt-1 text-ink-2">{sub}</div>}
        </div>
        {value && (
          <div className="ml-auto text-right">
            <div className="font-serif text-xl leading-8.5">{value}</div>
            {valueNote && <div className="mt-1 text-sm text-ink-2">{valueNote}</div>}
          </div>
        )}
      </header>
      <div className="flex min-w-0 flex-col gap-5 pt-3.5">{children}</div>
    </div>
  );
}

interface SectionProps {
  title: ReactNode;
  /** Said beside the title, in the lightest ink. */
  note?: ReactNode;
  /** Small actions at the right of the title. */
  actions?: ReactNode;
  children: ReactNode;
}

/** A part of a screen under its serif heading. */
export function Section({ title, note, actions, children }: SectionProps) {
  return (
    <section className="flex min-w-0 flex-col gap-1.5">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 className="font-serif text-lg">
          {title}
          {note && <span className="ml-2 font-sans text-sm text-ink-3">{note}</span>}
        </h2>
        {actions && <div className="flex flex-wrap gap-x-3">{actions}</div>}
      </div>
      {children}
    </section>
  );
}
