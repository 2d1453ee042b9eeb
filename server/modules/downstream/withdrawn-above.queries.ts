import { knownAt } from '#server/db/in-force.ts';
import { readRows } from '#server/db/read.ts';
import { today, type Context } from '#server/http/context.ts';
import type { StoredValue } from '#server/modules/chains/index.ts';

/** A sentence for a value that is withdrawn today, and one for what it rests on that is. */
export async function withdrawnAbove(
  context: Context,
  focus: StoredValue,
  values: readonly StoredValue[],
): Promise<string[]> {
  const day = today(context);
  const rows = await readRows<{ id: number }>(
    context.database,
    `SELECT DISTINCT value_id AS id FROM value_end
     WHERE kind = 'withdrawn' AND value_id IN (:ids) AND effective_on <= :day AND recorded_at <= :knownAt`,
    { ids: values.map(({ id }) => id), day, knownAt: knownAt(day) },
  );
  const withdrawn = new Set(rows.map(({ id }) => id));
  const above = values.filter(({ id }) => id !== focus.id && withdrawn.has(id));
  const named = above.map(
    ({ certificateNo, registryNo }) => `certificate ${certificateNo} for ${registryNo}`,
  );
  return [
    ...(withdrawn.has(focus.id) ? ['It is itself withdrawn: what is said here counts it as certified.'] : []),
    ...(named.length > 0
      ? [
          `Under reserve: it rests on ${named.join(', ')}, withdrawn since; what is said here counts ${named.length === 1 ? 'it' : 'them'} as certified.`,
        ]
      : []),
  ];
}
