import type { ClassVerdict, WhatIfInput } from '#shared/contracts/downstream.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { below } from './below.ts';
import { judgeClassOf } from './class-verdict.ts';
import { consequenceOf, dryRun, type DryRun } from './dry-run.ts';
import type { GraphChange } from './effects.ts';
import type { GraphArrays } from './graph-arrays.ts';
import { graphBelow } from './graph-memory.ts';
import { groupKeyOf } from './groups.ts';
import { inForceOn } from './in-force-on.ts';
import { pageAfter } from './keyset.ts';
import { noticeTerms } from './notice-terms.ts';
import { askedDays } from './question.ts';
import {
  laboratoriesById,
  rowDetails,
  type NamedLaboratory,
  type RowDetails,
} from './row-details.queries.ts';
import { visibleRows } from './rows.ts';
import { SIGHT } from './sight.ts';
import type { DownstreamSubject } from './downstream.policy.ts';
import { WhatIfGroups, type WhatIfGroupSums } from './what-if-groups.ts';
import { standingsOf } from './what-if-order.ts';

/** A row of a page with what the changes would do to it. */
export interface WhatIfFound {
  sight: number;
  details: RowDetails;
  /** Grams; NaN where not computable. */
  shift: number;
  expandedU: number;
  expandedUAfter: number;
  classBefore: ClassVerdict;
  classAfter: ClassVerdict;
  isBeyondLimit: boolean;
  word: number;
}

export interface WhatIf {
  question: { day: string; known: string } & Pick<WhatIfInput, 'by' | 'sort' | 'threshold'>;
  groups: WhatIfGroupSums[];
  page: { group: string; rows: WhatIfFound[]; nextCursor: string | null } | null;
  laboratories: Map<string, NamedLaboratory>;
  beyondLimit: RowDetails[];
}

/** What the changes would do to whoever leans on what they change. Nothing is changed, and no act is recorded. */
export async function whatIf(
  context: SignedInContext,
  { ids }: DownstreamSubject,
  input: WhatIfInput,
): Promise<WhatIf> {
  const graph = await graphBelow(context.database, ids.flat());
  const starts = new Set(ids.flat().map((id) => graph.nodeOf(id)));
  const found = below(graph, starts);
  const run = dryRun(graph, found, {
    changes: changesOf(graph, ids, input),
    user: context.user,
    threshold: input.threshold,
  });
  const days = askedDays(context, input);
  const named = namedNodes(graph, ids, input);
  const rows = visibleRows(graph, found, {
    sight: run.sight,
    // Value, U and shift/U are for the holder: a customer's weight is told as a warning, though one issued its certificate.
    weightsUpTo: SIGHT.issued,
    isRow: (place) => {
      const node = found.nodes[place]!;
      return !named.has(node) && inForceOn(graph, node, days.dayNumber, days.knownNumber);
    },
    isBefore: (a, b) => isStronger(run, a, b),
  });
  const groups = new WhatIfGroups(run, groupKeyOf(graph, input.by));
  for (const place of rows) groups.add(place);
  const { by, sort, threshold } = input;
  const question = { day: days.day, known: days.known, by, sort, threshold };
  return { question, ...(await told(context, run, groups, input)) };
}

async function told(
  context: SignedInContext,
  run: DryRun,
  groups: WhatIfGroups,
  input: WhatIfInput,
): Promise<Omit<WhatIf, 'question'>> {
  const page =
    input.group === undefined ? null : await pageOf(context, run, groups.placesOf(input.group), input);
  const leaving = run.effects.leaving.filter((place) => run.sight[place] === SIGHT.full);
  const beyond = await rowDetails(
    context.database,
    leaving.map((place) => run.graph.id[run.found.nodes[place]!]!),
  );
  const laboratories = await laboratoriesById(context.database, [
    ...(input.by === 'laboratory' ? groups.all().map((group) => group.key) : []),
    ...(page?.rows ?? []).flatMap(({ details }) => [details.holderId, details.issuerId]),
  ]);
  return { groups: groups.all(), page, laboratories, beyondLimit: [...beyond.values()] };
}

function changesOf(graph: GraphArrays, ids: number[][], input: WhatIfInput): GraphChange[] {
  return input.changes.map((change, at): GraphChange => {
    const nodes = ids[at]!.map((id) => graph.nodeOf(id));
    switch (change.kind) {
      case 'shift':
        return { kind: 'shift', node: nodes[0]!, shift: Number(change.shift) };
      case 'raise':
        return { kind: 'raise', node: nodes[0]!, addedU: change.addedU };
      case 'withdraw':
        return { kind: 'withdraw', nodes };
      case 'notice':
        return {
          kind: 'notice',
          addedU: change.addedUPerKilogram,
          covered: noticeTerms(graph, nodes, change),
        };
    }
  });
}

/** The values that the changes name one by one: they are the question, not its answer. */
function namedNodes(graph: GraphArrays, ids: number[][], input: WhatIfInput): Set<number> {
  return new Set(
    ids.flatMap((each, at) =>
      input.changes[at]!.kind === 'notice' ? [] : each.map((id) => graph.nodeOf(id)),
    ),
  );
}

/** Of two values of one weight the one with the stronger word stands for it, of equals the one that shifts more. */
function isStronger({ effects, word, graph, found }: DryRun, a: number, b: number): boolean {
  const difference = word[a]! - word[b]!;
  if (difference !== 0) return difference > 0;
  const further = Math.abs(effects.shift[a]!) - Math.abs(effects.shift[b]!);
  return further > 0 || (!(further < 0) && graph.id[found.nodes[a]!]! > graph.id[found.nodes[b]!]!);
}

async function pageOf(
  context: SignedInContext,
  run: DryRun,
  places: readonly number[],
  input: WhatIfInput,
): Promise<WhatIf['page']> {
  const { graph, sight, word } = run;
  const group = input.group!;
  const page = pageAfter(standingsOf(run, places, input.sort), {
    order: `${input.sort} ${input.by} ${group}`,
    cursor: input.cursor,
    limit: input.limit,
  });
  const details = await rowDetails(
    context.database,
    page.rows.map((row) => row.id),
  );
  const judge = judgeClassOf(graph);
  const rows = page.rows.map(({ place, id }): WhatIfFound => {
    const { before, after, ...numbers } = consequenceOf(run, place, judge);
    return {
      ...numbers,
      sight: sight[place]!,
      details: details.get(id)!,
      classBefore: before,
      classAfter: after,
      word: word[place]!,
    };
  });
  return { group, rows, nextCursor: page.nextCursor };
}
