import { z } from 'zod';
import { DraftContent, DraftLine } from '#shared/contracts/drafts.ts';
import { isSameValue } from './same-value.ts';

/**
 * What the form of a draft holds: the content, and the version it was typed upon. The version is kept with the
 * entries, so that entries restored in this browser meet a newer version on the server as a conflict.
 */
export type DraftValues = DraftContent & { version: number };

/** The form holds every field, also where the request may leave one out. */
export const DraftForm = DraftContent.extend({ version: z.number().int().min(0) }) as unknown as z.ZodType<
  DraftValues,
  DraftValues
>;

/** The fields that a new line takes over from the line above it. */
const CARRIED = [
  'quantity',
  'medium',
  'stage',
  'valueIs',
  'unit',
  'uUnit',
  'uNotStated',
  'k',
  'coverage',
  'class',
  'underAccreditation',
] as const;

/** A form without entries; version 0 means that the server has none. */
export function emptyDraft(): DraftValues {
  return { ...DraftContent.parse({}), version: 0 };
}

/** A line without a value, printed like the line above it: same kind, units, k and references. */
export function newLine(standardId: string | null, above?: DraftLine): DraftLine {
  const line = DraftLine.parse({ key: crypto.randomUUID(), standardId });
  if (!above) return line;
  const carried = Object.fromEntries(CARRIED.map((field) => [field, above[field]]));
  return { ...line, ...carried, references: above.references.map((one) => ({ ...one, sensitivity: '' })) };
}

/** The content alone, as it is sent. */
export function contentOf({ version: _version, ...content }: DraftValues): DraftContent {
  return content;
}

/** Whether two contents say the same. */
export function isSameContent(a: DraftContent, b: DraftContent): boolean {
  return isSameValue(a, b);
}
