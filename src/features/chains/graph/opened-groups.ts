/** The address's list of opened groups with one more. */
export function openGroup(open: string | undefined, key: string): string {
  return [...new Set([...keysOf(open), key])].join(',');
}

/** The list with one less; undefined where none is left. */
export function closeGroup(open: string | undefined, key: string): string | undefined {
  const left = keysOf(open).filter((one) => one !== key);
  return left.length === 0 ? undefined : left.join(',');
}

/** Keys of the groups that are opened. */
export function keysOf(open: string | undefined): string[] {
  return (open ?? '').split(',').filter((key) => key !== '');
}
