import { useState } from 'react';

/** The list of last time while its members are the same ones, so that what is drawn from it is not drawn again. */
export function useSameList<Member>(list: readonly Member[]): readonly Member[] {
  const [kept, setKept] = useState(list);
  const isSame = list.length === kept.length && list.every((member, at) => member === kept[at]);
  if (!isSame) setKept(list);
  return isSame ? kept : list;
}
