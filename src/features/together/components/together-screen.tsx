import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { findValues } from '#src/lib/find-values.ts';
import { togetherQuery } from '../api.ts';
import type { Placed } from '../search.ts';
import { CombinedSection } from './combined-section.tsx';
import { CorrelationSection } from './correlation-section.tsx';
import { PlacedList } from './placed-list.tsx';
import { SharedSection } from './shared-section.tsx';

const MOST = 20;

interface TogetherScreenProps {
  placed: readonly Placed[];
  onPlaced: (placed: readonly Placed[]) => void;
}

/** Several weights on the pans of one balance: what they share, and the uncertainty of their sum and difference. */
export function TogetherScreen({ placed, onPlaced }: TogetherScreenProps) {
  // The box is empty again after each weight it found.
  const [asked, setAsked] = useState(0);
  const answer = useQuery({
    ...togetherQuery(placed),
    enabled: placed.length > 1,
    placeholderData: keepPreviousData,
  });
  const together = placed.length > 1 ? answer.data : undefined;
  const add = (chosen: ComboboxOption | null) => {
    if (!chosen) return;
    setAsked(asked + 1);
    if (!placed.some(({ uid }) => uid === chosen.id)) onPlaced([...placed, { uid: chosen.id, sign: 1 }]);
  };
  return (
    <Page
      title="Weights together"
      sub="On one pan of a balance or on the other: what they share, and how certain their sum and their difference are."
    >
      <TwoColumns
        sideWidth="normal"
        side={
          <>
            <Section title="On the pans">
              {placed.length > 0 && (
                <PlacedList
                  {...{ placed, together, onPlaced }}
                  isAlone={placed.length === 1 || answer.isError}
                />
              )}
              {placed.length < MOST && (
                <Combobox
                  key={asked}
                  label={placed.length === 0 ? 'A weight' : 'A further weight'}
                  hint="By registry number"
                  value={null}
                  onChange={add}
                  search={findValues}
                />
              )}
            </Section>
            {together && <SharedSection together={together} />}
          </>
        }
      >
        {placed.length < 2 && (
          <EmptyState>
            {placed.length === 0
              ? 'Choose two weights or more. Weights that lean on the same references are not independent: their sum is less certain than it looks, their difference more certain.'
              : 'One weight lies on the pan. Choose a second one.'}
          </EmptyState>
        )}
        {answer.error && placed.length > 1 && (
          <ErrorNotice error={answer.error} onRetry={() => void answer.refetch()} />
        )}
        {placed.length > 1 && answer.isPending && <Waiting>Working it out</Waiting>}
        {together && !answer.error && (
          <>
            <CombinedSection together={together} />
            <CorrelationSection together={together} />
          </>
        )}
      </TwoColumns>
    </Page>
  );
}
