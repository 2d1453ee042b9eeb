import { z } from 'zod';
import { Severity, Verdict } from '#shared/contracts/common.ts';

/** What the screen of an audit can be asked, as it stands in the address. What cannot be read is left out. */
const Search = z.object({
  /** The rule whose findings are open. */
  rule: z.string().max(16).optional().catch(undefined),
  outcome: z.enum(['fails', 'cannot be judged']).optional().catch(undefined),
  severity: Severity.optional().catch(undefined),
  verdict: Verdict.optional().catch(undefined),
  whose: z.enum(['own', 'above']).optional().catch(undefined),
});
export type AuditSearch = z.infer<typeof Search>;

/** Reads the filter from the address. */
export function readSearch(parameters: URLSearchParams): AuditSearch {
  return Search.parse(Object.fromEntries(parameters));
}

/** The address's parameters with a change. */
export function withChange(search: AuditSearch, change: Partial<AuditSearch>): Record<string, string> {
  const next = Object.entries({ ...search, ...change });
  return Object.fromEntries(next.filter((entry): entry is [string, string] => Boolean(entry[1])));
}
