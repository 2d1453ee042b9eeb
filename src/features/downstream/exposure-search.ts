import { z } from 'zod';
import type { DownstreamBy } from '#shared/contracts/downstream.ts';
import { readSearch } from './search.ts';

/** What the exposure screen can be asked, as it stands in the address. */
export interface ExposureSearch {
  lastGood: string | undefined;
  firstBad: string | undefined;
  by: DownstreamBy;
  group: string | undefined;
}

const Days = z.object({
  lastGood: z.iso.date().optional().catch(undefined),
  firstBad: z.iso.date().optional().catch(undefined),
});

/** Reads the question; what cannot be read is left out. */
export function readExposureSearch(parameters: URLSearchParams): ExposureSearch {
  const { by, group } = readSearch(parameters);
  const { lastGood, firstBad } = Days.parse(Object.fromEntries(parameters));
  return { lastGood, firstBad, by, group };
}

/** The address's parameters with a change; another interval or grouping opens no group. */
export function withExposureChange(
  search: ExposureSearch,
  change: Partial<ExposureSearch>,
): Record<string, string> {
  const next = { ...search, ...('group' in change ? {} : { group: undefined }), ...change };
  return Object.fromEntries(
    Object.entries(next).flatMap(([name, value]) =>
      value === undefined || (name === 'by' && value === 'laboratory') ? [] : [[name, value]],
    ),
  );
}
