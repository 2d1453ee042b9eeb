import type { Network } from '../network.ts';
import { seededRandom } from './random.ts';

/** A random network with shared sources, groups with negative covariances, class limits and duplicate links. */
export function randomNetwork(seed: number, size = 12): Network {
  const random = seededRandom(seed);
  const pick = (count: number) => Math.floor(random() * count);
  const signed = () => random() * 4 - 2;
  const values = Array.from({ length: size }, (_, i) => ({ id: `v${i}`, local: random() }));
  const sources = Array.from({ length: 3 }, (_, i) => ({ id: `s${i}`, standardUncertainty: random() }));
  const links: Network['links'] = [];
  // One limit per pair: the same deviation from nominal, met through every link of the pair that uses it.
  const limits = new Map<string, { standardUncertainty: number }>();
  for (let child = 1; child < size; child += 1) {
    for (let n = pick(4); n > 0; n -= 1) {
      const parent = `v${pick(child)}`;
      const classLimit = limits.get(`${child} ${parent}`) ?? { standardUncertainty: random() };
      limits.set(`${child} ${parent}`, classLimit);
      const limit = random() < 0.15 ? { classLimit } : {};
      links.push({ child: `v${child}`, parent, sensitivity: signed(), ...limit });
    }
    for (let n = pick(3); n > 0; n -= 1) {
      links.push({ child: `v${child}`, parent: `s${pick(3)}`, sensitivity: signed() });
    }
  }
  return { values, sources, groups: randomGroups(size, random), links: shuffled(links, random) };
}

/** Two groups over scattered members; A A' is a covariance whatever A is, with entries of both signs. */
function randomGroups(size: number, random: () => number): Network['groups'] {
  const ids = shuffled(
    Array.from({ length: size }, (_, i) => `v${i}`),
    random,
  );
  return [ids.slice(0, 3), ids.slice(3, 5)].map((members) => {
    const factor = members.map(() => members.map(() => random() * 2 - 1));
    const covariance = members.map((_, i) =>
      members.map((_, j) => factor[i]!.reduce((sum, value, k) => sum + value * factor[j]![k]!, 0)),
    );
    return { members, covariance };
  });
}

function shuffled<T>(items: readonly T[], random: () => number): T[] {
  const mixed = [...items];
  for (let last = mixed.length - 1; last > 0; last -= 1) {
    const other = Math.floor(random() * (last + 1));
    [mixed[last], mixed[other]] = [mixed[other]!, mixed[last]!];
  }
  return mixed;
}
