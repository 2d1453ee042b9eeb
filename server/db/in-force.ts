/**
 * The SQL form of `stateAt(...) === 'in force'` for an `assigned_value` under the alias `v`, with the
 * replacements `:day` (ISO day) and `:knownAt` (the last instant of the knowledge day, UTC).
 */
export const IN_FORCE = `
  v.effective_from <= :day AND v.recorded_at <= :knownAt
  AND NOT EXISTS (
    SELECT 1 FROM value_end e
    WHERE e.value_id = v.id AND e.effective_on <= :day AND e.recorded_at <= :knownAt)`;

/** The replacement for `:knownAt`: the end of a day, as DATETIME(6) compares it. */
export function knownAt(day: string): string {
  return `${day} 23:59:59.999999`;
}
