import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { DisplayList } from '#shared/drawing/display-list.ts';
import { namesOf } from '#shared/drawing/link-order.ts';

/** Names of everything drawn: values and effects of both chains, and groups. */
export function drawnNames(
  chain: ChainResponse,
  second: ChainResponse | null,
  list: DisplayList | null,
): (uid: string) => string {
  const names = [namesOf(chain), second ? namesOf(second) : new Map<string, string>()];
  return (uid) => {
    const plate = list?.plates.find(({ id }) => id === uid);
    if (plate?.node.type === 'group') return `${plate.name} (${plate.node.members.length})`;
    return names[0]!.get(uid) ?? names[1]!.get(uid) ?? '';
  };
}
