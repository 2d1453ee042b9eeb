import { describe, expect, it } from 'vitest';
import { applyChanges } from './apply-changes.ts';
import type { Change } from './changes.ts';
import type { Network } from './network.ts';
import { propagate } from './propagate.ts';

/** unit -> old, new; old -> used -> end; a class limit from old to `coarse`; new is old's successor. */
function register(): Network {
  return {
    values: ['unit', 'old', 'new', 'used', 'end', 'coarse'].map((id) => ({ id, local: 1 })),
    links: [
      { child: 'old', parent: 'unit', sensitivity: 1 },
      { child: 'new', parent: 'unit', sensitivity: 1 },
      { child: 'used', parent: 'old', sensitivity: 0.5 },
      { child: 'end', parent: 'used', sensitivity: 2 },
      { child: 'coarse', parent: 'old', sensitivity: 1, classLimit: { standardUncertainty: 3 } },
    ],
  };
}

function after(changes: Change[], network = register()) {
  const result = applyChanges(network, changes);
  const named = (column: Float64Array) =>
    Object.fromEntries(network.values.map(({ id }, i) => [id, column[i]!]));
  return {
    shifts: named(result.shifts),
    variances: named(result.variances),
    notComputable: result.notComputable,
  };
}

describe('applyChanges', () => {
  it('changes nothing without changes', () => {
    const { shifts, variances, notComputable } = after([]);
    expect(Object.values(shifts)).toEqual([0, 0, 0, 0, 0, 0]);
    expect(variances.end).toBeCloseTo(1 + 4 + 2, 13);
    expect(variances.coarse).toBeCloseTo(10, 13);
    expect(notComputable).toEqual([]);
  });

  it('adds shifts along the links and stops them at a class limit', () => {
    const { shifts } = after([
      { kind: 'shift', value: 'unit', delta: 10 },
      { kind: 'shift', value: 'used', delta: 1 },
    ]);
    expect(shifts).toEqual({ unit: 10, old: 10, new: 10, used: 6, end: 12, coarse: 0 });
  });

  it('raises a local part in quadrature for all that lean on it', () => {
    const { variances } = after([
      { kind: 'raise', value: 'old', addedStandardUncertainty: 2 },
      { kind: 'raise', value: 'old', addedStandardUncertainty: 1 },
    ]);
    expect(variances.old).toBeCloseTo(2 + 5, 13);
    expect(variances.end).toBeCloseTo(7 + 5, 13);
    expect(variances.new).toBeCloseTo(2, 13);
  });

  it('raises the variance of a group member and leaves its covariance', () => {
    const network = register();
    network.groups = [
      {
        members: ['old', 'new'],
        covariance: [
          [1, 0.5],
          [0.5, 1],
        ],
      },
    ];
    const { variances } = after([{ kind: 'raise', value: 'old', addedStandardUncertainty: 2 }], network);
    expect(variances.old).toBeCloseTo(6, 13);
    expect(variances.new).toBeCloseTo(2, 13);
  });

  it('loses what depends on a withdrawn value, but not what used its class limit', () => {
    const { shifts, variances, notComputable } = after([
      { kind: 'withdraw', value: 'old' },
      { kind: 'shift', value: 'unit', delta: 1 },
    ]);
    expect(notComputable).toEqual(['old', 'used', 'end']);
    expect([variances.old, variances.used, variances.end]).toEqual([Infinity, Infinity, Infinity]);
    expect(shifts).toMatchObject({ old: 0, end: 0, new: 1 });
    expect(variances.coarse).toBeCloseTo(10, 13);
  });

  it('reads those that leaned on a superseded value as leaning on its successor', () => {
    const network = register();
    network.values[2]!.local = 2;
    const { shifts, variances } = after([{ kind: 'replace', value: 'old', by: 'new', delta: 4 }], network);
    expect(shifts).toEqual({ unit: 0, old: 4, new: 0, used: 2, end: 4, coarse: 0 });
    expect(variances.end).toBeCloseTo(1 + 4 + (1 + 4), 13);
    expect(variances.old).toBeCloseTo(5, 13);
  });

  it('counts only the topmost of two replaced values on one road', () => {
    // unit is superseded too: its change is already in the successor of old, which leans on newUnit.
    const network = register();
    network.values.push({ id: 'new unit', local: 1 });
    network.links[1] = { child: 'new', parent: 'new unit', sensitivity: 1 };
    const { shifts } = after(
      [
        { kind: 'replace', value: 'old', by: 'new', delta: 4 },
        { kind: 'replace', value: 'unit', by: 'new unit', delta: 3 },
      ],
      network,
    );
    expect(shifts).toMatchObject({ unit: 3, old: 4, new: 0, used: 2, end: 4 });
  });

  it('follows a chain of replacements, and lets a successor keep its link to what it replaced', () => {
    const network = register();
    network.values.push({ id: 'newest', local: 1 });
    network.links.push({ child: 'newest', parent: 'old', sensitivity: 1 });
    const { shifts } = after(
      [
        { kind: 'replace', value: 'old', by: 'new', delta: 4 },
        { kind: 'replace', value: 'new', by: 'newest', delta: 2 },
        { kind: 'shift', value: 'unit', delta: 1 },
      ],
      network,
    );
    expect(shifts).toMatchObject({ old: 7, new: 3, newest: 1, used: 3.5, end: 7 });
  });

  it('counts the difference once where a child leaned on both the old value and its successor', () => {
    const network = register();
    network.links.push({ child: 'used', parent: 'new', sensitivity: 0.5 });
    const { shifts, variances } = after([{ kind: 'replace', value: 'old', by: 'new', delta: 4 }], network);
    expect(shifts.used).toBe(2);
    expect(variances.used).toBeCloseTo(1 + 2, 13);
  });
});

describe('applyChanges with a notice', () => {
  const notice = (extra: object = {}): Change => ({
    kind: 'notice',
    id: 'scale',
    standardUncertainty: 3,
    terms: [
      { value: 'old', shift: -35, sensitivity: 1 },
      { value: 'end', shift: -35, sensitivity: 1 },
    ],
    ...extra,
  });

  it('enters once per road, at the oldest covered value, at any depth', () => {
    const { shifts, variances } = after([notice()]);
    expect(shifts).toEqual({ unit: 0, old: -35, new: 0, used: -17.5, end: -35, coarse: 0 });
    expect(variances.old).toBeCloseTo(2 + 9, 13);
    expect(variances.end).toBeCloseTo(7 + 9, 13);
    expect(variances.unit).toBeCloseTo(1, 13);
  });

  it('is one shared effect: it makes covered values move together', () => {
    const network = register();
    network.values.push({ id: 'difference', local: 0 });
    network.links.push(
      { child: 'difference', parent: 'old', sensitivity: 1 },
      { child: 'difference', parent: 'new', sensitivity: -1 },
    );
    const terms = ['old', 'new'].map((value) => ({ value, shift: 1, sensitivity: 1 }));
    const { shifts, variances } = after([notice({ terms })], network);
    expect(shifts.difference).toBe(0);
    expect(variances.difference).toBeCloseTo(2, 12);
  });

  it('does not shift a second time where the corrected value was used, but keeps its uncertainty', () => {
    const { shifts, variances } = after([
      notice({ alreadyApplied: [{ child: 'used', parent: 'old' }] }),
      { kind: 'shift', value: 'unit', delta: 2 },
    ]);
    expect(shifts).toMatchObject({ old: -33, used: 1, end: 2 });
    expect(variances.end).toBeCloseTo(7 + 9, 13);
  });

  it('keeps the other sources as they were', () => {
    const network = register();
    network.sources = [{ id: 'volume', standardUncertainty: 2 }];
    network.links.push({ child: 'end', parent: 'volume', sensitivity: 1 });
    const { variances } = after([notice()], network);
    expect(variances.end).toBeCloseTo(7 + 4 + 9, 13);
    expect(propagate(network, 'end').standardUncertainty! ** 2).toBeCloseTo(11, 13);
  });
});

describe('applyChanges refuses', () => {
  const notice = { kind: 'notice' as const, id: 'n', standardUncertainty: 1, terms: [] };
  it.each<[string, string, string, Change[]]>([
    ['an unknown value', 'unknown-node', 'changes[0].value', [{ kind: 'withdraw', value: 'x' }]],
    ['a source', 'not-a-value', 'changes[0].value', [{ kind: 'withdraw', value: 's' }]],
    [
      'a shift that is no number',
      'not-finite',
      'changes[0].delta',
      [{ kind: 'shift', value: 'old', delta: NaN }],
    ],
    [
      'a negative added uncertainty',
      'out-of-range',
      'changes[0].addedStandardUncertainty',
      [{ kind: 'raise', value: 'old', addedStandardUncertainty: -1 }],
    ],
    [
      'an unknown successor',
      'unknown-node',
      'changes[0].by',
      [{ kind: 'replace', value: 'old', by: 'x', delta: 0 }],
    ],
    [
      'a difference that is no number',
      'not-finite',
      'changes[0].delta',
      [{ kind: 'replace', value: 'old', by: 'new', delta: Infinity }],
    ],
    [
      'two successors',
      'replaced-twice',
      'changes[1].value',
      [
        { kind: 'replace', value: 'old', by: 'new', delta: 0 },
        { kind: 'replace', value: 'old', by: 'end', delta: 0 },
      ],
    ],
    [
      'a value that stands in its own place',
      'replaced-in-a-circle',
      'changes[1].by',
      [
        { kind: 'replace', value: 'old', by: 'new', delta: 0 },
        { kind: 'replace', value: 'new', by: 'old', delta: 0 },
      ],
    ],
    [
      'a value both withdrawn and replaced',
      'withdrawn-and-replaced',
      'changes[1].value',
      [
        { kind: 'replace', value: 'old', by: 'new', delta: 0 },
        { kind: 'withdraw', value: 'old' },
      ],
    ],
    [
      'a successor that leans on what it replaces through others',
      'circle',
      'links',
      [{ kind: 'replace', value: 'old', by: 'end', delta: 0 }],
    ],
    ['a notice named like a value', 'duplicate-id', 'changes[0].id', [{ ...notice, id: 'old' }]],
    [
      'a negative uncertainty of a notice',
      'out-of-range',
      'changes[0].standardUncertainty',
      [{ ...notice, standardUncertainty: -1 }],
    ],
    [
      'a notice on an unknown value',
      'unknown-node',
      'changes[0].terms[0].value',
      [{ ...notice, terms: [{ value: 'x', shift: 0, sensitivity: 1 }] }],
    ],
    [
      'a notice without a finite shift',
      'not-finite',
      'changes[0].terms[0].shift',
      [{ ...notice, terms: [{ value: 'old', shift: NaN, sensitivity: 1 }] }],
    ],
    [
      'a notice applied at an unknown link',
      'unknown-node',
      'changes[0].alreadyApplied[0].child',
      [{ ...notice, alreadyApplied: [{ child: 'x', parent: 'old' }] }],
    ],
  ])('%s', (_, code, field, changes) => {
    const network = { ...register(), sources: [{ id: 's', standardUncertainty: 1 }] };
    expect(() => applyChanges(network, changes)).toThrow(expect.objectContaining({ code, field }));
  });
});
