import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { cancellations } from '../cancellations.ts';
import { shareText } from '#shared/numbers/share-text.ts';

const LONGEST_LIST = 8;

/** Where the uncertainty comes from, largest first, and what would help most. */
export function Contributions({ chain }: { chain: ChainResponse }) {
  const { decimalMark } = usePreferences();
  const { missing } = chain.uncertainty;
  if (missing.length > 0) {
    return (
      <Section title="Where the uncertainty comes from">
        <p>
          Unknown, because {missing.map((row) => row.because).join('; ')}. What is not stated is not invented.
        </p>
      </Section>
    );
  }
  const shown = chain.contributions.slice(0, LONGEST_LIST);
  const rest = chain.contributions.slice(LONGEST_LIST).reduce((sum, row) => sum + row.share, 0);
  return (
    <Section title="Where the uncertainty comes from">
      <ol className="flex flex-col">
        {shown.map((row) => (
          <Bar
            key={row.uids.join()}
            label={row.label}
            kind={row.kind}
            share={row.share}
            text={shareText(row.share, decimalMark)}
          />
        ))}
        {chain.contributions.length > LONGEST_LIST && (
          <Bar
            label={`${chain.contributions.length - LONGEST_LIST} more`}
            kind=""
            share={rest}
            text={shareText(rest, decimalMark)}
          />
        )}
      </ol>
      {cancellations(chain).map((sentence) => (
        <p key={sentence} className="pt-2 text-ink-2">
          {sentence}
        </p>
      ))}
      {chain.improvements.length > 0 && <Improvements chain={chain} />}
    </Section>
  );
}

function Bar({ label, kind, share, text }: { label: string; kind: string; share: number; text: string }) {
  const width = `${Math.min(100, Math.abs(share) * 100)}%`;
  return (
    <li className="grid min-h-7.5 grid-cols-[minmax(0,1fr)_4.5rem_3.75rem] items-center gap-x-3 border-b border-rule">
      <span className="min-w-0 truncate" title={`${label}, ${kind}`}>
        <span className="font-mono text-sm">{label}</span> <span className="text-sm text-ink-2">{kind}</span>
      </span>
      <span aria-hidden="true" className="h-2.5">
        <span
          className={`block h-full ${share < 0 ? 'border border-dashed border-ink-2' : 'bg-flow'}`}
          style={{ width }}
        />
      </span>
      <span className="text-right">{text}</span>
    </li>
  );
}

function Improvements({ chain }: { chain: ChainResponse }) {
  const k = chain.uncertainty.k;
  return (
    <div className="pt-2">
      <h3 className="text-ink-2">What would help most</h3>
      <ul>
        {chain.improvements.map((row) => (
          <li key={row.action} className="border-b border-rule py-1.5">
            {row.action}: <i className="font-serif">U</i>{' '}
            <Quantity
              value={String(toPlain(row.expandedUNow))}
              kind="uncertainty"
              coverageFactor={k}
              shownIn="auto"
            />{' '}
            to{' '}
            <Quantity
              value={String(toPlain(row.expandedUThen))}
              kind="uncertainty"
              coverageFactor={k}
              shownIn="auto"
            />
          </li>
        ))}
      </ul>
    </div>
  );
}

/** A double as plain decimal text, for the component that draws numbers. */
export function toPlain(value: number): string {
  return value.toFixed(15);
}
