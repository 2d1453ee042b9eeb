import { describe, expect, it } from 'vitest';
import { entry, item } from '../linear/entries.ts';
import { diagonalCovariance, fitLine, fitLinear } from './fit-line.ts';

// GUM-H3: JCGM 100:2008, H.3, Table H.6: corrections of a thermometer at eleven temperatures.
const t = [21.521, 22.012, 22.512, 23.003, 23.507, 23.999, 24.513, 25.002, 25.503, 26.01, 26.511];
const b = [-0.171, -0.169, -0.166, -0.159, -0.164, -0.165, -0.156, -0.157, -0.159, -0.161, -0.16];

describe('GUM-H3: straight line with covariance', () => {
  const unit = fitLine(t.map((value) => value - 20), b, diagonalCovariance(b.map(() => 1))); // prettier-ignore
  const s = Math.sqrt(unit.chiSquared / unit.degreesOfFreedom);

  it('gives intercept, slope and the standard deviation of the residuals as printed', () => {
    expect(unit.degreesOfFreedom).toBe(9);
    expect(item(unit.parameters, 0)).toBeCloseTo(-0.1712, 4);
    expect(item(unit.parameters, 1)).toBeCloseTo(0.00218, 5);
    expect(s).toBeCloseTo(0.0035, 4);
  });

  it('gives their uncertainties and correlation as printed', () => {
    const [variance, slopeVariance] = [entry(unit.covariance, 0, 0), entry(unit.covariance, 1, 1)];
    expect(s * Math.sqrt(variance)).toBeCloseTo(0.0029, 4);
    expect(s * Math.sqrt(slopeVariance)).toBeCloseTo(0.00067, 5);
    expect(entry(unit.covariance, 0, 1) / Math.sqrt(variance * slopeVariance)).toBeCloseTo(-0.93, 3);
  });

  it('gives the predicted correction at 30 degC as printed', () => {
    const at30 = fitLine(t.map((value) => value - 30), b, diagonalCovariance(b.map(() => s))); // prettier-ignore
    expect(item(at30.parameters, 0)).toBeCloseTo(-0.1494, 4);
    expect(Math.abs(Math.sqrt(entry(at30.covariance, 0, 0)) - 0.0041)).toBeLessThan(6e-5);
    // With the stated s as the uncertainty of every value the scatter explains itself exactly.
    expect(at30.chiSquared).toBeCloseTo(9, 9);
  });
});

describe('fitLinear', () => {
  it('refuses bases, covariances and abscissae that do not fit', () => {
    const one = [[1]];
    expect(() => fitLinear([[1], [1]], [1], one)).toThrow(expect.objectContaining({ code: 'size-mismatch', field: 'basis' })); // prettier-ignore
    expect(() => fitLinear([[1], [1]], [1, 2], one)).toThrow(
      expect.objectContaining({ code: 'size-mismatch' }),
    );
    expect(() => fitLinear([[1, 1], [2, 2]], [1, 2], [[1, 0], [0, 1]])).toThrow(expect.objectContaining({ code: 'singular' })); // prettier-ignore
    expect(() => fitLinear(one, [1], [[0]])).toThrow(
      expect.objectContaining({ code: 'not-positive-definite' }),
    );
    expect(() => fitLine([1], [1], one)).toThrow(
      expect.objectContaining({ code: 'too-few-values', field: 'x' }),
    );
    expect(() => fitLine([3, 3], [1, 2], [[1, 0], [0, 1]])).toThrow(expect.objectContaining({ code: 'one-abscissa' })); // prettier-ignore
  });
});
