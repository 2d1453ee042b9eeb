import { useQuery } from '@tanstack/react-query';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { chainLifeQuery } from '../api.ts';
import type { ValueNode } from '../components/selection-sheet.tsx';
import { pinned, type ChainQuestion } from '../question.ts';
import { CopyLink } from './copy-link.tsx';

interface CompareWithProps {
  focus: ValueNode;
  question: ChainQuestion;
  answered: ChainResponse['question'];
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** Where a comparison starts: the answer above beside that of another day, or of the other reading of its links. */
export function CompareWith({ focus, question, answered, onChange }: CompareWithProps) {
  const { data: life } = useQuery(chainLifeQuery(focus.uid));
  const issued = life?.events.find((event) => event.kind === 'issued' && event.valueUid === focus.uid);
  const { day, known, as } = answered;
  const otherAs = as === 'certified' ? 'now known' : 'certified';
  const then = (thenDay: string, thenKnown: string, thenAs: ChainQuestion['as']) =>
    onChange({ thenDay, thenKnown, thenAs });
  return (
    <Toolbar label="Compare">
      <span className="text-ink-2">Compare with</span>
      <Button
        weight="text"
        onClick={() => then(focus.issuedOn, issued?.recordedOn ?? focus.issuedOn, 'certified')}
      >
        when it was certified
      </Button>
      <Button weight="text" onClick={() => then(day, known, otherAs)}>
        {otherAs === 'certified' ? 'its links as certified' : 'its links as now known'}
      </Button>
      <Button weight="text" onClick={() => then(day, known, as)}>
        another day
      </Button>
      <CopyLink parameters={pinned(question, answered)} />
    </Toolbar>
  );
}
