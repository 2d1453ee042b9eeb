import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EngineError } from '../errors.ts';
import { build } from './entries.ts';
import {
  cholesky,
  inverseSymmetric,
  isPositiveSemidefinite,
  multiply,
  multiplyVector,
  quadraticForm,
  solveSymmetric,
  transpose,
} from './matrix.ts';
import { requireNumbers, requireSymmetric } from './requirements.ts';
import { symmetricEigen } from './symmetric-eigen.ts';

/** Entries down to a thousandth: squares of denormal doubles have no digits left to test. */
const element = fc.integer({ min: -3000, max: 3000 }).map((n) => n / 1000);

/** A random square matrix of doubles of moderate size. */
const square = fc.integer({ min: 1, max: 6 }).chain((n) =>
  fc.array(fc.array(element, { minLength: n, maxLength: n }), {
    minLength: n,
    maxLength: n,
  }),
);
const gram = (a: number[][]) => multiply(a, transpose(a));
const definite = square.map((a) => gram(a).map((row, i) => row.map((value, j) => value + (i === j ? 1 : 0))));

function codeOf(run: () => unknown): string {
  try {
    run();
  } catch (error) {
    if (error instanceof EngineError) return `${error.code} ${error.field}`;
    throw error;
  }
  return 'nothing thrown';
}

function expectClose(found: number[][], wanted: number[][], digits = 9): void {
  expect(found.length).toBe(wanted.length);
  found.forEach((row, i) =>
    row.forEach((value, j) => expect(value).toBeCloseTo(wanted[i]?.[j] ?? Number.NaN, digits)),
  );
}

describe('products', () => {
  it('multiplies and transposes by hand-worked example', () => {
    expect(multiply([[1, 2], [3, 4]], [[5, 6], [7, 8]])).toEqual([[19, 22], [43, 50]]); // prettier-ignore
    expect(transpose([[1, 2, 3], [4, 5, 6]])).toEqual([[1, 4], [2, 5], [3, 6]]); // prettier-ignore
    expect(multiplyVector([[1, 2], [3, 4]], [1, -1])).toEqual([-1, -1]); // prettier-ignore
    expect(quadraticForm([[4, 1], [1, 9]], [1, -1])).toBe(11); // prettier-ignore
  });

  it('refuses sizes that do not fit', () => {
    expect(codeOf(() => multiply([[1, 2]], [[1, 2]]))).toBe('size-mismatch right');
    expect(codeOf(() => multiply([], [[1]]))).toBe('size-mismatch right');
    expect(transpose([])).toEqual([]);
  });
});

describe('cholesky', () => {
  it('reproduces a factor worked by hand', () => {
    expectClose(cholesky([[4, 2], [2, 10]]), [[2, 0], [1, 3]], 15); // prettier-ignore
  });

  it('factors every positive definite matrix', () => {
    fc.assert(
      fc.property(definite, (matrix) => {
        const lower = cholesky(matrix);
        expectClose(gram(lower), matrix);
      }),
    );
  });

  it('keeps its digits over twenty decades of variance and names the failing row', () => {
    const lower = cholesky([[1e-20, 5e-11], [5e-11, 1]]); // prettier-ignore
    expect(lower[1]?.[1]).toBeCloseTo(Math.sqrt(0.75), 12);
    expect(codeOf(() => cholesky([[1, 1], [1, 1]], 'cov'))).toBe('not-positive-definite cov[1]'); // prettier-ignore
    expect(codeOf(() => cholesky([[0]]))).toBe('not-positive-definite matrix[0]');
  });
});

describe('solving', () => {
  it('inverts definite matrices', () => {
    fc.assert(
      fc.property(definite, (matrix) => {
        const identity = build(matrix.length, matrix.length, (i, j) => (i === j ? 1 : 0));
        expectClose(multiply(matrix, inverseSymmetric(matrix)), identity, 7);
      }),
    );
  });

  it('solves an indefinite bordered system', () => {
    const bordered = [[1, 0, 1], [0, 1, 1], [1, 1, 0]]; // prettier-ignore
    const x = solveSymmetric(bordered, [1, 3, 2]);
    expect(multiplyVector(bordered, x)).toEqual([
      expect.closeTo(1, 12),
      expect.closeTo(3, 12),
      expect.closeTo(2, 12),
    ]);
  });

  it('needs a row exchange where the diagonal is zero', () => {
    expect(solveSymmetric([[0, 2], [2, 0]], [4, 6])).toEqual([3, 2]); // prettier-ignore
  });

  it('agrees with itself when the units change', () => {
    fc.assert(
      fc.property(definite, fc.double({ min: 1e-12, max: 1e12, noNaN: true }), (matrix, unit) => {
        const scaled = matrix.map((row) => row.map((value) => value * unit));
        const expected = inverseSymmetric(matrix);
        expectClose(
          inverseSymmetric(scaled).map((row) => row.map((value) => value * unit)),
          expected,
          8,
        );
      }),
    );
  });

  it('refuses singular, asymmetric, ragged, empty and non-finite input by code and field', () => {
    expect(codeOf(() => inverseSymmetric([[1, 2], [2, 4]]))).toBe('singular matrix[1]'); // prettier-ignore
    expect(codeOf(() => inverseSymmetric([[0, 0], [0, 1]]))).toBe('singular matrix[0]'); // prettier-ignore
    expect(codeOf(() => solveSymmetric([[1]], [1, 2]))).toBe('size-mismatch right');
    expect(codeOf(() => solveSymmetric([[1, 2], [3, 4]], [1, 2]))).toBe('not-symmetric matrix[0][1]'); // prettier-ignore
    expect(codeOf(() => inverseSymmetric([[1, 2]]))).toBe('not-square matrix');
    expect(codeOf(() => cholesky([]))).toBe('not-rectangular matrix');
    expect(codeOf(() => cholesky([[1, 2], [3]]))).toBe('not-rectangular matrix[1]');
    expect(codeOf(() => cholesky([[Number.NaN]]))).toBe('not-finite matrix[0][0]');
    expect(() => requireSymmetric([[2, 1], [1, 2]])).not.toThrow(); // prettier-ignore
  });
});

describe('isPositiveSemidefinite', () => {
  it('accepts every Gram matrix, singular ones included', () => {
    fc.assert(
      fc.property(square, (a) => {
        expect(isPositiveSemidefinite(gram(a)).ok).toBe(true);
        expect(isPositiveSemidefinite(multiply(transpose([a[0] ?? []]), [a[0] ?? []])).ok).toBe(true);
      }),
    );
    expect(isPositiveSemidefinite([[0, 0], [0, 0]])).toEqual({ ok: true }); // prettier-ignore
  });

  it('names the pair to look at', () => {
    expect(isPositiveSemidefinite([[1, 0], [0, -1]])).toEqual({ ok: false, offending: [1, 1] }); // prettier-ignore
    expect(isPositiveSemidefinite([[-1, 0], [0, 1]])).toEqual({ ok: false, offending: [0, 0] }); // prettier-ignore
    expect(isPositiveSemidefinite([[1, 3], [3, 4]])).toEqual({ ok: false, offending: [0, 1] }); // prettier-ignore
    expect(isPositiveSemidefinite([[1, 0.1], [0.2, 1]])).toEqual({ ok: false, offending: [0, 1] }); // prettier-ignore
    expect(isPositiveSemidefinite([[0, 1], [1, 1]])).toEqual({ ok: false, offending: [0, 1] }); // prettier-ignore
    // Correlations of 0.9 and 0.9 cannot go with -0.9: every pair is possible alone, the three together are not.
    const three = isPositiveSemidefinite([[1, 0.9, 0.9], [0.9, 1, -0.9], [0.9, -0.9, 1]]); // prettier-ignore
    expect(three.ok).toBe(false);
    expect(codeOf(() => isPositiveSemidefinite([[1, 2]]))).toBe('not-square matrix');
  });

  it('finds the one contradicting pair among many consistent ones', () => {
    const matrix = build(6, 6, (i, j) => (i === j ? 4 : 2.4));
    (matrix[1] ?? [])[4] = -3.9;
    (matrix[4] ?? [])[1] = -3.9;
    expect(isPositiveSemidefinite(matrix)).toEqual({ ok: false, offending: [1, 4] });
  });
});

describe('symmetricEigen', () => {
  it('gives rising values and rebuilds the matrix', () => {
    fc.assert(
      fc.property(square, (a) => {
        const matrix = gram(a);
        const { values, vectors } = symmetricEigen(matrix);
        expect([...values].sort((x, y) => x - y)).toEqual(values);
        const rebuilt = multiply(
          transpose(vectors),
          vectors.map((vector, i) => vector.map((value) => value * (values[i] ?? 0))),
        );
        expectClose(rebuilt, matrix, 8);
      }),
    );
    expect(symmetricEigen([[2, 1], [1, 2]]).values).toEqual([expect.closeTo(1, 14), expect.closeTo(3, 14)]); // prettier-ignore
  });
});

describe('lists of numbers', () => {
  it('are refused when short or not finite', () => {
    expect(codeOf(() => requireNumbers([1], 'readings', 2))).toBe('too-few-values readings');
    expect(codeOf(() => requireNumbers([], 'readings'))).toBe('too-few-values readings');
    expect(codeOf(() => requireNumbers([1, Number.NaN], 'readings'))).toBe('not-finite readings[1]');
  });
});

describe('requireSymmetric', () => {
  it('takes what differs by the rounding of its diagonal, and no more', () => {
    const almost = (difference: number) => () => requireSymmetric([[4, difference], [0, 9]]); // prettier-ignore
    expect(almost(5e-9)).not.toThrow();
    expect(almost(7e-9)).toThrow(expect.objectContaining({ code: 'not-symmetric', field: 'matrix[0][1]' }));
  });
});
