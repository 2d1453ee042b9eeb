import type { DownstreamBy } from '#shared/contracts/downstream.ts';
import { yearOf } from './day-number.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { SIGHT } from './sight.ts';

/** The key of what is counted but not told: the year in which another laboratory's weight was calibrated. */
export const WITHHELD = 'withheld';
/** The key of values without a class. */
export const NO_CLASS = 'none';

/**
 * The key of a row's group. A weight of others is named by the laboratory that calibrated it: whose customer it
 * belongs to is not told, nor when it was calibrated.
 */
export function groupKeyOf(graph: GraphArrays, by: DownstreamBy): (node: number, sight: number) => string {
  switch (by) {
    case 'laboratory':
      return (node, sight) => graph.laboratories.at(namedLaboratory(graph, node, sight));
    case 'class':
      return (node) => (graph.class[node] ? graph.classes.at(graph.class[node] - 1) : NO_CLASS);
    case 'nominal': {
      const decades = Array.from({ length: graph.nominals.size }, (_, at) => decadeOf(graph.nominals.at(at)));
      return (node) => decades[graph.nominal[node]!]!;
    }
    case 'year': {
      const years = new Map<number, string>();
      return (node, sight) => {
        if (sight < SIGHT.issued) return WITHHELD;
        const day = graph.performedDay[node]!;
        const known = years.get(day) ?? String(yearOf(day));
        years.set(day, known);
        return known;
      };
    }
  }
}

/** The laboratory that a row names: who holds a weight of one's own or of one's customers, who calibrated one of others. */
export function namedLaboratory(graph: GraphArrays, node: number, sight: number): number {
  return sight >= SIGHT.issued ? graph.holder[node]! : graph.issuer[node]!;
}

/** floor(log10) of a nominal in grams, from its text, so that 1000 g is 3 exactly. */
function decadeOf(nominal: string): string {
  const [whole = '', decimals = ''] = nominal.split('.');
  const digits = whole.replace(/^0+/, '');
  if (digits.length > 0) return String(digits.length - 1);
  return String(-1 - decimals.search(/[1-9]/));
}
