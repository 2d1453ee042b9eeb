import { z } from 'zod';
import { WhatIfChange } from '#shared/contracts/downstream.ts';
import { readSearch, withChange, type DownstreamSearch } from './search.ts';

/** A question in the address whose changes are not those of one value alone. */
export interface WhatIfSearch extends AskedOfRows {
  changes: WhatIfChange[];
}

/** What a dry run is asked with, its changes apart. */
export type AskedOfRows = Pick<DownstreamSearch, 'day' | 'known' | 'by' | 'group' | 'beyond' | 'sort'>;

const Changes = z.array(WhatIfChange).max(20);

/** Reads the question; changes that cannot be read are none. */
export function readWhatIfSearch(parameters: URLSearchParams): WhatIfSearch {
  const { day, known, by, group, beyond, sort } = readSearch(parameters);
  return { day, known, by, group, beyond, sort, changes: readChanges(parameters.get('changes')) };
}

function readChanges(text: string | null): WhatIfChange[] {
  if (text === null) return [];
  try {
    const read = Changes.safeParse(JSON.parse(text));
    return read.success ? read.data : [];
  } catch {
    return [];
  }
}

/** The address's parameters with a change; what is at its default is left out. Other changes open no group. */
export function withWhatIfChange(
  { changes, ...rest }: WhatIfSearch,
  { changes: nextChanges, ...next }: Partial<WhatIfSearch>,
): Record<string, string> {
  const asked = nextChanges ?? changes;
  const parameters = withChange(
    { ...rest, ...(nextChanges ? { group: undefined } : {}), suppose: undefined, amount: undefined },
    next,
  );
  return asked.length === 0 ? parameters : { ...parameters, changes: JSON.stringify(asked) };
}
