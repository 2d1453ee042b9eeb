import { describe, expect, it } from 'vitest';
import { covarianceMatrix } from './covariance.ts';
import { randomNetwork } from './test-support/random-network.ts';
import { variances } from './variances.ts';

/** `randomNetwork(20261201, 30)` without its groups, evaluated by Debian's python3-uncertainties 3.1.6. */
const GOLDEN_VARIANCES = [
  0.07991927083559919, 0.29868280848267226, 1.1500456491395996, 0.5697380365624444, 4.675659943534554,
  19.601116594406136, 43.61902656101024, 0.7673286966916724, 1.2817900738631767, 1.5918388792534655,
  21.39253448230669, 0.6980432739391921, 0.6050757654575633, 3.2407083582867835, 1.5800514930618754,
  0.23076245819878957, 0.6483790526390921, 3.2498833332825647, 1.2852621954296877, 9.522770964023568,
  1.7327049111080266, 3.706404468893526, 0.9099514061702462, 12.422788702069981, 32.702376475712605,
  2.331594930788138, 1.1430174379720677, 0.23633470385053085, 1.4265841760007218, 6.199231646114938,
];

/** Covariance matrix of v29, v20 and v11 by the same. */
const GOLDEN_COVARIANCE = [
  [6.199231646114938, -0.8670092393018779, 0.3742910757467273],
  [-0.8670092393018779, 1.7327049111080266, 0.0],
  [0.3742910757467273, 0.0, 0.6980432739391922],
];

describe('an independent engine on the same network', () => {
  const network = { ...randomNetwork(20261201, 30), groups: [] };

  it('finds the same variance of every value', () => {
    variances(network).forEach((variance, i) => {
      expect(variance / GOLDEN_VARIANCES[i]!).toBeCloseTo(1, 10);
    });
  });

  it('finds the same covariances', () => {
    covarianceMatrix(network, ['v29', 'v20', 'v11']).forEach((row, i) => {
      row.forEach((value, j) => expect(value).toBeCloseTo(GOLDEN_COVARIANCE[i]![j]!, 9));
    });
  });
});
