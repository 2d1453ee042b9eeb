import { useQuery } from '@tanstack/react-query';
import { useEffect, useMemo } from 'react';
import { CHANGE_GROUPS, type Change } from '#shared/chain-changes/change.ts';
import { marksOf, whatChanged } from '#shared/chain-changes/what-changed.ts';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { chainQuery } from '../api.ts';
import type { ChainQuestion } from '../question.ts';

interface ComparisonProps {
  chain: ChainResponse;
  question: ChainQuestion;
  onChange: (change: Partial<ChainQuestion>) => void;
  /** Gets the words for the drawing. */
  onMarks: (marks: ReadonlyMap<string, string> | undefined) => void;
}

/** The answer beside another answer about the same value: what changed between them, the gravest first. */
export function Comparison({ chain, question, onChange, onMarks }: ComparisonProps) {
  const { thenDay, thenKnown, thenAs = 'certified' } = question;
  const { data: then, error } = useQuery(
    chainQuery(chain.focusUid, { day: thenDay, known: thenKnown, as: thenAs }),
  );
  const { decimalMark, uncertainty } = usePreferences();
  const changes = useMemo(
    () => then && whatChanged(then, chain, { decimalMark, uncertainty }),
    [then, chain, decimalMark, uncertainty],
  );
  useEffect(() => {
    onMarks(changes && marksOf(changes));
  }, [changes, onMarks]);
  const { day, known, as } = chain.question;
  return (
    <Section
      title="What changed"
      actions={
        <>
          <Button
            weight="text"
            onClick={() =>
              onChange({
                day: thenDay,
                known: thenKnown,
                as: thenAs,
                thenDay: day,
                thenKnown: known,
                thenAs: as,
              })
            }
          >
            Swap the two
          </Button>
          <Button
            weight="text"
            onClick={() => onChange({ thenDay: undefined, thenKnown: undefined, thenAs: undefined })}
          >
            End the comparison
          </Button>
        </>
      }
    >
      <Toolbar label="The answer compared with">
        <span className="leading-8 text-ink-2">Since the answer</span>
        <DayField
          label="in force on"
          value={thenDay ?? then?.question.day ?? ''}
          onDay={(next) => onChange({ thenDay: next })}
        />
        <DayField
          label="as known on"
          value={thenKnown ?? then?.question.known ?? ''}
          onDay={(next) => onChange({ thenKnown: next })}
        />
        <Switch
          label="Its links"
          isLabelHidden
          value={thenAs}
          onChange={(next) => onChange({ thenAs: next })}
          choices={[
            { value: 'certified', label: 'As certified' },
            { value: 'now known', label: 'As now known' },
          ]}
        />
      </Toolbar>
      {error && <ErrorNotice error={error} />}
      {!changes && !error && <Waiting>Laying the two answers over each other</Waiting>}
      {changes && <ChangeList changes={changes} selected={question.at} onChange={onChange} />}
    </Section>
  );
}

interface ChangeListProps {
  changes: readonly Change[];
  selected: string | undefined;
  onChange: ComparisonProps['onChange'];
}

function ChangeList({ changes, selected, onChange }: ChangeListProps) {
  if (changes.length === 0) return <p role="status">Nothing differs between the two answers.</p>;
  return (
    <div role="status" className="gap-x-8 columns:columns-2">
      {CHANGE_GROUPS.map((group) => {
        const rows = changes.filter((change) => change.group === group);
        if (rows.length === 0) return null;
        return (
          <div key={group} className="mb-3 break-inside-avoid">
            <h3 className="border-b border-rule pb-0.5 text-sm text-ink-2">{group}</h3>
            <ul>
              {rows.map((change) => (
                <li key={change.says} className="border-b border-rule py-1">
                  <Statement change={change} isSelected={selected === change.at} onChange={onChange} />
                </li>
              ))}
            </ul>
          </div>
        );
      })}
    </div>
  );
}

function Statement({
  change,
  isSelected,
  onChange,
}: {
  change: Change;
  isSelected: boolean;
  onChange: ComparisonProps['onChange'];
}) {
  const { at, says, why } = change;
  return (
    <>
      {at === null ? (
        <p>{says}</p>
      ) : (
        <button
          type="button"
          className={`w-full text-left hover:underline hover:decoration-brass ${isSelected ? 'text-brass' : ''}`}
          aria-pressed={isSelected}
          onClick={() => onChange({ at })}
        >
          {says}
        </button>
      )}
      {why.map((sentence) => (
        <p key={sentence} className="text-sm text-ink-2">
          {sentence}
        </p>
      ))}
    </>
  );
}
