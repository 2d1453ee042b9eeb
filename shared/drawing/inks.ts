/** Names of the inks, as the style sheet names them. */
export const INK_NAMES = [
  'paper',
  'raised',
  'rule',
  'ink',
  'ink-2',
  'ink-3',
  'brass',
  'sound',
  'caution',
  'broken',
  'unjudged',
  'flow',
  'local',
] as const;
export type Ink = (typeof INK_NAMES)[number];
export type Inks = Readonly<Record<Ink, string>>;

/** The light theme, for documents; a test holds it equal to the style sheet. */
export const PAPER: Inks = {
  paper: '#fbfaf6',
  raised: '#ffffff',
  rule: '#dedace',
  ink: '#1b1f23',
  'ink-2': '#565c63',
  'ink-3': '#6b7177',
  brass: '#8c6a1f',
  sound: '#1f6f5c',
  caution: '#955c00',
  broken: '#a5303a',
  unjudged: '#5a6b7b',
  flow: '#d6cbae',
  local: '#b4b9c0',
};

/** The dark theme, for documents; a test holds it equal to the style sheet. */
export const LAMP: Inks = {
  paper: '#14171a',
  raised: '#1c2024',
  rule: '#2e343a',
  ink: '#ece8dd',
  'ink-2': '#a9afb5',
  'ink-3': '#858c93',
  brass: '#d2a94b',
  sound: '#5fbfa6',
  caution: '#e0a33a',
  broken: '#e8838a',
  unjudged: '#93a4b4',
  flow: '#5c4f2c',
  local: '#464d55',
};

/** Ink on white paper, for what is printed. */
export const PRINT: Inks = { ...PAPER, paper: '#ffffff' };

/** Inks by the style sheet's own names, for a drawing that stands in a page. */
export const PAGE_INKS = Object.fromEntries(
  INK_NAMES.map((name) => [name, `var(--${name})`]),
) as unknown as Inks;
