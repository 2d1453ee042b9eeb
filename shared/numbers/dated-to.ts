/** A date no more exact than it is known. */
export function datedTo(day: string, precision: 'day' | 'month' | 'year'): string {
  return { day, month: day.slice(0, 7), year: day.slice(0, 4) }[precision];
}
