import { useState, type ReactNode } from 'react';
import { NavLink } from 'react-router';

interface AppShellProps {
  /** The sections, in the order of the rail. */
  sections: readonly { label: string; href: string }[];
  /** The box that finds anything. */
  search?: ReactNode;
  /** Account, theme and preferences. */
  foot: ReactNode;
  /** What concerns the whole application: a lost connection. */
  notice?: ReactNode;
  children: ReactNode;
}

/** The rail of sections at the left and the screen beside it; below 900 px the rail folds into a bar at the top. */
export function AppShell({ sections, search, foot, notice, children }: AppShellProps) {
  const [isOpen, setOpen] = useState(false);
  const fold = isOpen ? 'flex' : 'hidden rail:flex';
  return (
    <div className="min-h-dvh rail:grid rail:grid-cols-[10.5rem_minmax(0,1fr)] print:block!">
      <a
        href="#screen"
        className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-20 focus:bg-raised focus:px-3 focus:py-2"
      >
        Skip to the screen
      </a>
      <header className="border-rule max-rail:border-b rail:border-r print:hidden">
        <div className="flex flex-col rail:sticky rail:top-0 rail:z-5 rail:min-h-dvh">
          <div className="flex items-center justify-between px-4 py-2.5 rail:px-5 rail:pt-4.5 rail:pb-4">
            <NavLink to="/" className="font-serif text-xl">
              Exagium
            </NavLink>
            <button
              type="button"
              aria-expanded={isOpen}
              aria-controls="rail"
              onClick={() => setOpen(!isOpen)}
              className="min-h-11 px-2 underline underline-offset-3 rail:hidden"
            >
              {isOpen ? 'Close' : 'Sections'}
            </button>
          </div>
          <div id="rail" className={`${fold} flex-1 flex-col gap-4 pb-4`}>
            {search && <div className="px-4 rail:px-5">{search}</div>}
            <nav aria-label="Sections" className="flex flex-col">
              {sections.map((section) => (
                <NavLink
                  key={section.href}
                  to={section.href}
                  onClick={() => setOpen(false)}
                  className="flex min-h-8.5 items-center border-l-3 border-transparent px-3.25 text-ink-2 hover:text-ink focus-visible:-outline-offset-2 aria-[current=page]:border-brass aria-[current=page]:text-ink pointer-coarse:min-h-11 rail:px-4.25"
                >
                  {section.label}
                </NavLink>
              ))}
            </nav>
            <div className="mt-auto px-4 rail:px-5">{foot}</div>
          </div>
        </div>
      </header>
      <main id="screen" tabIndex={-1} className="min-w-0 outline-none">
        {notice}
        {children}
      </main>
    </div>
  );
}
