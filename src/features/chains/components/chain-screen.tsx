import { lazy, Suspense, useState, type ReactNode } from 'react';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Stack, TwoColumns } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Coverage, Quantity } from '#src/components/ui/quantity.tsx';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { CompareWith } from '../changes/compare-with.tsx';
import { isCompared, type ChainQuestion } from '../question.ts';
import { BothChains } from './both-chains.tsx';
import { ChainHead } from './chain-head.tsx';
import { BothKinds } from './both-kinds.tsx';
import { Contributions } from './contributions.tsx';
import { LinkTable } from './link-table.tsx';
import { NotYetNotice, SucceededNotice } from './not-yet-notice.tsx';
import { OtherRules } from './other-rules.tsx';
import { QuestionBar } from './question-bar.tsx';
import { SelectionSheet, type ValueNode } from './selection-sheet.tsx';
import { SecondWeightNote } from './second-weight-note.tsx';
import { Verdict } from './verdict.tsx';

/** The drawing brings reactflow and dagre: fetched with the screen, not with the application. */
const ChainGraph = lazy(() =>
  import('../graph/chain-graph.tsx').then((module) => ({ default: module.ChainGraph })),
);

/** The line of the weight's life comes with the drawing; its place is kept meanwhile. */
const LifeLine = lazy(() => import('../life/life-line.tsx').then((module) => ({ default: module.LifeLine })));

/** Two answers laid over each other: fetched when somebody compares. */
const Comparison = lazy(() =>
  import('../changes/comparison.tsx').then((module) => ({ default: module.Comparison })),
);

interface ChainScreenProps {
  chain: ChainResponse;
  question: ChainQuestion;
  /** A step along a line replaces the address instead of adding to the way back. */
  onChange: (change: Partial<ChainQuestion>, isStep?: boolean) => void;
  actionsFor: (node: ValueNode) => ReactNode;
  /** The address of another value's chain, on the same days. */
  hrefOf: (valueUid: string) => string;
  /** Actions for the whole chain, at the foot of the side. */
  actions?: ReactNode;
}

/** The heart: the weight at the bottom, the SI at the top, and what flows between them. */
export function ChainScreen({ chain, question, onChange, actionsFor, hrefOf, actions }: ChainScreenProps) {
  const focus = chain.nodes.find(
    (node): node is ValueNode => node.uid === chain.focusUid && node.type === 'value',
  )!;
  const select = (at: string) => onChange({ at });
  const [marks, setMarks] = useState<ReadonlyMap<string, string>>();
  const comparing = isCompared(question);
  return (
    <Page
      title={titleOf(focus)}
      sub={<ChainHead chain={chain} focus={focus} hrefOf={hrefOf} />}
      value={
        <Quantity
          value={decimalText(new Decimal(focus.nominal).plus(focus.deviation))}
          expandedUncertainty={focus.expandedU}
          coverageFactor={focus.k}
          isOfRecord
        />
      }
      valueNote={
        <>
          {focus.quantity}
          {focus.k ? (
            <>
              , <Coverage coverageFactor={focus.k} />
            </>
          ) : (
            ', U not stated'
          )}
        </>
      }
    >
      <NotYetNotice chain={chain} hrefOf={hrefOf} />
      <SucceededNotice chain={chain} hrefOf={hrefOf} />
      <OtherRules asked={question.rules} chain={chain} onDrop={() => onChange({ rules: undefined }, true)} />
      <QuestionBar question={question} answered={chain.question} onChange={onChange} />
      <Stack gap="tight">
        <div className="min-h-26 max-sm:min-h-38">
          <Suspense>
            <LifeLine
              valueUid={chain.focusUid}
              answered={chain.question}
              onStep={(change) => onChange(change, true)}
            />
          </Suspense>
        </div>
        {comparing ? (
          <Suspense fallback={<Waiting>Fetching the comparison</Waiting>}>
            <Comparison chain={chain} question={question} onChange={onChange} onMarks={setMarks} />
          </Suspense>
        ) : (
          <CompareWith focus={focus} question={question} answered={chain.question} onChange={onChange} />
        )}
      </Stack>
      <TwoColumns
        isSideFirstOnPhones
        isStacked={question.place === 'wide'}
        side={
          <>
            <Verdict chain={chain} question={question} onChange={onChange} />
            <BothChains chain={chain} />
            <LinkTable chain={chain} question={question} onChange={onChange} />
            <Contributions chain={chain} />
            <BothKinds chain={chain} />
            {actions}
          </>
        }
      >
        <Section title={<span className="sr-only">The chain, drawn</span>}>
          <SecondWeightNote {...{ chain, question, onChange }} />
          {isNothingFailing(chain, question) ? (
            <NothingFails onShowAll={() => onChange({ only: undefined })} />
          ) : (
            <Suspense fallback={<Waiting>Fetching the drawing</Waiting>}>
              <ChainGraph
                chain={chain}
                question={question}
                onSelect={select}
                onChange={onChange}
                marks={comparing ? marks : undefined}
              />
            </Suspense>
          )}
        </Section>
      </TwoColumns>
      {question.at && (
        <SelectionSheet
          chain={chain}
          at={question.at}
          onClose={() => onChange({ at: undefined })}
          actionsFor={actionsFor}
        />
      )}
    </Page>
  );
}

function isNothingFailing(chain: ChainResponse, { only, verdict }: ChainQuestion): boolean {
  return only === 'fails' && !chain.links.some((link) => ['broken', 'caution'].includes(link[verdict]));
}

/** In the drawing's place where only what fails was asked for. */
function NothingFails({ onShowAll }: { onShowAll: () => void }) {
  return (
    <EmptyState
      action={
        <Button weight="text" onClick={onShowAll}>
          Draw the whole chain
        </Button>
      }
    >
      No link fails a check.
    </EmptyState>
  );
}

function titleOf(focus: ValueNode): string {
  return `${focus.registryNo}, ${nominalText(focus.nominal)}${focus.class ? `, class ${focus.class}` : ''}`;
}
