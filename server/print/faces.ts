import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { Face } from '#shared/drawing/text-width.ts';
import { codePointsOf } from './code-points.ts';
import { sfntOf } from './sfnt.ts';

/** A shipped font, ready for a document. */
export interface ShippedFont {
  name: string;
  sfnt: Buffer;
  /** Its own digits differ in width: in a column they must be asked to be alike. */
  hasProportionalDigits: boolean;
  /** Whether the font has a sign. */
  has(codePoint: number): boolean;
}

/** What is read of a package's folder; every package ships it as one of its files. */
const files = createRequire(import.meta.url);

const NEWSREADER = '@fontsource-variable/newsreader/files/newsreader';
const INSTRUMENT = '@fontsource-variable/instrument-sans/files/instrument-sans';
const SOURCE_SERIF = '@fontsource-variable/source-serif-4/files/source-serif-4';
const MONO = '@fontsource/commit-mono/files/commit-mono-latin-400-normal.woff2';

const SERIF = [`${NEWSREADER}-latin-wght-normal.woff2`, `${NEWSREADER}-latin-ext-wght-normal.woff2`];
const ITALIC = [`${NEWSREADER}-latin-wght-italic.woff2`, `${NEWSREADER}-latin-ext-wght-italic.woff2`];
const SANS = [`${INSTRUMENT}-latin-wght-normal.woff2`, `${INSTRUMENT}-latin-ext-wght-normal.woff2`];
const FALLBACK = ['greek', 'latin', 'latin-ext', 'cyrillic'].map(
  (part) => `${SOURCE_SERIF}-${part}-wght-normal.woff2`,
);

/** Fonts in the order in which a sign is looked for, as the style sheet orders them: no font of the system. */
const CHAINS: Readonly<Record<Face, readonly string[]>> = {
  sans: [...SANS, ...SERIF, ...FALLBACK, MONO],
  serif: [...SERIF, ...FALLBACK, MONO],
  italic: [...ITALIC, ...SERIF, ...FALLBACK, MONO],
  mono: [MONO, ...FALLBACK],
};

const loaded = new Map<string, ShippedFont>();

/**
 * The font of a face that has a sign; where none has it, the last, which shows that a sign is missing.
 * @throws Error where a font's package is not installed
 */
export function fontFor(face: Face, codePoint: number): ShippedFont {
  const chain = CHAINS[face];
  for (const file of chain) {
    const font = load(file);
    if (font.has(codePoint)) return font;
  }
  return load(MONO);
}

/** The first font of a face: its spaces are the face's spaces. */
export function firstFont(face: Face): ShippedFont {
  return load(CHAINS[face][0]!);
}

/** The bytes of a face's web font, to be carried along in a file. */
export function webFont(file: string): Buffer {
  return readFileSync(files.resolve(file));
}

function load(file: string): ShippedFont {
  const known = loaded.get(file);
  if (known) return known;
  const sfnt = sfntOf(webFont(file));
  const codePoints = codePointsOf(sfnt);
  const font = {
    name: file,
    sfnt,
    hasProportionalDigits: file.startsWith(INSTRUMENT),
    has: (codePoint: number) => codePoints.has(codePoint),
  };
  loaded.set(file, font);
  return font;
}

/** The web fonts that a drawing or page carries along, as their rules name them; Latin text and Greek. */
export const CARRIED_FONTS = [
  { family: 'Instrument Sans Variable', file: SANS[0]!, style: 'normal', weights: '400 700' },
  { family: 'Newsreader Variable', file: SERIF[0]!, style: 'normal', weights: '200 800' },
  { family: 'Newsreader Variable', file: ITALIC[0]!, style: 'italic', weights: '200 800' },
  { family: 'Source Serif 4 Variable', file: FALLBACK[0]!, style: 'normal', weights: '200 900' },
  { family: 'Commit Mono', file: MONO, style: 'normal', weights: '400' },
] as const;
