import type { ChainLink, ChainResponse, ChainSource, ChainValue } from '#shared/contracts/chains.ts';

/** What a generated chain is like; for tests and for measuring the drawing. */
interface Wanted {
  plates: number;
  /** Another one draws another chain. */
  seed?: number;
  /** Plates in a tier, on average. @default 12 */
  tierWidth?: number;
  laboratories?: number;
}

type Random = () => number;

/**
 * A chain that never was: a weight, tiers of values above it, shared effects and roots, with a conserved flow of
 * which some is negative, and a few links that fail. Deterministic. It passes the contract of a reply.
 */
export function generatedChain({
  plates,
  seed = 1,
  tierWidth = 12,
  laboratories = 9,
}: Wanted): ChainResponse {
  const random = randomFrom(seed);
  const effects = Math.floor(plates / 12);
  const values = plates - effects;
  const parents = [
    ...parentsOf(values, tierWidth, random),
    ...Array.from({ length: effects }, (): number[] => []),
  ];
  for (let effect = 0; effect < effects; effect += 1) {
    // Two neighbours share it.
    const below = Math.floor(random() * Math.max(1, values - 2));
    parents[below]!.push(values + effect);
    if (below + 1 < values && parents[below + 1]!.length > 0) parents[below + 1]!.push(values + effect);
  }
  const { flows, shares, locals } = flowsOf(parents, values, random);
  const tiers = tiersOf(parents);
  const nodes = parents.map((above, index) =>
    index < values
      ? valueOf(index, {
          tier: tiers[index]!,
          isRoot: above.every((one) => one >= values),
          share: shares[index]!,
          local: locals[index]!,
          laboratories,
          random,
        })
      : effectOf(index, tiers[index]!, shares[index]!),
  );
  const links = parents.flatMap((above, child) =>
    above.map((parent, at) => linkOf(child, parent, parent >= values, flows[child]![at]!, random)),
  );
  return responseOf(nodes, links);
}

/** Each value leans on one to three of the next tiers; the last ones on nothing. */
function parentsOf(values: number, tierWidth: number, random: Random): number[][] {
  const reached = new Set([0]);
  const parents: number[][] = Array.from({ length: values }, (_, child) => {
    const count = child === 0 ? Math.min(6, tierWidth) : 1 + Math.floor(random() * 2.4);
    const above = new Set<number>();
    for (let one = 0; one < count; one += 1) {
      const parent = child + 1 + Math.floor(random() * 2 * tierWidth);
      if (parent < values) above.add(parent);
    }
    for (const parent of above) reached.add(parent);
    return [...above];
  });
  // What nobody leans on yet is leaned on by the value before it, so that all of it is one chain.
  for (let value = 1; value < values; value += 1)
    if (!reached.has(value))
      parents[Math.max(0, value - 1 - Math.floor(random() * Math.min(tierWidth, value)))]!.push(value);
  return parents;
}

/** What flows out of a node is what flows in and what it adds; the weight passes on all of it. */
function flowsOf(parents: number[][], values: number, random: Random) {
  const shares = parents.map((_, index) => (index === 0 ? 1 : 0));
  const locals: number[] = [];
  const flows: number[][] = [];
  for (const index of upwards(parents)) {
    const above = parents[index]!;
    const weights = above.map(() => (random() < 0.06 ? -0.3 : 0.2 + random()));
    const total = weights.reduce((sum, weight) => sum + weight, 0) + (0.3 + random());
    const out = shares[index]!;
    const isCarrying = total > 0.2;
    flows[index] = above.map((_, at) => (isCarrying ? (out * weights[at]!) / total : 0));
    locals[index] = index >= values ? 0 : out - flows[index]!.reduce((sum, flow) => sum + flow, 0);
    above.forEach((parent, at) => (shares[parent]! += flows[index]![at]!));
  }
  return { flows, shares, locals };
}

/** Every node before what it leans on: numbers grow upwards. */
function upwards(parents: number[][]): number[] {
  return parents.map((_, index) => index);
}

function tiersOf(parents: number[][]): number[] {
  const tiers = parents.map(() => 0);
  parents.forEach((above, child) => {
    for (const parent of above) tiers[parent] = Math.max(tiers[parent]!, tiers[child]! + 1);
  });
  return tiers;
}

function uidOf(index: number): string {
  return `01900000-0000-7000-8000-${index.toString(16).padStart(12, '0')}`;
}

const CLASSES = ['E1', 'E2', 'F1'] as const;
const NOMINALS = ['1000', '2000', '500', '100'] as const;

interface ValueParts {
  tier: number;
  isRoot: boolean;
  share: number;
  local: number;
  laboratories: number;
  random: Random;
}

function valueOf(
  index: number,
  { tier, isRoot, share, local, laboratories, random }: ValueParts,
): ChainValue {
  const laboratory = Math.min(laboratories - 1, Math.floor((tier + random() * 3) / 3)) % laboratories;
  const year = 2025 - Math.min(9, tier);
  const day = `${year}-0${1 + (index % 9)}-1${index % 10}`;
  const issuer = {
    id: uidOf(0xffff00 + laboratory),
    code: `L${laboratory}`,
    name: `Laboratory ${laboratory + 1}`,
  };
  const isWithdrawn = index % 61 === 60;
  return {
    type: 'value',
    uid: uidOf(index),
    view: 'full',
    registryNo: `L${laboratory} ${String(index).padStart(4, '0')}`,
    standardId: uidOf(0x100000 + index),
    revisionId: uidOf(0x200000 + index),
    marking: `no. ${index}`,
    nominal: NOMINALS[index % NOMINALS.length]!,
    class: isRoot ? null : CLASSES[Math.min(2, Math.floor(index / 60)) % CLASSES.length]!,
    holder: null,
    issuer,
    certificateNo: `C-${index}`,
    revisionN: 1,
    quantity: 'conventional mass',
    medium: 'air',
    stage: null,
    deviation: `${index % 2 ? '-' : ''}0.000${String(100 + (index % 800))}`,
    expandedU: '0.00008',
    k: '2',
    performedEnd: day,
    datePrecision: 'day',
    issuedOn: day,
    state: isWithdrawn ? 'withdrawn' : 'in force',
    stateSince: isWithdrawn ? '2026-01-20' : null,
    rootKind: isRoot ? 'recognized certificate' : null,
    scaleVersion: null,
    uStated: 0.00004,
    uCarried: 0.00003,
    uNow: 0.00004,
    uOrigin: 'stated',
    tier,
    localShare: local,
    share,
    now: null,
  };
}

function effectOf(index: number, tier: number, share: number): ChainSource {
  return {
    type: 'source',
    uid: uidOf(index),
    kind: 'volume',
    name: `Volume ${index}`,
    registryNo: null,
    u: 0.003,
    unit: 'cm^3',
    tier,
    share,
  };
}

function linkOf(child: number, parent: number, isEffect: boolean, flow: number, random: Random): ChainLink {
  const draw = random();
  const state =
    isEffect || draw > 0.05 ? 'sound' : draw < 0.015 ? 'broken' : draw < 0.04 ? 'caution' : 'not judged';
  return {
    childUid: uidOf(child),
    parentUid: uidOf(parent),
    role: isEffect ? 'source' : 'reference',
    sensitivity: isEffect ? 0.0012 : 1,
    usedAs: isEffect ? null : 'certificate',
    usedBegin: isEffect ? null : '2024-03-01',
    usedEnd: isEffect ? null : '2024-03-04',
    flow,
    conduct: state,
    today: state,
  };
}

function responseOf(nodes: ChainResponse['nodes'], links: ChainLink[]): ChainResponse {
  const focus = nodes[0] as ChainValue;
  const count = (verdict: 'conduct' | 'today') => {
    const of = (state: ChainLink['today']) => links.filter((link) => link[verdict] === state).length;
    return { sound: of('sound'), caution: of('caution'), broken: of('broken'), notJudged: of('not judged') };
  };
  return {
    question: {
      valueUid: focus.uid,
      day: '2026-06-01',
      known: '2026-06-01',
      as: 'certified',
      ruleSet: '1',
      engine: '1',
    },
    focusUid: focus.uid,
    inForceInstead: null,
    succeededBy: null,
    newerInForce: null,
    asNowKnown: null,
    nodes,
    links,
    definition: 'planck constant',
    uncertainty: {
      standard: 0.00004,
      expanded: 0.00008,
      k: 2,
      stated: 0.00004,
      carried: 0.00003,
      degreesOfFreedom: null,
      missing: [],
    },
    rootShares: [],
    contributions: [],
    improvements: [],
    sideBySide: [],
    sideBySideNote: null,
    rules: [],
    checks: [],
    summary: { links: links.length, conduct: count('conduct'), today: count('today') },
    abilities: {},
  };
}

/** Numbers from 0 to 1, the same for the same seed (a multiplicative generator of Park and Miller, from memory). */
function randomFrom(seed: number): Random {
  let state = (seed * 48_271 + 11) % 2_147_483_647;
  return () => {
    state = (state * 48_271) % 2_147_483_647;
    return state / 2_147_483_647;
  };
}
