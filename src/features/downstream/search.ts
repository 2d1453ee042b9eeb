import { z } from 'zod';
import { DownstreamBy, WEIGHTS_OF_OTHERS_BEYOND, WhatIfSort } from '#shared/contracts/downstream.ts';

/** What may be supposed of a value on its own screen. */
export const Suppose = z.enum(['shift', 'raise', 'withdraw']);
export type Suppose = z.infer<typeof Suppose>;

const DEFAULT_BEYOND = 10;

/** The same for weights of others, whatever is asked: percent of U. */
export const OTHERS_BEYOND = 100 * WEIGHTS_OF_OTHERS_BEYOND;

/**
 * Everything the downstream screen can be asked, as it stands in the address: a link shows the same picture,
 * within its reader's rights. What cannot be read is left out, not an error.
 */
const Search = z.object({
  day: z.iso.date().optional().catch(undefined),
  known: z.iso.date().optional().catch(undefined),
  by: DownstreamBy.catch('laboratory'),
  /** The group that is open. */
  group: z.string().max(60).optional().catch(undefined),
  suppose: Suppose.optional().catch(undefined),
  /** Shift or added u with its unit, as "0.02 mg": a point as the decimal sign, whoever reads it. */
  amount: z.string().max(60).optional().catch(undefined),
  /** Material beyond this part of U, percent. */
  beyond: z.coerce.number().min(0).max(1000).catch(DEFAULT_BEYOND),
  sort: WhatIfSort.catch('word'),
});
export type DownstreamSearch = z.infer<typeof Search>;

/** Reads the question from the address. */
export function readSearch(parameters: URLSearchParams): DownstreamSearch {
  return Search.parse(Object.fromEntries(parameters));
}

/** The address's parameters with a change; what is at its default is left out. Another grouping opens no group. */
export function withChange(
  search: DownstreamSearch,
  change: Partial<DownstreamSearch>,
): Record<string, string> {
  const isRegrouped = change.by !== undefined && change.by !== search.by;
  const next = { ...search, ...(isRegrouped ? { group: undefined } : {}), ...change };
  const defaults: Record<string, unknown> = { by: 'laboratory', beyond: DEFAULT_BEYOND, sort: 'word' };
  return Object.fromEntries(
    Object.entries(next).flatMap(([name, value]) =>
      value === undefined || value === '' || value === defaults[name] ? [] : [[name, String(value)]],
    ),
  );
}
