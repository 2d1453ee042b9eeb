import { createHash } from 'node:crypto';
import { canonicalJson } from '#shared/canonical-json.ts';

/** A content in its one spelling, with the hash that names it. */
export interface Content {
  json: string;
  sha256: string;
}

/**
 * Canonical JSON for files. `<` is spelt `\u003c`, which JSON reads as the same sign, so that the same bytes may
 * stand inside a page: the hash of the file and of what a page carries along is one.
 */
export function contentOf(value: unknown): Content {
  const json = canonicalJson(value).replaceAll('<', '\\u003c');
  return { json, sha256: sha256Of(json) };
}

/** SHA-256 of a text in UTF-8, hexadecimal. */
export function sha256Of(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex');
}
