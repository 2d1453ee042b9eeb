/**
 * The rows of an assertion table that speak for `:day`: of each subject (the columns of `partition`), the
 * row recorded last among those that cover the day. Rows of one act are ordered by their time-ordered id.
 */
export function standingOn(table: string, partition: string): string {
  return `
    SELECT * FROM (
      SELECT a.*, ROW_NUMBER() OVER (PARTITION BY ${partition} ORDER BY a.act_seq DESC, a.id DESC) AS nth
      FROM ${table} a
      WHERE a.valid_from <= :day AND (a.valid_to IS NULL OR a.valid_to >= :day)) covering
    WHERE nth = 1`;
}
