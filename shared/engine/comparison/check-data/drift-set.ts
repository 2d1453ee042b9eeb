/** Two loops with drifting standards: synthetic, computed with mpmath at 50 digits, in mg and days. */
export const DRIFT_SET = {
  circulation: {
    pilot: 'P',
    pilotRepeatability: 0.012,
    pilotSystematic: 0.03,
    transport: 0.01,
    observations: [
      { participant: 'P', standard: 'A', time: 0, value: 0.152 },
      { participant: 'L1', standard: 'A', time: 30, value: 0.131, standardUncertainty: 0.04 },
      { participant: 'L2', standard: 'A', time: 75, value: 0.198, standardUncertainty: 0.06 },
      { participant: 'P', standard: 'A', time: 120, value: 0.1205 },
      { participant: 'L3', standard: 'A', time: 165, value: 0.062, standardUncertainty: 0.05 },
      { participant: 'L4', standard: 'A', time: 210, value: 0.119, standardUncertainty: 0.045 },
      { participant: 'P', standard: 'A', time: 250, value: 0.0745 },
      { participant: 'P', standard: 'B', time: 0, value: -0.331 },
      { participant: 'L5', standard: 'B', time: 40, value: -0.265, standardUncertainty: 0.055 },
      { participant: 'L6', standard: 'B', time: 85, value: -0.372, standardUncertainty: 0.035 },
      { participant: 'P', standard: 'B', time: 130, value: -0.3105 },
      { participant: 'L7', standard: 'B', time: 180, value: -0.348, standardUncertainty: 0.08 },
      { participant: 'P', standard: 'B', time: 230, value: -0.302 },
    ],
  },
  fits: [
    {
      intercept_at_day0: 0.15397494669509595,
      slope_per_day: -0.00031060767590618336,
      u_slope: 6.786415629786701e-5,
      slope_over_u: -4.576903226246192,
      chi2_of_fit: 0.15033648720682302,
      dof: 1,
    },
    {
      intercept_at_day0: -0.32981578947368423,
      slope_per_day: 0.0001276315789473684,
      u_slope: 7.357672073819589e-5,
      slope_over_u: 1.7346733812928825,
      chi2_of_fit: 0.07771381578947369,
      dof: 1,
    },
  ],
  participants: ['L1', 'L2', 'L3', 'L4', 'L5', 'L6', 'L7', 'P'],
  values: [
    -0.013656716417910449, 0.06732062899786781, -0.04072468017057569, 0.030252665245202558,
    0.05971052631578947, -0.053032894736842105, -0.04115789473684211, 0.0,
  ],
  covariance: [
    [
      0.0017881194029850747, 6.877611940298508e-5, 3.008955223880597e-5, 1.0746268656716418e-5, 0.0, 0.0, 0.0,
      0.0,
    ],
    [
      6.877611940298508e-5, 0.0037587590618336887, 3.872494669509595e-5, 2.8707889125799575e-5, 0.0, 0.0, 0.0,
      0.0,
    ],
    [
      3.008955223880597e-5, 3.872494669509595e-5, 0.002655995735607676, 6.463113006396589e-5, 0.0, 0.0, 0.0,
      0.0,
    ],
    [
      1.0746268656716418e-5, 2.8707889125799575e-5, 6.463113006396589e-5, 0.002207592750533049, 0.0, 0.0, 0.0,
      0.0,
    ],
    [0.0, 0.0, 0.0, 0.0, 0.0032076466165413533, 6.31578947368421e-5, 2.201503759398496e-5, 0.0],
    [0.0, 0.0, 0.0, 0.0, 6.31578947368421e-5, 0.0013796315789473684, 3.663157894736842e-5, 0.0],
    [0.0, 0.0, 0.0, 0.0, 2.201503759398496e-5, 3.663157894736842e-5, 0.006567488721804511, 0.0],
    [0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0, 0.0009],
  ],
  weights: [
    0.14069348246400748, 0.06478650309021487, 0.09260474766298446, 0.11355458125587854, 0.0771839856430705,
    0.18393395302040316, 0.038310265119652076, 0.28893248174378894,
  ],
  reference: -0.004618536272611676,
  u: 0.016125732032047726,
  chiSquared: 5.805670193309842,
  en: [
    -0.11560534862809715, 0.6081081381066098, -0.36881760927272667, 0.3950865231970811, 0.5924373209600768,
    -0.7234595026534503, -0.2300403563672992, 0.09128463601363296,
  ],
  ignoringSharedFit: { x_ref: -0.00441194020584636, u_x_ref: 0.015901600956594063 },
  uncorrected: [
    0.015333333333333332, 0.08233333333333333, -0.05366666666666667, 0.0033333333333333335, 0.0495, -0.0575,
    -0.0335,
  ],
};
