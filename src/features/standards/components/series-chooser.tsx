import { useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { SelectField } from '#src/components/ui/select-field.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { SERIES, seriesMembers, type Division, type SeriesMember, type Stretch } from '../series.ts';
import { NominalField } from './nominal-field.tsx';

/** How a set is divided, marked and shaped. */
export interface SeriesChoice extends Stretch {
  id: string;
  division: Division;
  sign: '*' | '·';
  below1g: 'wire' | 'sheet';
}

/** The series a new form begins with: 25 pieces. */
export const FIRST_CHOICE: SeriesChoice = { ...SERIES[0]!, division: '1-2-2-5', sign: '*', below1g: 'wire' };

interface SeriesChooserProps {
  /** Whether rows were changed by hand since they were last filled in. */
  isEdited: boolean;
  onFill: (members: SeriesMember[]) => void;
}

/** Chooses which weights a set holds; the table below is filled in at once, and never over typed rows unasked. */
export function SeriesChooser({ isEdited, onFill }: SeriesChooserProps) {
  const [choice, setChoice] = useState(FIRST_CHOICE);
  const [isWaiting, setWaiting] = useState(false);

  function fill(from: SeriesChoice): void {
    setWaiting(false);
    const members = seriesMembers(from, from);
    if (members.length > 0) onFill(members);
  }

  function change(part: Partial<SeriesChoice>): void {
    const next = { ...choice, ...part };
    setChoice(next);
    if (isEdited) setWaiting(true);
    else fill(next);
  }

  return (
    <div className="flex flex-col gap-3">
      <div className="flex flex-wrap items-end gap-x-4 gap-y-3">
        <SelectField
          label="Series"
          className="w-60"
          choices={[
            ...SERIES.map((series) => ({
              value: series.id,
              label: `${series.label}, ${seriesMembers(series, choice).length} weights`,
            })),
            { value: 'own', label: 'from … to …' },
          ]}
          value={choice.id}
          onChange={({ target }) =>
            change({ ...SERIES.find((one) => one.id === target.value), id: target.value })
          }
        />
        {choice.id === 'own' && (
          <>
            <NominalField
              label="From"
              className="w-24"
              value={choice.from}
              onChange={(from) => change({ from })}
              error={
                seriesMembers(choice, choice).length === 0 ? 'No nominal lies between these.' : undefined
              }
            />
            <NominalField label="to" className="w-24" value={choice.to} onChange={(to) => change({ to })} />
          </>
        )}
        <Switch
          label="Divided"
          value={choice.division}
          onChange={(division) => change({ division })}
          choices={[
            { value: '1-2-2-5', label: '1-2-2-5' },
            { value: '1-2-5', label: '1-2-5' },
          ]}
        />
        <Switch
          label="Second 2 marked"
          value={choice.sign}
          onChange={(sign) => change({ sign })}
          choices={[
            { value: '*', label: '2*' },
            { value: '·', label: '2·' },
          ]}
        />
        <Switch
          label="Below 1 g"
          value={choice.below1g}
          onChange={(below1g) => change({ below1g })}
          choices={[
            { value: 'wire', label: 'wire' },
            { value: 'sheet', label: 'sheet' },
          ]}
        />
      </div>
      {isWaiting && (
        <Notice
          role="status"
          tone="caution"
          title="Fill the table in anew?"
          answers={
            <>
              <Button weight="text" onClick={() => fill(choice)}>
                Replace the rows
              </Button>
              <Button weight="text" onClick={() => setWaiting(false)}>
                Keep what is typed
              </Button>
            </>
          }
        >
          Rows were changed by hand; they would be lost.
        </Notice>
      )}
    </div>
  );
}
