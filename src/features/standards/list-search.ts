import { z } from 'zod';
import { Nominal, WeightClass } from '#shared/contracts/common.ts';
import { StandardKind } from '#shared/contracts/standards.ts';
import { Id } from '#shared/ids.ts';

/** Orders a list can stand in; the column heads switch between the two ways. */
export const SORTABLE = ['registryNo', 'nominal', 'calibrated'] as const;
export type Sortable = (typeof SORTABLE)[number];

const Search = z.object({
  q: z.string().trim().max(80).optional().catch(undefined),
  laboratory: Id.optional().catch(undefined),
  class: WeightClass.optional().catch(undefined),
  kind: StandardKind.optional().catch(undefined),
  standing: z.enum(['due', 'overdue', 'no value']).optional().catch(undefined),
  /** Grams as text. */
  nominalFrom: Nominal.optional().catch(undefined),
  nominalTo: Nominal.optional().catch(undefined),
  sort: z
    .enum(['registryNo', '-registryNo', 'nominal', '-nominal', 'calibrated', '-calibrated'])
    .default('registryNo')
    .catch('registryNo'),
  /** How many pages are shown. */
  pages: z.coerce.number().int().min(1).max(40).default(1).catch(1),
  /** The standard open in the side sheet. */
  open: Id.optional().catch(undefined),
});

/** What the address of the list asks for, under the names that the request carries too. */
export type ListSearch = z.infer<typeof Search>;

/** Reads the address; a part that is not understood counts as not asked for. */
export function readListSearch(parameters: URLSearchParams): ListSearch {
  return Search.parse(Object.fromEntries([...parameters].filter(([, value]) => value !== '')));
}

const DEFAULTS: Partial<Record<keyof ListSearch, unknown>> = { sort: 'registryNo', pages: 1 };

/** The address that asks for this; what is at its default is left out. */
export function writeListSearch(search: ListSearch): URLSearchParams {
  const parameters = new URLSearchParams();
  for (const [name, value] of Object.entries(search)) {
    if (value === undefined || value === '' || value === DEFAULTS[name as keyof ListSearch]) continue;
    parameters.set(name, String(value));
  }
  return parameters;
}

/** A change of the question begins at the first page; opening a row or asking for more keeps what is shown. */
export function changeListSearch(search: ListSearch, change: Partial<ListSearch>): ListSearch {
  return isSameList(change) ? { ...search, ...change } : { ...search, pages: 1, open: undefined, ...change };
}

/** What a filter may be set to; the empty question shows everything this person reads. */
export type Filters = Omit<ListSearch, 'sort' | 'pages' | 'open'>;

/** The question without order, pages and the open row: what "clear" empties and what narrows the list. */
export function filtersOf({ sort: _sort, pages: _pages, open: _open, ...filters }: ListSearch): Filters {
  return filters;
}

/** Whether anything narrows the list. */
export function isNarrowed(search: ListSearch): boolean {
  return Object.values(filtersOf(search)).some((value) => value !== undefined && value !== '');
}

/** The order after a click on a column's head: its own first, then the other way round. */
export function nextSort(sort: ListSearch['sort'], column: Sortable): ListSearch['sort'] {
  return sort === column ? `-${column}` : column;
}

/** How a head announces its order. */
export function sortOf(sort: ListSearch['sort'], column: Sortable): 'ascending' | 'descending' | 'none' {
  if (sort === column) return 'ascending';
  return sort === `-${column}` ? 'descending' : 'none';
}

function isSameList(change: Partial<ListSearch>): boolean {
  return Object.keys(change).every((name) => name === 'open' || name === 'pages');
}
