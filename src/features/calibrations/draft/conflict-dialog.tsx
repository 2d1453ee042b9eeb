import { useState } from 'react';
import type { DraftContent, DraftResponse } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { compareVersions, mergeVersions, type Difference, type Side } from './compare-versions.ts';
import { fieldWord } from './field-words.ts';
import { useKnown } from './known.ts';
import { usePartWords } from './part-words.ts';

interface ConflictDialogProps {
  mine: DraftContent;
  theirs: DraftResponse;
  /** What both began from, where this browser knows it. */
  base: DraftContent | null;
  onSettled: (content: DraftContent) => void;
  onClose: () => void;
}

/** Two versions of one draft side by side: each differing part is taken from one of them, or one is taken whole. */
export function ConflictDialog({ mine, theirs, base, onSettled, onClose }: ConflictDialogProps) {
  const differences = compareVersions(mine, theirs.content, base);
  const [chosen, setChosen] = useState<ReadonlyMap<string, Side>>(new Map());
  const sideOf = (one: Difference): Side => chosen.get(one.id) ?? one.suggested;
  const settle = (choose: (one: Difference) => Side): void =>
    onSettled(
      mergeVersions(mine, theirs.content, (one) =>
        choose(differences.find(({ id }) => id === one.id) ?? one),
      ),
    );
  return (
    <Dialog
      title="Two versions of this draft"
      onClose={onClose}
      actions={
        <>
          <Button weight="primary" onClick={() => settle(sideOf)}>
            Keep what is chosen
          </Button>
          <Button onClick={() => settle(() => 'mine')}>All of mine</Button>
          <Button onClick={() => settle(() => 'theirs')}>All of theirs</Button>
        </>
      }
    >
      <p className="text-ink-2">
        {theirs.updatedBy} saved a newer version at <DateText value={theirs.updatedAt} />.{' '}
        {differences.length === 0
          ? 'Both versions say the same.'
          : 'Choose part by part what stands; what you changed is chosen already.'}
      </p>
      {differences.length > 0 && (
        <Table caption="Where the two versions differ" isScrolled={differences.length > 8}>
          <thead>
            <tr>
              <Head>Part</Head>
              <Head>Mine</Head>
              <Head>{theirs.updatedBy}</Head>
            </tr>
          </thead>
          <tbody>
            {differences.map((one) => (
              <DifferenceRow
                key={one.id}
                difference={one}
                side={sideOf(one)}
                onChoose={(side) => setChosen(new Map([...chosen, [one.id, side]]))}
              />
            ))}
          </tbody>
        </Table>
      )}
    </Dialog>
  );
}

interface DifferenceRowProps {
  difference: Difference;
  side: Side;
  onChoose: (side: Side) => void;
}

function DifferenceRow({ difference, side, onChoose }: DifferenceRowProps) {
  const words = usePartWords();
  const known = useKnown();
  const { id, field, line } = difference;
  const weight = line && (known.standards.get(line.standardId ?? '')?.marking ?? 'a line');
  const name = [weight, field ? fieldWord(field) : 'the whole line'].filter(Boolean).join(': ');
  const choice = (value: Side) => (
    <Cell>
      <label className="flex min-h-6 items-baseline gap-2">
        <input
          type="radio"
          name={id}
          checked={side === value}
          onChange={() => onChoose(value)}
          aria-label={`${name}, ${value}: ${words(field, difference[value])}`}
        />
        <span className="break-words">{words(field, difference[value])}</span>
      </label>
    </Cell>
  );
  return (
    <Row>
      <Cell isHeading>{line || field !== null ? name : ''}</Cell>
      {choice('mine')}
      {choice('theirs')}
    </Row>
  );
}
