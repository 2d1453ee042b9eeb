import { CARRIED_FONTS, webFont } from '#server/print/faces.ts';

let rules: string | null = null;

/** Style rules that carry the fonts as data, so that a file needs nothing from anywhere. */
export function fontRules(): string {
  rules ??= CARRIED_FONTS.map(
    ({ family, file, style, weights }) =>
      `@font-face{font-family:'${family}';font-style:${style};font-weight:${weights};` +
      `src:url(data:font/woff2;base64,${webFont(file).toString('base64')}) format('woff2')}`,
  ).join('');
  return rules;
}
