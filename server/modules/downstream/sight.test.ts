import { describe, expect, it } from 'vitest';
import type { User } from '#server/policy/user.ts';
import { below } from './below.ts';
import { GraphArrays } from './graph-arrays.ts';
import { visibleRows } from './rows.ts';
import { SIGHT, sightOf } from './sight.ts';
import { graphValue } from './example-graph.ts';

const { none, warning, issued, full } = SIGHT;

function person(parts: Partial<User>): User {
  return {
    accountId: 'a',
    name: 'A person',
    email: 'a@test.example',
    isRegistrar: false,
    isPilot: false,
    memberships: [],
    assessedLaboratoryIds: [],
    ...parts,
  };
}
const of = (laboratoryId: string) => person({ memberships: [{ laboratoryId, role: 'reader' }] });

/**
 * 1 institute's own; 2 of home, by the institute; 3 of home, by home, from 2; 4 of a customer, by home, from 3;
 * 5 of a customer, by the customer, from 4; 6 of another, by the institute, from 1.
 */
function smallGraph(): GraphArrays {
  const graph = new GraphArrays();
  const put = (id: number, holderId: string, issuerId: string, standardId = `s${id}`) =>
    graph.addValue(graphValue(id, { holderId, issuerId, standardId }));
  put(1, 'institute', 'institute');
  put(2, 'home', 'institute');
  put(3, 'home', 'home');
  put(4, 'customer', 'home');
  put(5, 'customer', 'customer');
  put(6, 'another', 'institute');
  for (const [childId, parentId] of [
    [2, 1],
    [3, 2],
    [4, 3],
    [5, 4],
    [6, 1],
  ] as const) {
    const day = { usedBeginDay: 1, usedEndDay: 1, isClassLimit: false, usedExpandedU: null };
    graph.addLink({ childId, parentId, sensitivity: 1, ...day });
  }
  return graph;
}

const seen = (user: User) => {
  const graph = smallGraph();
  const found = below(graph, [0]);
  const sight = sightOf(graph, found, user);
  return [1, 2, 3, 4, 5, 6].map((id) => sight[found.placeOf(graph.nodeOf(id))]);
};

describe('sightOf', () => {
  it.each<[string, User, number[]]>([
    ['the institute', of('institute'), [full, issued, warning, warning, warning, issued]],
    ['home', of('home'), [none, full, full, issued, warning, none]],
    ['the customer', of('customer'), [none, none, none, full, full, none]],
    ['another', of('another'), [none, none, none, none, none, full]],
    ['a stranger', of('stranger'), [none, none, none, none, none, none]],
    ['a comparison pilot', person({ isPilot: true }), [none, none, none, none, none, none]],
    ['the registrar', person({ isRegistrar: true }), [full, full, full, full, full, full]],
    [
      'an assessor of home',
      person({ assessedLaboratoryIds: ['home'] }),
      [none, full, full, issued, warning, none],
    ],
  ])('of %s', (_, user, expected) => {
    expect(seen(user)).toEqual(expected);
  });
});

describe('visibleRows', () => {
  it('tells weights of others once, by the value that stands for them, and values of one’s own each', () => {
    const graph = new GraphArrays();
    for (const [id, holderId, standardId] of [
      [1, 'home', 'w1'],
      [2, 'home', 'w1'],
      [3, 'other', 'w2'],
      [4, 'other', 'w2'],
      [5, 'other', 'w3'],
    ] as const) {
      graph.addValue(graphValue(id, { holderId, issuerId: holderId, standardId, performedDay: id }));
    }
    const found = below(graph, [0, 1, 2, 3, 4]);
    const rows = visibleRows(graph, found, {
      sight: Uint8Array.from([full, full, warning, warning, none]),
      weightsUpTo: warning,
      isRow: () => true,
      isBefore: (a, b) => graph.performedDay[found.nodes[a]!]! > graph.performedDay[found.nodes[b]!]!,
    });
    expect(rows.map((place) => graph.id[found.nodes[place]!])).toEqual([1, 2, 4]);
  });
});
