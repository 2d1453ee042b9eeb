import type { ExposureQuery } from '#shared/contracts/downstream.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { below } from './below.ts';
import { dayNumber } from './day-number.ts';
import { tell, type Downstream } from './downstream.service.ts';
import { graphBelow } from './graph-memory.ts';

/**
 * What leaned on a weight from its last good day to its first bad one: values that used one of its values on a day
 * in between, either day included, and everything below them.
 */
export async function exposureOf(
  context: SignedInContext,
  ids: readonly number[],
  asked: ExposureQuery,
): Promise<Downstream> {
  const graph = await graphBelow(context.database, ids);
  const from = dayNumber(asked.lastGood);
  const to = dayNumber(asked.firstBad);
  const own = ids.map((id) => graph.nodeOf(id));
  const users: number[] = [];
  for (const node of own) {
    for (let link = graph.firstDown[node]!; link >= 0; link = graph.nextDown[link]!) {
      const isBetween = graph.usedEndDay[link]! >= from && graph.usedBeginDay[link]! <= to;
      if (isBetween) users.push(graph.linkChild[link]!);
    }
  }
  const exposed = below(graph, users);
  // The weight's own values are walked too, so that what leans on one's own is known as such.
  return tell(
    context,
    graph,
    { found: below(graph, own), isAsked: (node) => exposed.placeOf(node) >= 0 },
    asked,
  );
}
