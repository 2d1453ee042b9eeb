import type { State } from '#shared/states.ts';
import type { Ink } from './inks.ts';

/** The mark of each state, 14 by 14 units, one line 1.6 wide: never colour alone. */
export const STATE_GLYPHS: Readonly<Record<State, string>> = {
  sound: 'M2.5 7.5 5.5 10.5 11.5 3.5',
  caution: 'M7 2.2 12.4 11.6H1.6Z',
  broken: 'M3 3 11 11M11 3 3 11',
  'not judged': 'M7 2.2a4.8 4.8 0 1 0 .01 0Z',
  'does not apply': 'M3 7H11',
};

/** The ink of each state. */
export const STATE_INKS: Readonly<Record<State, Ink>> = {
  sound: 'sound',
  caution: 'caution',
  broken: 'broken',
  'not judged': 'unjudged',
  'does not apply': 'ink-3',
};
