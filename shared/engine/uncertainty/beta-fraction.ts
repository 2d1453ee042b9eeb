/**
 * The continued fraction of the incomplete beta function, evaluated forwards by Lentz's method: B_x(a, b) is
 * x^a (1 - x)^b / a times it. Domain: a and b above 0, x from 0 to (a + 1)/(a + b + 2), where every denominator is
 * positive; beyond it the caller exchanges a and b and takes 1 - x.
 *
 * Source: Abramowitz and Stegun, 26.5.8, from memory.
 */
export function betaFraction(x: number, a: number, b: number): number {
  let c = 1;
  let d = 1 / (1 - ((a + b) * x) / (a + 1));
  let product = d;
  for (let m = 1; m <= 20_000; m += 1) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / (1 + even * d);
    c = 1 + even / c;
    product *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + odd * d);
    c = 1 + odd / c;
    product *= d * c;
    if (Math.abs(d * c - 1) < 1e-15) break;
  }
  return product;
}
