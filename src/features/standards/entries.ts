/** An entry left empty is not known, which is null in the register: for `setValueAs`. */
export function emptyAsNull(entry: string | null): string | null {
  return entry === null || entry.trim() === '' ? null : entry;
}

/** Whole months as a number; what is no number stays as typed, so that the schema names it. */
export function monthsEntry(entry: string | number | null): number | null {
  if (entry === null || String(entry).trim() === '') return null;
  const months = Number(entry);
  return Number.isFinite(months) ? months : (entry as number);
}
