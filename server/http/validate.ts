import type { z } from 'zod';
import type { FieldProblems } from '#shared/errors.ts';
import { AppError } from './app-error.ts';

type Part = 'params' | 'query' | 'body';

/**
 * Parses one part of the request. Every offending field is reported at once, with what was received.
 * @throws AppError `malformed`, or `not-found` for a path that names nothing
 */
export function validate<Out>(schema: z.ZodType<Out> | undefined, value: unknown, part: Part): Out {
  if (!schema) return undefined as Out;
  // Express gives no body at all for a missing or foreign content type, and params without a prototype.
  const plain = part === 'body' ? (value ?? {}) : { ...(value as object) };
  const parsed = schema.safeParse(plain);
  const halved = parsed.success ? halfCharacterIn(parsed.data) : null;
  if (parsed.success && !halved) return parsed.data;
  if (part === 'params') throw new AppError('not-found', 'This address names nothing in the register.');
  throw new AppError('malformed', 'Some fields cannot be used; each is named below.', {
    fields: parsed.success ? { [halved ?? '']: HALF_CHARACTER } : fieldProblems(parsed.error, plain),
  });
}

/** Half of a surrogate pair is no character of Unicode: the database has no way to keep it. */
const LONE_SURROGATE = /[\ud800-\udfff]/u;
const HALF_CHARACTER = {
  message: 'This text holds half a character, as a broken copy leaves it. Type it anew.',
  expected: 'well-formed text',
};

/** Path of the first text that is not well-formed; null where all is. What it walks has passed a schema. */
function halfCharacterIn(value: unknown, path = ''): string | null {
  if (typeof value === 'string') return LONE_SURROGATE.test(value) ? path || '(all)' : null;
  if (value === null || typeof value !== 'object') return null;
  for (const [key, member] of Object.entries(value)) {
    const found = halfCharacterIn(member, path ? `${path}.${key}` : key);
    if (found) return found;
  }
  return null;
}

/** One problem per offending path (the first), in the form that forms and programs read. */
export function fieldProblems(error: z.ZodError, received: unknown): FieldProblems {
  const fields: FieldProblems = {};
  for (const issue of error.issues) {
    if (issue.code === 'unrecognized_keys') {
      for (const key of issue.keys) {
        fields[[...issue.path, key].join('.')] ??= { message: 'This field is not known here; leave it out.' };
      }
      continue;
    }
    const path = issue.path.join('.') || '(all)';
    const got = describe(valueAt(received, issue.path));
    fields[path] ??= { message: issue.message, ...(got === undefined ? {} : { received: got }) };
  }
  return fields;
}

/**
 * Checks our own reply against its contract.
 * @throws Error (a 500) where the reply does not fit: a defect that must not pass unseen
 */
export function presentAs<Shape extends z.ZodType>(shape: Shape, reply: z.input<Shape>): z.output<Shape> {
  const parsed = shape.safeParse(reply);
  if (parsed.success) return parsed.data;
  const first = parsed.error.issues[0];
  throw new Error(`The reply breaks its own contract at ${first?.path.join('.')}: ${first?.message}`);
}

function valueAt(root: unknown, path: PropertyKey[]): unknown {
  let value = root;
  for (const key of path) {
    if (value === null || typeof value !== 'object') return undefined;
    value = (value as Record<PropertyKey, unknown>)[key];
  }
  return value;
}

/** Short enough to read beside a field; what is nested is only named, since it may be nested without end. */
function describe(value: unknown): string | undefined {
  if (value === undefined) return undefined;
  if (Array.isArray(value)) return `a list of ${value.length}`;
  if (typeof value === 'object' && value !== null) return 'an object';
  const text = String(value);
  return text.length > 80 ? `${text.slice(0, 77)}...` : text;
}
