import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { INK_NAMES, LAMP, PAPER, type Inks } from '#shared/drawing/inks.ts';

const css = readFileSync('src/styles/index.css', 'utf8');

/** The inks that a rule of the style sheet sets. */
function inksOf(selector: string): Record<string, string> {
  const start = css.indexOf(`${selector} {`);
  const rule = css.slice(start, css.indexOf('}', start));
  return Object.fromEntries(
    [...rule.matchAll(/--([\w-]+): (#[0-9a-f]{6});/g)].map(([, name, value]) => [name, value]),
  );
}

describe('inks of documents', () => {
  it.each<[string, string, Inks]>([
    ['paper', ':root', PAPER],
    ['lamp', "[data-theme='lamp']", LAMP],
  ])('are those of the style sheet: %s', (_theme, selector, inks) => {
    const sheet = inksOf(selector);
    expect(Object.fromEntries(INK_NAMES.map((name) => [name, sheet[name]]))).toEqual(inks);
  });
});
