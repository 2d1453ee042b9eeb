import { lazy, Suspense, useState } from 'react';
import { Link } from 'react-router';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { can } from '#src/lib/abilities.ts';

/** The form and its library are fetched when they are asked for. */
const EpochDialog = lazy(() =>
  import('./epoch-dialog.tsx').then((module) => ({ default: module.EpochDialog })),
);

/** The stretches of the weight's life; nothing is drawn, fitted or compared across their ends. */
export function EpochSection({ sheet }: { sheet: StandardResponse }) {
  const [isOpening, setOpening] = useState(false);
  const canChange = can(sheet, 'standard:change');
  if (!canChange && sheet.epochs.length < 2) return null;
  return (
    <Section
      title="Epochs"
      actions={
        canChange && (
          <Button weight="text" onClick={() => setOpening(true)}>
            Open a new epoch
          </Button>
        )
      }
    >
      <Facts
        facts={sheet.epochs
          .toReversed()
          .map(
            (epoch) =>
              [
                `Epoch ${epoch.n}`,
                <EpochText key={epoch.n} epoch={epoch} standardId={sheet.standard.id} />,
              ] as const,
          )}
      />
      {isOpening && (
        <Suspense fallback={null}>
          <EpochDialog sheet={sheet} onClose={() => setOpening(false)} />
        </Suspense>
      )}
    </Section>
  );
}

function EpochText({ epoch, standardId }: { epoch: StandardResponse['epochs'][number]; standardId: string }) {
  return (
    <>
      {epoch.reason}, from <DateText value={epoch.beginsOn} />
      {epoch.lastGoodOn && (
        <>
          ; last known good <DateText value={epoch.lastGoodOn} />,{' '}
          <Link
            to={paths.exposure.href(standardId, { lastGood: epoch.lastGoodOn, firstBad: epoch.beginsOn })}
            className="underline underline-offset-3"
          >
            what leaned on it in between
          </Link>
        </>
      )}
      {epoch.note && <span className="block text-sm text-ink-2">{epoch.note}</span>}
    </>
  );
}
