import type { LifeEvent } from '#shared/contracts/chain-life.ts';

const WORDS: Record<LifeEvent['kind'], string> = {
  calibrated: 'calibrated',
  issued: 'issued',
  're-issued': 're-issued',
  superseded: 'superseded',
  withdrawn: 'withdrawn',
  notice: 'notice',
  epoch: 'altered',
  due: 'due',
};

/** What tells most of an event's weight is named first where words do not fit beside each other. */
const GRAVEST_FIRST: LifeEvent['kind'][] = [
  'withdrawn',
  'superseded',
  'notice',
  'epoch',
  'issued',
  'due',
  're-issued',
  'calibrated',
];

/** The one word of an event on the line. */
export function wordOf(event: LifeEvent): string {
  const word = event.kind === 'epoch' ? event.what : WORDS[event.kind];
  return event.isImported ? `${word}, imported` : word;
}

/** The rank of an event among those that fall together: 0 is the gravest. */
export function rankOf(event: LifeEvent): number {
  return GRAVEST_FIRST.indexOf(event.kind);
}

/** An event in one sentence, with its dates where they differ. */
export function sentenceOf(event: LifeEvent): string {
  const what = {
    calibrated: `${event.registryNo} calibrated, certificate ${event.what}`,
    issued: `certificate ${event.what} for ${event.registryNo} issued`,
    're-issued': `certificate ${event.what} for ${event.registryNo} re-issued in other words`,
    superseded: `certificate ${event.what} for ${event.registryNo} superseded`,
    withdrawn: `certificate ${event.what} for ${event.registryNo} withdrawn`,
    notice: `notice ${event.what}`,
    epoch: `${event.registryNo}: ${event.what}`,
    due: `${event.registryNo} due by the programme of ${event.what.replace(/, \d{4}.*$/, '')}`,
  }[event.kind];
  return `${what}${datesOf(event)}`;
}

function datesOf({ kind, inForceFrom, madeKnownOn, recordedOn, isImported }: LifeEvent): string {
  if (kind === 'due') return '';
  const dates = [
    ...(madeKnownOn === inForceFrom ? [] : [`made known on ${madeKnownOn}`]),
    ...(recordedOn === madeKnownOn ? [] : [`${isImported ? 'imported' : 'recorded'} on ${recordedOn}`]),
  ];
  return dates.length === 0 ? '' : ` (${dates.join(', ')})`;
}
