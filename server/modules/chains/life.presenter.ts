import type { ChainLifeResponse, LifeEvent } from '#shared/contracts/chain-life.ts';
import type { User } from '#server/policy/user.ts';
import { seesHistory, valueView } from '#server/policy/value-view.ts';
import type { ChainSubject } from './chains.policy.ts';
import { isImported, type Life, type RecordedEvent } from './life.service.ts';

/** The life as this person may know it: of other laboratories' weights what a traceability statement tells. */
export function presentLife(life: Life, user: User, subject: ChainSubject): ChainLifeResponse {
  const isTold = ({ about, toldTo }: RecordedEvent) => {
    if (about === null || toldTo === 'all') return true;
    if (toldTo === 'holder') return seesHistory(user, about);
    const view = about.id === subject.id ? subject.view : valueView(user, about, 'upstream');
    return view === 'full';
  };
  const events = life.events.filter(isTold).map(presentEvent).toSorted(byDay);
  const days = events.flatMap((event) => [event.inForceFrom, event.recordedOn]).sort();
  return {
    valueUid: life.focus.uid,
    registryNo: life.focus.registryNo,
    from: days[0] ?? life.focus.performedEnd,
    to: [life.today, days.at(-1) ?? life.today].sort().at(-1)!,
    today: life.today,
    events,
  };
}

function presentEvent({ about: _, toldTo: __, ...event }: RecordedEvent): LifeEvent {
  return { ...event, isImported: isImported(event) };
}

function byDay(a: LifeEvent, b: LifeEvent): number {
  return a.inForceFrom < b.inForceFrom ? -1 : Number(a.inForceFrom > b.inForceFrom);
}
