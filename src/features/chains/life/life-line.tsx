import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { ChainLifeResponse, LifeEvent } from '#shared/contracts/chain-life.ts';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { chainLifeQuery } from '../api.ts';
import type { ChainQuestion } from '../question.ts';
import { ClockTrack } from './clock-track.tsx';
import { rankOf, sentenceOf } from './event-words.ts';
import { axisOf, placeOf, type Clock, type LifeAxis } from './life-axis.ts';
import { placedWords } from './placed-words.ts';
import { useWidth } from './use-width.ts';

interface LifeLineProps {
  valueUid: string;
  /** The days that the answer is about. */
  answered: { day: string; known: string };
  /** A step along the line: replaces the address, and leaves no trail of days behind. */
  onStep: (change: Partial<ChainQuestion>) => void;
}

/** The weight's life on its two clocks, one line below the other; what differs between them leans. */
export function LifeLine({ valueUid, answered, onStep }: LifeLineProps) {
  const { data: life, error, refetch } = useQuery(chainLifeQuery(valueUid));
  return (
    <section aria-label="The weight’s life" className="text-sm print:hidden">
      {life && <Clocks life={life} answered={answered} onStep={onStep} />}
      {error && !life && <ErrorNotice error={error} onRetry={() => void refetch()} />}
    </section>
  );
}

function Clocks({
  life,
  answered,
  onStep,
}: { life: ChainLifeResponse } & Pick<LifeLineProps, 'answered' | 'onStep'>) {
  const axis = axisOf(life);
  const clock = useClocks(axis, answered, onStep);
  const [day, known] = [clock('day'), clock('known')];
  // The day on which a programme runs out is reckoned, not recorded: it lies on one clock only.
  const recorded = life.events.filter((event) => event.kind !== 'due');
  return (
    <>
      <ClockTrack clock="day" label="In force on" axis={axis} events={life.events} {...day} />
      <Between axis={axis} events={life.events} recorded={recorded} />
      <ClockTrack clock="known" label="As known on" axis={axis} events={recorded} {...known} />
      <Latest events={life.events} day={day.moving ?? day.value} known={known.moving ?? known.value} />
    </>
  );
}

/** The handles: where each is held while it moves, and the question that they ask once one rests. */
function useClocks(axis: LifeAxis, answered: LifeLineProps['answered'], onStep: LifeLineProps['onStep']) {
  const from = `${answered.day} ${answered.known}`;
  const [held, setHeld] = useState<{ from: string; days: Partial<Record<Clock, string>> }>({
    from,
    days: {},
  });
  // Once another answer is there, the handles are where that answer is.
  const days = held.from === from ? held.days : {};
  const hold = (clock: Clock, day: string) => {
    const next = { ...days, [clock]: day };
    setHeld({ from, days: next });
    return next;
  };
  return (clock: Clock) => ({
    value: answered[clock],
    moving: days[clock] ?? null,
    onMove: (day: string) => void hold(clock, day),
    // Both are asked for: the other may have come to rest while this one moved.
    onRest: (day: string) => {
      const asked = Object.entries(hold(clock, day));
      if (asked.every(([name, at]) => at === answered[name as Clock])) return;
      onStep(Object.fromEntries(asked.map(([name, at]) => [name, at === axis.today ? undefined : at])));
    },
  });
}

/** The words of the events, and a hairline for each from the day it counts to the day it was recorded. */
function Between({
  axis,
  events,
  recorded,
}: {
  axis: LifeAxis;
  events: readonly LifeEvent[];
  recorded: readonly LifeEvent[];
}) {
  const [ref, width] = useWidth();
  return (
    <div className="ml-50 max-sm:ml-0" aria-hidden="true">
      <div ref={ref} className="relative h-5 overflow-hidden text-xs text-ink-2">
        <svg className="absolute inset-0 size-full" viewBox="0 0 100 20" preserveAspectRatio="none">
          {recorded.map((event, at) => (
            <line
              key={at}
              x1={placeOf(axis, event.inForceFrom) * 100}
              y1="0"
              x2={placeOf(axis, event.recordedOn) * 100}
              y2="20"
              stroke="var(--rule)"
              vectorEffect="non-scaling-stroke"
            />
          ))}
        </svg>
        {placedWords(axis, events, width).map(({ key, word, left }) => (
          <span key={key} className="absolute top-0.5 bg-paper px-0.5 whitespace-nowrap" style={{ left }}>
            {word}
          </span>
        ))}
      </div>
    </div>
  );
}

/** The last thing that had happened by the day, as known by then: what the handles stand at, in words. */
function Latest({ events, day, known }: { events: readonly LifeEvent[]; day: string; known: string }) {
  const by = events.filter((event) => event.inForceFrom <= day && event.recordedOn <= known);
  const last = by.toSorted((a, b) => b.inForceFrom.localeCompare(a.inForceFrom) || rankOf(a) - rankOf(b))[0];
  return (
    <p className="flex flex-wrap justify-between gap-x-4 text-ink-2">
      <span>
        {last ? `Last by then, ${last.inForceFrom}: ${sentenceOf(last)}.` : 'Nothing had happened by then.'}
      </span>
      <span className="text-ink-3 max-sm:hidden">not to scale</span>
    </p>
  );
}
