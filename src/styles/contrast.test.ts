import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const css = readFileSync('src/styles/index.css', 'utf8');

/** WCAG 2.2, success criterion 1.4.3: text against its ground. */
const AA_TEXT = 4.5;
/** WCAG 2.2, success criterion 1.4.11: lines and marks that carry meaning. */
const AA_GRAPHIC = 3;

const THEMES = { paper: ':root', lamp: "[data-theme='lamp']" };
const INKS = ['ink', 'ink-2', 'ink-3', 'brass', 'sound', 'caution', 'broken', 'unjudged'];
const GROUNDS = ['paper', 'raised'];
/** Ink that is set on another colour than the two grounds: the primary button, the chosen side of a switch. */
const REVERSED = [
  ['on-brass', 'brass'],
  ['paper', 'ink'],
] as const;

describe.each(Object.entries(THEMES))('contrast on %s', (_, selector) => {
  const tokens = tokensOf(selector);
  const pairs = [...INKS.flatMap((ink) => GROUNDS.map((ground) => [ink, ground] as const)), ...REVERSED];

  it.each(pairs)('%s on %s is readable', (ink, ground) => {
    expect(contrast(colour(tokens, ink), colour(tokens, ground))).toBeGreaterThanOrEqual(AA_TEXT);
  });

  it.each(GROUNDS)('the focus ring and the line of a field stand out from %s', (ground) => {
    for (const line of ['brass', 'ink-3']) {
      expect(contrast(colour(tokens, line), colour(tokens, ground))).toBeGreaterThanOrEqual(AA_GRAPHIC);
    }
  });
});

describe('the tokens', () => {
  it('name the same colours in both themes', () => {
    expect(Object.keys(tokensOf(THEMES.lamp))).toEqual(Object.keys(tokensOf(THEMES.paper)));
  });

  it('are the only colours a class can name', () => {
    expect(css).toContain('--color-*: initial');
  });

  it('measure black on white as 21', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 10);
  });
});

function tokensOf(selector: string): Record<string, string> {
  const block = css.split(`\n${selector} {`)[1]?.split('}')[0] ?? '';
  return Object.fromEntries(
    Array.from(block.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g), (match) => [match[1], match[2]]),
  );
}

function colour(tokens: Record<string, string>, name: string): string {
  const found = tokens[name];
  if (!found) throw new Error(`no colour named ${name}`);
  return found;
}

/** Contrast ratio by the relative luminance of WCAG 2.2. */
function contrast(one: string, other: string): number {
  const [light, dark] = [luminance(one), luminance(other)].sort((a, b) => b - a) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}

function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const part = parseInt(hex.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}
