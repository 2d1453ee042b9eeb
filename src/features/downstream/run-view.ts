import type { DownstreamBy, WhatIfSort } from '#shared/contracts/downstream.ts';
import type { DryRunQuestion } from '#shared/contracts/dry-runs.ts';
import { readSearch, withChange } from './search.ts';
import type { AskedOfRows } from './what-if-search.ts';

/** How a kept dry run is looked at; it stands in the address. */
export interface RunView {
  /** On the register of today, or as it was known on the day on which the dry run was kept. */
  as: 'now' | 'then';
  /** Another grouping than the question's own. */
  by: DownstreamBy | undefined;
  group: string | undefined;
  sort: WhatIfSort;
}

/** Reads the view from the address. */
export function readRunView(parameters: URLSearchParams): RunView {
  const { by, group, sort } = readSearch(parameters);
  return {
    as: parameters.get('as') === 'then' ? 'then' : 'now',
    by: parameters.has('by') ? by : undefined,
    group,
    sort,
  };
}

/** The address's parameters of a view; what is at its default is left out. */
export function runViewParameters({ as, by, group, sort }: RunView): Record<string, string> {
  const { by: _by, ...rest } = withChange(readSearch(new URLSearchParams()), { group, sort });
  return { ...rest, ...(by ? { by } : {}), ...(as === 'then' ? { as } : {}) };
}

/**
 * What a kept dry run asks now. Days that it named stay as they were; as known then means on the day it was kept.
 * @param savedOn the day on which it was kept
 */
export function askedOfRun(savedOn: string, question: DryRunQuestion, view: RunView): AskedOfRows {
  const isThen = view.as === 'then';
  return {
    day: question.day ?? (isThen ? savedOn : undefined),
    known: question.known ?? (isThen ? savedOn : undefined),
    by: view.by ?? question.by,
    group: view.group,
    sort: view.sort,
    beyond: Number((question.threshold * 100).toPrecision(12)),
  };
}
