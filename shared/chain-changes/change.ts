/** What is changed, by weight of consequence: the result first, what only moved within it last. */
export const CHANGE_GROUPS = [
  'The weight itself',
  'How links stand',
  'What it rests on',
  'Other checks',
  'Where the uncertainty comes from',
] as const;
export type ChangeGroup = (typeof CHANGE_GROUPS)[number];

/** One plain statement of what differs between two answers. */
export interface Change {
  group: ChangeGroup;
  says: string;
  /** The rules' own sentences, where checks explain it. */
  why: string[];
  /** What to select in the later answer: a node's uid or a link's key; null where it holds it no more. */
  at: string | null;
  /** Word for the drawing of the later answer; null: none. */
  mark: string | null;
  /** Within its group: the graver, the larger. */
  weight: number;
}

/** How numbers are written in the statements. */
export interface Wording {
  decimalMark: '.' | ',';
  uncertainty: 'plus-minus' | 'concise';
}
