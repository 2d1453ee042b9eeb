import type { DownstreamBy, GroupedQuestion } from '#shared/contracts/downstream.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { below, type Below } from './below.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { graphBelow } from './graph-memory.ts';
import { groupKeyOf } from './groups.ts';
import { inForceOn } from './in-force-on.ts';
import { pageAfter, type Standing } from './keyset.ts';
import { askedDays, type AskedDays } from './question.ts';
import {
  laboratoriesById,
  rowDetails,
  type NamedLaboratory,
  type RowDetails,
} from './row-details.queries.ts';
import { visibleRows } from './rows.ts';
import { SIGHT, sightOf } from './sight.ts';

/** A row of a page, and how much of it is seen. */
export interface FoundRow {
  sight: number;
  details: RowDetails;
}

/** Who leans on something, as far as this person may know. */
export interface Downstream {
  question: AskedDays & { by: DownstreamBy };
  groups: { key: string; count: number; warned: number }[];
  page: { group: string; rows: FoundRow[]; nextCursor: string | null } | null;
  laboratories: Map<string, NamedLaboratory>;
}

/** Who leans on these values, on a day as known on a day: values in force then, other than the values themselves. */
export async function downstreamOf(
  context: SignedInContext,
  ids: readonly number[],
  asked: GroupedQuestion,
): Promise<Downstream> {
  const graph = await graphBelow(context.database, ids);
  const starts = new Set(ids.map((id) => graph.nodeOf(id)));
  return tell(context, graph, { found: below(graph, starts), isAsked: (node) => !starts.has(node) }, asked);
}

/** What is told of a set of values: those `isAsked` that were in force, seen by this person, in groups. */
export async function tell(
  context: SignedInContext,
  graph: GraphArrays,
  { found, isAsked }: { found: Below; isAsked(node: number): boolean },
  asked: GroupedQuestion,
): Promise<Downstream> {
  const days = askedDays(context, asked);
  const sight = sightOf(graph, found, context.user);
  const rows = visibleRows(graph, found, {
    sight,
    weightsUpTo: SIGHT.warning,
    isRow: (place) => {
      const node = found.nodes[place]!;
      return isAsked(node) && inForceOn(graph, node, days.dayNumber, days.knownNumber);
    },
    isBefore: (a, b) => isNewer(graph, found.nodes[a]!, found.nodes[b]!),
  });
  const groups = new Map<string, { key: string; count: number; warned: number; places: number[] }>();
  const keyOf = groupKeyOf(graph, asked.by);
  for (const place of rows) {
    const key = keyOf(found.nodes[place]!, sight[place]!);
    const group = groups.get(key) ?? { key, count: 0, warned: 0, places: [] };
    groups.set(key, group);
    group.count += 1;
    if (sight[place] === SIGHT.warning) group.warned += 1;
    group.places.push(place);
  }
  const opened = asked.group === undefined ? null : (groups.get(asked.group)?.places ?? []);
  const page = opened && (await pageOf(context, graph, { found, sight, opened }, asked));
  const laboratories = await laboratoriesById(context.database, [
    ...(asked.by === 'laboratory' ? groups.keys() : []),
    ...(page?.rows ?? []).flatMap(({ details }) => [details.holderId, details.issuerId]),
  ]);
  return { question: { ...days, by: asked.by }, groups: [...groups.values()], page, laboratories };
}

/** Of two values of one weight the one weighed later stands for it. */
function isNewer(graph: GraphArrays, node: number, other: number): boolean {
  const later = graph.performedDay[node]! - graph.performedDay[other]!;
  return later > 0 || (later === 0 && graph.id[node]! > graph.id[other]!);
}

async function pageOf(
  context: SignedInContext,
  graph: GraphArrays,
  { found, sight, opened }: { found: Below; sight: Uint8Array; opened: number[] },
  asked: GroupedQuestion,
): Promise<Downstream['page']> {
  const group = asked.group!;
  const standings = opened.map((place): Standing & { place: number } => ({
    place,
    keys: [],
    id: graph.id[found.nodes[place]!]!,
  }));
  const page = pageAfter(standings, {
    order: `${asked.by} ${group}`,
    cursor: asked.cursor,
    limit: asked.limit,
  });
  const details = await rowDetails(
    context.database,
    page.rows.map((row) => row.id),
  );
  return {
    group,
    rows: page.rows.map((row) => ({ sight: sight[row.place]!, details: details.get(row.id)! })),
    nextCursor: page.nextCursor,
  };
}
