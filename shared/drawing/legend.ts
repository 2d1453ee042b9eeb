import type { DisplayList, Plate, Ribbon } from './display-list.ts';

/** Kinds of sign in a drawing, each drawn as a sample beside its words. */
export type LegendSign =
  | 'flow'
  | 'hairline'
  | 'negative'
  | 'informing'
  | 'beside'
  | 'broken'
  | 'caution'
  | 'own part'
  | 'unknown part'
  | 'root'
  | 'group'
  | 'shared';

export interface LegendEntry {
  sign: LegendSign;
  says: string;
}

const SAYS: Readonly<Record<LegendSign, string>> = {
  flow: 'as wide as the share of the weight’s variance that flows through',
  hairline: 'too thin for the scale, or no flow known: not to scale',
  negative: 'negative flow, where correlations cancel; beside what flows down, not in it',
  informing: 'informs, nothing flows',
  beside: 'of the second weight, without flow',
  broken: 'a check fails',
  caution: 'a check warns',
  'own part': 'what a value adds of its own, at the same scale',
  'unknown part': 'what it adds is not known',
  root: 'a root: the chain ends here by right, for the reason named',
  group: 'several values as one',
  shared: 'both weights lean on it',
};

/** How to read the drawing: only the signs that occur in it. */
export function legendOf(list: DisplayList): LegendEntry[] {
  const signs = new Set<LegendSign>([
    ...list.ribbons.flatMap(signsOfRibbon),
    ...list.plates.flatMap(signsOfPlate),
  ]);
  return (Object.keys(SAYS) as LegendSign[])
    .filter((sign) => signs.has(sign))
    .map((sign) => ({ sign, says: SAYS[sign] }));
}

function signsOfRibbon({ look, state }: Ribbon): LegendSign[] {
  const looks: Record<Ribbon['look'], LegendSign> = {
    solid: 'flow',
    hairline: 'hairline',
    negative: 'negative',
    informing: 'informing',
    beside: 'beside',
  };
  return [looks[look], ...(state === 'broken' || state === 'caution' ? [state] : [])];
}

function signsOfPlate({ stub, rule, isShared }: Plate): LegendSign[] {
  const signs: LegendSign[] = [];
  if (stub) signs.push(stub.look === 'unknown' ? 'unknown part' : 'own part');
  if (stub?.look === 'hairline') signs.push('hairline');
  if (stub?.look === 'negative') signs.push('negative');
  if (rule === 'double') signs.push('root');
  if (rule === 'pile') signs.push('group');
  if (isShared) signs.push('shared');
  return signs;
}
