import { describe, expect, it } from 'vitest';
import { graphValue } from './example-graph.ts';
import { GraphArrays } from './graph-arrays.ts';

const link = (childId: number, parentId: number) => ({
  childId,
  parentId,
  sensitivity: childId / parentId,
  usedBeginDay: 1,
  usedEndDay: 2,
  isClassLimit: false,
  usedExpandedU: null,
});

describe('GraphArrays', () => {
  it('keeps thousands of values and links through every growth, both ways', () => {
    const graph = new GraphArrays();
    graph.reserve(10, 10);
    const count = 5000;
    for (let id = 1; id <= count; id += 1) graph.addValue(graphValue(3 * id, { deviation: id / 1e6 }));
    for (let id = 2; id <= count; id += 1) graph.addLink(link(3 * id, 3));
    expect([graph.valueCount, graph.linkCount]).toEqual([count, count - 1]);
    const children = new Set<number>();
    for (let at = graph.firstDown[0]!; at >= 0; at = graph.nextDown[at]!) {
      const child = graph.linkChild[at]!;
      children.add(graph.id[child]!);
      expect(graph.sensitivity[at]).toBe(graph.id[child]! / 3);
      expect(graph.firstUp[child]).toBe(at);
    }
    expect(children.size).toBe(count - 1);
    expect(graph.deviation[graph.nodeOf(3 * count)]).toBe(count / 1e6);
  });

  it('adds a value once, and leaves out links and ends of values that it does not hold', () => {
    const graph = new GraphArrays();
    graph.addValue(graphValue(5));
    graph.addValue(graphValue(5, { deviation: 1 }));
    graph.addLink(link(5, 6));
    graph.addEnd({ valueId: 7, effectiveDay: 1, recordedDay: 1 });
    expect([graph.valueCount, graph.linkCount, graph.ends.size]).toEqual([1, 0, 0]);
    expect(graph.deviation[0]).toBe(0);
    expect([graph.nodeOf(6), graph.nodeOf(1_000_000)]).toEqual([-1, -1]);
  });

  it('knows values of one standard, also after its names were forgotten', () => {
    const graph = new GraphArrays();
    graph.addValue(graphValue(1, { standardId: 'a' }));
    graph.addValue(graphValue(2, { standardId: 'a' }));
    graph.forgetStandardNames();
    graph.knowStandard('a', 2);
    graph.addValue(graphValue(3, { standardId: 'a' }));
    graph.addValue(graphValue(4, { standardId: 'b' }));
    expect([...graph.standard.subarray(0, 4)]).toEqual([0, 0, 0, 3]);
  });
});
