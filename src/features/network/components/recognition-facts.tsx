import type { LaboratoryResponse } from '#shared/contracts/network.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { stateOfRecognition } from '../recognition.ts';

/** One recognition as it stands today: by whom, under which number and arrangement, since when. */
export function RecognitionFacts({
  recognition,
}: {
  recognition: LaboratoryResponse['recognitions'][number];
}) {
  return (
    <Facts
      facts={[
        ['Kind', recognition.kind],
        ['Stands', <StateMark state={stateOfRecognition(recognition.state)}>{recognition.state}</StateMark>],
        ['By', recognition.body],
        ['Number', <span className="font-mono text-sm">{recognition.number}</span>],
        ['Arrangement', recognition.arrangement],
        [
          'Valid',
          <>
            since <DateText value={recognition.validFrom} />
            {recognition.validTo && (
              <>
                {' to '}
                <DateText value={recognition.validTo} />
              </>
            )}
          </>,
        ],
      ]}
    />
  );
}
