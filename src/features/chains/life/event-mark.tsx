import type { LifeEvent } from '#shared/contracts/chain-life.ts';
import { sentenceOf } from './event-words.ts';

/** One shape a kind, so that no mark is told by its colour alone. 12 by 12 units. */
const SHAPES: Record<LifeEvent['kind'], { path: string; colour: string; isFilled?: true }> = {
  calibrated: { path: 'M6 2V10', colour: 'text-ink-2' },
  issued: { path: 'M6 1.5a4.5 4.5 0 1 0 .01 0Z', colour: 'text-sound', isFilled: true },
  're-issued': { path: 'M6 1.5a4.5 4.5 0 1 0 .01 0Z', colour: 'text-ink-2' },
  superseded: { path: 'M6 1.5 11 10.5H1Z', colour: 'text-caution', isFilled: true },
  withdrawn: { path: 'M2 2 10 10M10 2 2 10', colour: 'text-broken' },
  notice: { path: 'M6 1 11 6 6 11 1 6Z', colour: 'text-unjudged', isFilled: true },
  epoch: { path: 'M2 2V10H10V2Z', colour: 'text-ink' },
  due: { path: 'M1.5 2H10.5L6 10.5Z', colour: 'text-caution' },
};

interface EventMarkProps {
  event: LifeEvent;
  /** Along the line, percent. */
  place: number;
  /** It lies after the handle: by that day it was not yet so. */
  isFaint: boolean;
}

/** An event on the line of a clock. The words stand below the line and at the handle. */
export function EventMark({ event, place, isFaint }: EventMarkProps) {
  const { path, colour, isFilled } = SHAPES[event.kind];
  return (
    <svg
      viewBox="0 0 12 12"
      className={`absolute top-1/2 size-3 -translate-1/2 ${colour} ${isFaint ? 'opacity-45' : ''}`}
      style={{ left: `${place}%` }}
      aria-hidden="true"
    >
      <title>{sentenceOf(event)}</title>
      <path
        d={path}
        stroke="currentColor"
        strokeWidth="1.8"
        fill={isFilled ? 'currentColor' : 'var(--paper)'}
      />
    </svg>
  );
}
