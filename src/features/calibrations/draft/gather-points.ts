import type { OpenPoint } from '#shared/contracts/drafts.ts';
import { fieldWord, fieldWords, lineOf } from './field-words.ts';

/** Points that say the same of several lines, said once. */
export interface GatheredPoint {
  point: OpenPoint;
  /** Where: "Line 2, 200 g: U" or "Lines 1 to 5, 7: U". */
  where: string;
}

/** Gathers what is said alike of several lines, in the order in which each was first said. */
export function gatherPoints(
  points: readonly OpenPoint[],
  weightOf: (line: number) => string | null,
): GatheredPoint[] {
  const groups = new Map<string, OpenPoint[]>();
  for (const point of points) {
    const isOfLine = lineOf(point.field) !== null;
    const key = isOfLine ? [fieldWord(point.field), point.kind, point.message].join('|') : point.field;
    groups.set(key, [...(groups.get(key) ?? []), point]);
  }
  return [...groups.values()].flatMap((alike) => {
    const [point] = alike;
    if (!point) return [];
    const lines = [...new Set(alike.flatMap(({ field }) => lineOf(field) ?? []))];
    const where =
      lines.length > 1
        ? `Lines ${runsOf(lines)}: ${fieldWord(point.field)}`
        : fieldWords(point.field, weightOf);
    return [{ point, where }];
  });
}

/** Lines, counted from 0, as people write them: "1 to 5, 7". */
export function runsOf(lines: readonly number[]): string {
  const runs: [number, number][] = [];
  for (const line of lines.toSorted((a, b) => a - b)) {
    const last = runs.at(-1);
    if (last && line === last[1] + 1) last[1] = line;
    else runs.push([line, line]);
  }
  return runs
    .map(([from, to]) =>
      from === to ? `${from + 1}` : `${from + 1}${to === from + 1 ? ',' : ' to'} ${to + 1}`,
    )
    .join(', ');
}
