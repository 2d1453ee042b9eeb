import { z } from 'zod';
import { Id } from '#shared/ids.ts';
import { Day } from '#shared/contracts/common.ts';

const Search = z.object({
  q: z.string().trim().max(80).optional().catch(undefined),
  laboratory: Id.optional().catch(undefined),
  issuedFrom: Day.optional().catch(undefined),
  issuedTo: Day.optional().catch(undefined),
  state: z.enum(['in force', 'superseded', 'withdrawn']).optional().catch(undefined),
  sort: z
    .enum(['issuedOn', '-issuedOn', 'certificateNo', '-certificateNo'])
    .default('-issuedOn')
    .catch('-issuedOn'),
  /** How many pages are shown. */
  pages: z.coerce.number().int().min(1).max(40).default(1).catch(1),
  /** The revision open in the side sheet. */
  open: Id.optional().catch(undefined),
});

/** What the address of the list asks for. */
export type ListSearch = z.infer<typeof Search>;

/** Reads the address; a part that is not understood counts as not asked for. */
export function readListSearch(parameters: URLSearchParams): ListSearch {
  const given = [...parameters].filter(([, value]) => value !== '');
  return Search.parse(Object.fromEntries(given));
}

/** The address that asks for this; what is at its default is left out. */
export function writeListSearch(search: ListSearch): URLSearchParams {
  const parameters = new URLSearchParams();
  for (const [name, value] of Object.entries(search)) {
    const isDefault = value === undefined || value === '' || (name === 'sort' && value === '-issuedOn');
    if (!isDefault && !(name === 'pages' && value === 1)) parameters.set(name, String(value));
  }
  return parameters;
}

/** A change of the question begins at the first page; opening a row keeps what is shown. */
export function changeListSearch(search: ListSearch, change: Partial<ListSearch>): ListSearch {
  const isSameList = Object.keys(change).every((name) => name === 'open' || name === 'pages');
  return { ...search, ...(isSameList ? {} : { pages: 1, open: undefined }), ...change };
}

/** Whether anything narrows the list. */
export function isNarrowed({ q, laboratory, issuedFrom, issuedTo, state }: ListSearch): boolean {
  return [q, laboratory, issuedFrom, issuedTo, state].some((part) => part !== undefined && part !== '');
}
