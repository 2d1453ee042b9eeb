import { canonicalJson } from '#shared/canonical-json.ts';

/** Whether two parts of a draft say the same, whatever the order of their members. */
export function isSameValue(a: unknown, b: unknown): boolean {
  return canonicalJson(a ?? null) === canonicalJson(b ?? null);
}
