/**
 * The SQL form of `stateAt(...)` for an `assigned_value` under the alias `v`, with the replacements `:day` and
 * `:knownAt`: the word for its state. What the register did not know yet is left out by the caller (`IN_FORCE`
 * or `v.recorded_at <= :knownAt`).
 */
export const STATE_ON_DAY = `
  CASE WHEN v.effective_from > :day THEN 'not yet in force'
  ELSE COALESCE((SELECT e.kind FROM value_end e
    WHERE e.value_id = v.id AND e.effective_on <= :day AND e.recorded_at <= :knownAt
    ORDER BY e.kind = 'withdrawn' DESC, e.effective_on LIMIT 1), 'in force') END`;

/** The day since when `STATE_ON_DAY` is superseded or withdrawn; null otherwise. */
export const STATE_SINCE = `
  CASE WHEN v.effective_from > :day THEN NULL
  ELSE (SELECT e.effective_on FROM value_end e
    WHERE e.value_id = v.id AND e.effective_on <= :day AND e.recorded_at <= :knownAt
    ORDER BY e.kind = 'withdrawn' DESC, e.effective_on LIMIT 1) END`;

/** The reason given for `STATE_SINCE`; null where it is null. */
export const STATE_REASON = `
  CASE WHEN v.effective_from > :day THEN NULL
  ELSE (SELECT e.reason FROM value_end e
    WHERE e.value_id = v.id AND e.effective_on <= :day AND e.recorded_at <= :knownAt
    ORDER BY e.kind = 'withdrawn' DESC, e.effective_on LIMIT 1) END`;
