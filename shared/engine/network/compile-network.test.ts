import { describe, expect, it } from 'vitest';
import { compileNetwork } from './compile-network.ts';
import type { Network } from './network.ts';
import { networkFromArrays, type NetworkArrays } from './network-from-arrays.ts';

const pair = (extra: Partial<Network>): Network => ({
  values: [
    { id: 'a', local: 1 },
    { id: 'b', local: 1 },
  ],
  sources: [{ id: 's', standardUncertainty: 1 }],
  links: [],
  ...extra,
});
const link = (child: string, parent: string, sensitivity = 1) => ({ child, parent, sensitivity });
const group = (members: string[], covariance: number[][], degreesOfFreedom?: number) => ({
  groups: [{ members, covariance, degreesOfFreedom }],
});
const unit = [
  [1, 0],
  [0, 1],
];

describe('compileNetwork refuses', () => {
  it.each<[string, string, string, Partial<Network>]>([
    [
      'a value named twice',
      'duplicate-id',
      'values[1].id',
      {
        values: [
          { id: 'a', local: 1 },
          { id: 'a', local: 1 },
        ],
      },
    ],
    [
      'a source named as a value',
      'duplicate-id',
      'sources[0].id',
      { sources: [{ id: 'a', standardUncertainty: 1 }] },
    ],
    ['an id that names groups', 'reserved-id', 'values[0].id', { values: [{ id: 'group:0', local: 1 }] }],
    ['a negative local part', 'out-of-range', 'values[0].local', { values: [{ id: 'a', local: -1 }] }],
    [
      'a local part that is no number',
      'not-finite',
      'values[0].local',
      { values: [{ id: 'a', local: NaN }] },
    ],
    [
      'degrees of freedom of 0',
      'out-of-range',
      'values[0].degreesOfFreedom',
      { values: [{ id: 'a', local: 1, degreesOfFreedom: 0 }] },
    ],
    [
      'a negative source',
      'out-of-range',
      'sources[0].standardUncertainty',
      { sources: [{ id: 's', standardUncertainty: -1 }] },
    ],
    ['an unknown child', 'unknown-node', 'links[0].child', { links: [link('x', 'a')] }],
    ['an unknown parent', 'unknown-node', 'links[0].parent', { links: [link('a', 'x')] }],
    ['a source as child', 'source-as-child', 'links[0].child', { links: [link('s', 'a')] }],
    ['an infinite sensitivity', 'not-finite', 'links[0].sensitivity', { links: [link('b', 'a', Infinity)] }],
    [
      'a negative class limit',
      'out-of-range',
      'links[0].classLimit.standardUncertainty',
      { links: [{ ...link('b', 'a'), classLimit: { standardUncertainty: -1 } }] },
    ],
    ['an unknown member', 'unknown-node', 'groups[0].members[1]', group(['a', 'x'], unit)],
    ['a source as member', 'unknown-node', 'groups[0].members[1]', group(['a', 's'], unit)],
    ['a member given twice', 'member-twice', 'groups[0].members[1]', group(['a', 'a'], unit)],
    ['a covariance of another size', 'size-mismatch', 'groups[0].covariance', group(['a', 'b'], [[1]])],
    [
      'an impossible covariance',
      'not-positive-semidefinite',
      'groups[0].covariance[0][1]',
      group(
        ['a', 'b'],
        [
          [1, 2],
          [2, 1],
        ],
      ),
    ],
    [
      'negative degrees of a group',
      'out-of-range',
      'groups[0].degreesOfFreedom',
      group(['a', 'b'], unit, -1),
    ],
  ])('%s', (_, code, field, extra) => {
    expect(() => compileNetwork(pair(extra))).toThrow(
      expect.objectContaining({ name: 'EngineError', code, field }),
    );
  });

  it('a circle, naming its members in order and nothing outside it', () => {
    const values = ['a', 'b', 'c', 'd', 'e'].map((id) => ({ id, local: 1 }));
    const links = [link('b', 'a'), link('c', 'b'), link('d', 'c'), link('b', 'd'), link('e', 'd')];
    const attempt = () => compileNetwork({ values, links });
    expect(attempt).toThrow(expect.objectContaining({ code: 'circle', field: 'links' }));
    expect(attempt).toThrow(/b leans on d leans on c leans on b\./);
  });

  it('a value that leans on itself, also through a class limit', () => {
    const links = [{ ...link('a', 'a'), classLimit: { standardUncertainty: 1 } }];
    expect(() => compileNetwork(pair({ links }))).toThrow(/a leans on a\./);
  });
});

describe('networkFromArrays', () => {
  const arrays = (extra: Partial<NetworkArrays>): NetworkArrays => ({
    local: Float64Array.of(1, 1),
    child: Int32Array.of(1),
    parent: Int32Array.of(0),
    sensitivity: Float64Array.of(0.5),
    ...extra,
  });

  it('names nodes by their index and finds them', () => {
    const net = networkFromArrays(arrays({ sourceUncertainty: Float64Array.of(2) }));
    expect([0, 1, 2].map(net.idOf)).toEqual(['0', '1', '2']);
    expect(['2', '3', '-1', 'x', '01'].map(net.nodeOf)).toEqual([
      2,
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
    expect(net.estimateOf(0)).toBeUndefined();
  });

  it.each<[string, string, string, Partial<NetworkArrays>]>([
    ['parents missing', 'size-mismatch', 'parent', { parent: new Int32Array(0) }],
    ['sensitivities missing', 'size-mismatch', 'sensitivity', { sensitivity: new Float64Array(2) }],
    ['class limits missing', 'size-mismatch', 'classLimit', { classLimit: new Float64Array(2) }],
    [
      'degrees of freedom missing',
      'size-mismatch',
      'degreesOfFreedom',
      { degreesOfFreedom: new Float64Array(1) },
    ],
    ['ids missing', 'size-mismatch', 'ids', { ids: ['a'] }],
    ['a child that is not there', 'unknown-node', 'child[0]', { child: Int32Array.of(2) }],
    ['a parent that is not there', 'unknown-node', 'parent[0]', { parent: Int32Array.of(-1) }],
    [
      'a sensitivity that is no number',
      'not-finite',
      'sensitivity[0]',
      { sensitivity: Float64Array.of(NaN) },
    ],
    ['a class limit that is no number', 'not-finite', 'classLimit[0]', { classLimit: Float64Array.of(NaN) }],
    ['a local part that is no number', 'not-finite', 'local[1]', { local: Float64Array.of(1, NaN) }],
    [
      'a member that is not there',
      'unknown-node',
      'groups[0].members[0]',
      { groups: [{ members: Int32Array.of(2), covariance: [[1]] }] },
    ],
    ['a negative source', 'out-of-range', 'sourceUncertainty[0]', { sourceUncertainty: Float64Array.of(-1) }],
    [
      'degrees of freedom of 0',
      'out-of-range',
      'degreesOfFreedom[0]',
      { degreesOfFreedom: Float64Array.of(0, 1) },
    ],
  ])('refuses %s', (_, code, field, extra) => {
    expect(() => networkFromArrays(arrays(extra))).toThrow(expect.objectContaining({ code, field }));
  });
});
