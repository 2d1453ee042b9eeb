/** One page of a group's rows. */
interface RowPage<Row> {
  rows: readonly Row[];
  nextCursor: string | null;
}

/**
 * Every row of every group, page after page in the order of the groups: no more than one page is waited for at a
 * time, and what was handed on need not be kept.
 * @param pageOf asks for a page of a group after a cursor; it stops by throwing
 */
export async function* allRows<Row>(
  keys: readonly string[],
  pageOf: (group: string, cursor: string | undefined) => Promise<RowPage<Row>>,
): AsyncGenerator<readonly Row[]> {
  for (const key of keys) {
    let cursor: string | undefined;
    do {
      const page = await pageOf(key, cursor);
      yield page.rows;
      cursor = page.nextCursor ?? undefined;
    } while (cursor !== undefined);
  }
}
