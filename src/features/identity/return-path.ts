/**
 * The place to go to after sign-in. Only a path of this application is followed: whatever a browser would read
 * as another host leads to `fallback`.
 */
export function returnPath(from: string | null, fallback: string): string {
  if (from === null || !from.startsWith('/') || from.startsWith('/sign-in')) return fallback;
  const here = 'http://here.invalid';
  const read = URL.canParse(from, here) ? new URL(from, here) : null;
  return read?.origin === here ? read.pathname + read.search + read.hash : fallback;
}
