import { useEffect, useRef, useState, type KeyboardEvent, type PointerEvent } from 'react';
import type { LifeEvent } from '#shared/contracts/chain-life.ts';
import { EventMark } from './event-mark.tsx';
import { sentenceOf } from './event-words.ts';
import {
  dayOn,
  daysLater,
  lastOf,
  nextStop,
  numberOf,
  placeOf,
  snapped,
  stopsOf,
  type Clock,
  type LifeAxis,
} from './life-axis.ts';

/** A finger means the event that it nearly touches, px. */
const REACH = 8;
/** The keyboard rests when no key was pressed for this long: only then is the chain asked anew. */
const REST_MILLISECONDS = 350;

interface ClockTrackProps {
  clock: Clock;
  label: string;
  axis: LifeAxis;
  events: readonly LifeEvent[];
  /** The day that the answer is about. */
  value: string;
  /** While the handle moves; null once it rests where the answer is. */
  moving: string | null;
  onMove: (day: string) => void;
  onRest: (day: string) => void;
}

/** One clock: a line with the events on it and one handle. Arrows go from event to event, up and down by a day. */
export function ClockTrack(props: ClockTrackProps) {
  const { clock, label, axis, events, value, moving } = props;
  const track = useRef<HTMLDivElement>(null);
  const [isHeld, setHeld] = useState(false);
  const day = moving ?? value;
  const handlers = useHandle(props, track, day, setHeld);
  const place = placeOf(axis, day) * 100;
  const onDay = events.filter((event) => dayOn(event, clock) === day);
  return (
    <div className="flex items-center gap-3 max-sm:flex-wrap max-sm:gap-y-0">
      <span className="w-24 flex-none text-ink-2 max-sm:w-auto">{label}</span>
      <span className="w-20 flex-none max-sm:ml-auto max-sm:w-auto">{day}</span>
      <div
        ref={track}
        className="relative h-8 min-w-0 flex-1 cursor-pointer touch-pan-y max-sm:basis-full pointer-coarse:h-11"
        {...handlers.track}
      >
        <div className="absolute inset-x-0 top-1/2 border-t border-ink-3" />
        {events.map((event, at) => (
          <EventMark
            key={at}
            event={event}
            place={placeOf(axis, dayOn(event, clock)) * 100}
            isFaint={dayOn(event, clock) > day}
          />
        ))}
        <div
          role="slider"
          tabIndex={0}
          aria-label={label}
          aria-valuemin={numberOf(axis.from)}
          aria-valuemax={numberOf(lastOf(axis, clock))}
          aria-valuenow={numberOf(day)}
          aria-valuetext={[day, ...onDay.map(sentenceOf)].join(': ')}
          className={`absolute top-1/2 size-4 -translate-1/2 rounded-full border-2 border-brass ${isHeld ? 'bg-brass' : 'bg-raised'}`}
          style={{ left: `${place}%` }}
          {...handlers.handle}
        />
      </div>
    </div>
  );
}

function useHandle(
  { clock, axis, events, onMove, onRest }: ClockTrackProps,
  track: React.RefObject<HTMLDivElement | null>,
  day: string,
  setHeld: (isHeld: boolean) => void,
) {
  const rest = useRef<ReturnType<typeof setTimeout>>(undefined);
  useEffect(() => () => clearTimeout(rest.current), []);
  const stops = stopsOf(axis, events, clock);
  const dayUnder = ({ clientX }: PointerEvent) => {
    const { left, width } = track.current!.getBoundingClientRect();
    return snapped(axis, stops, (clientX - left) / width, REACH / width, clock);
  };
  const isDragged = (event: PointerEvent) => event.currentTarget.hasPointerCapture(event.pointerId);
  const byKey: Record<string, () => string> = {
    ArrowLeft: () => nextStop(stops, day, -1),
    ArrowRight: () => nextStop(stops, day, 1),
    ArrowDown: () => daysLater(axis, day, -1, clock),
    ArrowUp: () => daysLater(axis, day, 1, clock),
    Home: () => axis.from,
    End: () => lastOf(axis, clock),
  };
  return {
    track: {
      onPointerDown: (event: PointerEvent) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        setHeld(true);
        onMove(dayUnder(event));
      },
      onPointerMove: (event: PointerEvent) => isDragged(event) && onMove(dayUnder(event)),
      onPointerUp: (event: PointerEvent) => {
        if (isDragged(event)) onRest(dayUnder(event));
        setHeld(false);
      },
      onPointerCancel: () => {
        setHeld(false);
        onRest(day);
      },
    },
    handle: {
      onKeyDown: (event: KeyboardEvent) => {
        const next = byKey[event.key]?.();
        if (next === undefined) return;
        event.preventDefault();
        onMove(next);
        clearTimeout(rest.current);
        rest.current = setTimeout(() => onRest(next), REST_MILLISECONDS);
      },
    },
  };
}
