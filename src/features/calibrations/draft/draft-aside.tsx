import { memo } from 'react';
import type { IssuedResponse } from '#shared/contracts/calibrations.ts';
import { ChecksAside } from './checks-aside.tsx';
import { DraftActions } from './draft-actions.tsx';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';
import { HeavyWeights } from './heavy-weights.tsx';
import { useKnown } from './known.ts';
import { OpenPoints } from './open-points.tsx';
import { Questions } from './questions.tsx';
import { ReferencesAside } from './references-aside.tsx';
import { ResultsAside } from './results-aside.tsx';

/** Where the person goes once the draft has come to its end. */
export interface DraftEnds {
  onIssued: (issued: IssuedResponse) => void;
  onDiscarded: () => void;
}

interface DraftAsideProps {
  values: DraftValues;
  issuerName: string;
  openPoints: number;
  saveNow: () => Promise<boolean>;
  ends: DraftEnds;
}

/** What the entries mean right now, and what can be done with them. */
export const DraftAside = memo(function DraftAside({
  values,
  issuerName,
  openPoints,
  saveNow,
  ends,
}: DraftAsideProps) {
  const { draft, points } = useDraft();
  const known = useKnown();
  const { lines } = values;
  const weightOf = (at: number) => known.standards.get(lines[at]?.standardId ?? '')?.marking ?? null;
  const chosen = lines.flatMap(({ standardId }) => known.standards.get(standardId ?? '') ?? []);
  return (
    <>
      <HeavyWeights standards={chosen} />
      <ResultsAside lines={lines} />
      <Questions points={points} weightOf={weightOf} />
      {draft ? (
        <OpenPoints points={points} weightOf={weightOf} />
      ) : (
        <p className="text-ink-2">
          Copy what the certificate says. What is still missing, and how the results stand against their
          references and limits, is said here while you type.
        </p>
      )}
      <ReferencesAside lines={lines} />
      {draft && <ChecksAside checks={draft.checks} weightOf={weightOf} />}
      {draft && <DraftActions {...{ draft, issuerName, openPoints, saveNow, ...ends }} />}
    </>
  );
});
