import { useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { chainChoicesQuery } from '../api.ts';
import type { ChainQuestion } from '../question.ts';
import { closeGroup } from './opened-groups.ts';
import type { Drawn } from './use-drawing.ts';

interface DrawingBarProps {
  drawn: Drawn;
  question: ChainQuestion;
  focusUid: string;
  second: ChainResponse | null;
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** How the chain is drawn: folded, as wide as the page, beside a second weight. */
export function DrawingBar({ drawn, question, focusUid, second, onChange }: DrawingBarProps) {
  return (
    <div className="flex flex-col gap-1.5 pb-2 print:hidden">
      <Toolbar label="How it is drawn">
        <SecondWeightField {...{ question, focusUid, second, onChange }} />
        <Checkbox
          label="Fold by laboratory"
          checked={question.fold === 'laboratory'}
          onChange={(event) =>
            onChange({ fold: event.target.checked ? 'laboratory' : undefined, open: undefined })
          }
        />
        <Checkbox
          label="Page-wide"
          checked={question.place === 'wide'}
          onChange={(event) => onChange({ place: event.target.checked ? 'wide' : undefined })}
        />
      </Toolbar>
      <Said drawn={drawn} question={question} />
      <Opened drawn={drawn} question={question} onChange={onChange} />
    </div>
  );
}

/** What is not drawn one by one, and why. */
function Said({ drawn, question }: Pick<DrawingBarProps, 'drawn' | 'question'>) {
  const groups = drawn.chain.nodes.flatMap((node) => (node.type === 'group' ? [node] : []));
  const inside = groups.reduce((sum, group) => sum + group.members.length, 0);
  const isUnasked = drawn.foldedBy !== null && !question.fold;
  return (
    <div role="status" className="text-sm text-ink-2">
      {isUnasked && (
        <p>
          More than 300 plates: {inside} values of one laboratory, class and nominal stand in {groups.length}{' '}
          groups. A press opens a group in place; the table holds every link.
        </p>
      )}
      {!isUnasked && drawn.foldedBy !== null && (
        <p>
          {groups.length === 0
            ? 'No two neighbours come from one laboratory: nothing to fold.'
            : `${inside} values stand in ${groups.length} ${groups.length === 1 ? 'group' : 'groups'}; a press opens one in place.`}
        </p>
      )}
      {question.only === 'fails' && drawn.soundLeftOut > 0 && (
        <p>
          Drawn: what fails and the widest way from there to the weight. {drawn.soundLeftOut}{' '}
          {drawn.soundLeftOut === 1 ? 'plate' : 'plates'} beside it left out.
        </p>
      )}
    </div>
  );
}

/** The groups that are open, each to be closed again. */
function Opened({ drawn, question, onChange }: Pick<DrawingBarProps, 'drawn' | 'question' | 'onChange'>) {
  if (drawn.opened.size === 0) return null;
  return (
    <p className="flex flex-wrap items-baseline gap-x-3 text-sm text-ink-2">
      Opened:
      {[...drawn.opened].map(([key, label]) => (
        <Button
          key={key}
          weight="text"
          aria-label={`Fold ${label} again`}
          onClick={() => onChange({ open: closeGroup(question.open, key) })}
        >
          {label}
        </Button>
      ))}
      {drawn.opened.size > 1 && (
        <Button weight="text" onClick={() => onChange({ open: undefined })}>
          Fold all
        </Button>
      )}
    </p>
  );
}

function SecondWeightField({
  question,
  focusUid,
  second,
  onChange,
}: Pick<DrawingBarProps, 'question' | 'focusUid' | 'second' | 'onChange'>) {
  const client = useQueryClient();
  const [chosen, setChosen] = useState<ComboboxOption | null>(null);
  const named = chosen?.id === question.with ? chosen : (second && optionOf(second)) || null;
  const search = async (text: string): Promise<ComboboxOption[]> => {
    const { values } = await client.query({ ...chainChoicesQuery(text), staleTime: 10_000 });
    return values
      .filter((value) => value.uid !== focusUid)
      .map(({ uid, registryNo, nominal, certificateNo, quantity }) => ({
        id: uid,
        label: registryNo,
        detail: `${nominalText(nominal)}, ${quantity}, ${certificateNo}`,
      }));
  };
  return (
    <Combobox
      label="Compare with a second weight"
      className="w-64"
      placeholder="Registry number"
      value={question.with ? named : null}
      search={search}
      emptyText="No value in force that you read in full has this number"
      onChange={(option) => {
        setChosen(option);
        onChange({ with: option?.id });
      }}
    />
  );
}

function optionOf(chain: ChainResponse): ComboboxOption | null {
  const focus = chain.nodes.find((node) => node.uid === chain.focusUid);
  return focus?.type === 'value' ? { id: focus.uid, label: focus.registryNo } : null;
}
