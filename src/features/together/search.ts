import { Id } from '#shared/ids.ts';

/** A weight by one of its values, on one pan (+1) or on the other (-1). */
export interface Placed {
  uid: string;
  sign: 1 | -1;
}

const MOST = 20;

/** Reads which weights are put together: `values` with their uids, `signs` with + and -. What is none is left out. */
export function readPlaced(parameters: URLSearchParams): Placed[] {
  const uids = (parameters.get('values') ?? '').split(',');
  const signs = [...(parameters.get('signs') ?? '')];
  const placed = uids.flatMap((text, at): Placed[] => {
    const uid = Id.safeParse(text.trim());
    return uid.success ? [{ uid: uid.data, sign: signs[at] === '-' ? -1 : 1 }] : [];
  });
  return placed.filter(({ uid }, at) => placed.findIndex((each) => each.uid === uid) === at).slice(0, MOST);
}

/** The address's parameters; signs are left out where all weights lie on one pan. */
export function placedParameters(placed: readonly Placed[]): Record<string, string> {
  if (placed.length === 0) return {};
  const values = placed.map(({ uid }) => uid).join(',');
  const signs = placed.map(({ sign }) => (sign === -1 ? '-' : '+')).join('');
  return signs.includes('-') ? { values, signs } : { values };
}
