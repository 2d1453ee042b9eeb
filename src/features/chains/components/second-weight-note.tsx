import { useQuery } from '@tanstack/react-query';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Button } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { chainQuery, covarianceQuery } from '../api.ts';
import type { ChainQuestion } from '../question.ts';
import { isPracticallyNone, secondChosen } from '../second-weight.ts';

interface SecondWeightNoteProps {
  chain: ChainResponse;
  question: ChainQuestion;
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** Which value of a second weight is compared with, what both lean on, and whether that amounts to anything. */
export function SecondWeightNote({ chain, question, onChange }: SecondWeightNoteProps) {
  const uid = question.with === chain.focusUid ? undefined : question.with;
  const days = { day: question.day, known: question.known };
  const { data: second } = useQuery({ ...chainQuery(uid ?? '', days), enabled: uid !== undefined });
  const { data: together } = useQuery({
    ...covarianceQuery(chain.focusUid, uid ?? ''),
    enabled: uid !== undefined,
  });
  const found = uid && second ? secondChosen(chain, second) : null;
  if (!found) return null;
  const { chosen, inThisChain, shared, more } = found;
  return (
    <div className="text-ink-2">
      <p>
        Compared with <span className="font-mono text-sm">{chosen.registryNo}</span> by certificate{' '}
        {chosen.certificateNo}, determined <DateText value={chosen.performedEnd} />.{' '}
        {shared.length > 0 &&
          `Both lean on ${shared.join(', ')}${more > 0 ? ` and ${more} more, small effects counted` : ''}. `}
        {isPracticallyNone(together?.correlation ?? null) &&
          'Their correlation is practically none: below 0.0005, where its sign means nothing.'}
      </p>
      {inThisChain.map((node) => (
        <p key={node.uid}>
          This chain rests on another value of that weight, certificate {node.certificateNo}, determined{' '}
          <DateText value={node.performedEnd} />:{' '}
          <Button weight="text" onClick={() => onChange({ with: node.uid })}>
            compare with that one
          </Button>
        </p>
      ))}
    </div>
  );
}
