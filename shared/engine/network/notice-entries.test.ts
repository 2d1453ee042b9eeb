import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { noticeEntries } from './notice-entries.ts';

interface Link {
  parent: number;
  sensitivity: number;
}

/** Total sensitivity of every node to an effect that enters as told. */
function totals(masses: number[], links: Link[][], entries: Map<number, number>): number[] {
  const found: number[] = [];
  masses.forEach((mass, node) => {
    const inherited = links[node]!.reduce((sum, link) => sum + link.sensitivity * found[link.parent]!, 0);
    found.push(inherited + (entries.get(node) ?? 0) * mass);
  });
  return found;
}

/** Each node leans on up to three earlier ones that share its mass between them; some lean on none. */
const networks = fc
  .array(
    fc.record({
      mass: fc.integer({ min: 1, max: 5000 }).map((grams) => grams / 1000),
      parents: fc.array(fc.record({ at: fc.nat(1000), weight: fc.integer({ min: 1, max: 9 }) }), {
        maxLength: 3,
      }),
      isCovered: fc.boolean(),
    }),
    { minLength: 1, maxLength: 25 },
  )
  .map((nodes) => {
    const masses = nodes.map((node) => node.mass);
    const links = nodes.map(({ mass, parents }, node): Link[] => {
      const chosen = node === 0 ? [] : parents;
      const whole = chosen.reduce((sum, { weight }) => sum + weight, 0);
      return chosen.map(({ at, weight }) => {
        const parent = at % node;
        return { parent, sensitivity: (mass * weight) / whole / masses[parent]! };
      });
    });
    return { masses, links, covered: nodes.map((node) => node.isCovered) };
  });

const entriesOf = (masses: number[], links: Link[][], covered: boolean[]) =>
  noticeEntries(
    masses.keys(),
    (node) => links[node]!,
    new Map([...masses.entries()].filter(([node]) => covered[node])),
  );

describe('noticeEntries on random networks of masses', () => {
  it('gives every covered value its mass over 1 kg, at any depth and by any roads', () => {
    fc.assert(
      fc.property(networks, ({ masses, links, covered }) => {
        const found = totals(masses, links, entriesOf(masses, links, covered));
        masses.forEach((mass, node) => {
          if (covered[node]) expect(found[node]! / mass).toBeCloseTo(1, 2);
        });
      }),
    );
  });

  it('gives the mass over 1 kg to whatever stands below covered roots, covered itself or not', () => {
    fc.assert(
      fc.property(networks, ({ masses, links, covered }) => {
        const isCovered = covered.map((is, node) => is || links[node]!.length === 0);
        const entries = entriesOf(masses, links, isCovered);
        totals(masses, links, entries).forEach((total, node) =>
          expect(total / masses[node]!).toBeCloseTo(1, 9),
        );
        for (const node of entries.keys()) expect(links[node]).toHaveLength(0);
      }),
    );
  });
});

describe('noticeEntries', () => {
  it('enters a younger covered value for the part that comes over a value not covered', () => {
    const links = [
      [],
      [],
      [
        { parent: 0, sensitivity: 0.75 },
        { parent: 1, sensitivity: 0.25 },
      ],
    ];
    expect([...entriesOf([1, 1, 1], links, [true, false, true])]).toEqual([
      [0, 1],
      [2, 0.25],
    ]);
  });

  it('takes a sensitivity with a correction for buoyancy as the ratio of the masses', () => {
    const links = [[], [{ parent: 0, sensitivity: 1.00015 }]];
    expect([...entriesOf([1, 1], links, [true, true]).keys()]).toEqual([0]);
  });

  it('enters anew where nothing passes, as below a class limit', () => {
    expect([...entriesOf([1, 0.5], [[], []], [true, true])]).toEqual([
      [0, 1],
      [1, 1],
    ]);
  });
});
