import { EngineError } from '../errors.ts';
import { inverseSymmetric, multiply, transpose } from '../linear/matrix.ts';
import { requireNumber } from '../quantity/domain.ts';
import { type DriftFit, driftFit } from './drift-fit.ts';
import { type DriftModel, visitWeights, wanderCovariance } from './drift-models.ts';

/** One measurement of one travelling standard. Visits of the pilot carry no uncertainty of their own. */
export type Observation = {
  participant: string;
  standard: string;
  time: number;
  value: number;
  standardUncertainty?: number;
  /** The part of it common to all observations of this participant; needed where there is more than one. */
  commonUncertainty?: number;
};

/** All measurements of the travelling standards of one comparison. */
export type Circulation = {
  observations: Observation[];
  pilot: string;
  /** The pilot's standard uncertainty between visits, which alone fixes the drift. */
  pilotRepeatability: number;
  /** The pilot's standard uncertainty common to all visits. */
  pilotSystematic: number;
  /** Added to each participant's observation for what happens on the way; left out = 0. */
  transport?: number;
  /** `line` by custom. */
  drift?: DriftModel;
  /** With `bracketing`: standard deviation of a random walk per square root of the time unit; left out = 0. */
  randomWalk?: number;
};

/** Results referred to the pilot's scale, ready for `referenceValue`: the pilot stands last, with value 0. */
export type CommonDateResults = {
  participants: string[];
  values: number[];
  covariance: number[][];
  fits: DriftFit[];
};

/**
 * Refers results on drifting travelling standards to one another: each result less the pilot's value of that standard
 * on that day, with the covariance that shared visits leave between results. Loops, petals and several standards are
 * evaluated together; a participant with several observations gets their generalised least squares mean. The pilot
 * enters once, with its systematic part. (Line model: Sutton and Clarkson 1993 Metrologia 30 487; star circulation
 * and random walk: Elster, Woeger and Cox 2005 Meas. Tech. 48 883.)
 * @throws EngineError `no-visit`, `one-date`, `not-bracketed`, `missing-uncertainties`,
 * `missing-common-uncertainty`, `not-finite`, `out-of-range`
 */
export function referToCommonDate(circulation: Circulation): CommonDateResults {
  checkCirculation(circulation);
  const { observations, pilot, pilotRepeatability, pilotSystematic } = circulation;
  const terms = observations.flatMap((observation, at) => {
    return observation.participant === pilot
      ? []
      : [referred(circulation, observation, `observations[${at}]`)];
  });
  const participants = [...new Set(terms.map((term) => term.observation.participant))];
  const means = participantMeans(participants, terms, referredCovariance(circulation, terms));
  const covariance = means.covariance.map((row) => [...row, 0]);
  const standards = [...new Set(observations.map(({ standard }) => standard))];
  return {
    participants: [...participants, pilot],
    values: [...means.values, 0],
    covariance: [...covariance, [...participants.map(() => 0), pilotSystematic ** 2]],
    fits: standards.flatMap(
      (standard) => driftFit(standard, visitsOf(circulation, standard), pilotRepeatability) ?? [],
    ),
  };
}

type Referred = {
  observation: Observation;
  field: string;
  value: number;
  weights: number[];
  visits: number[];
};

function visitsOf({ observations, pilot }: Circulation, standard: string): Observation[] {
  return observations.filter((each) => each.participant === pilot && each.standard === standard);
}

function referred(circulation: Circulation, observation: Observation, field: string): Referred {
  const visits = visitsOf(circulation, observation.standard);
  if (visits.length === 0) {
    throw new EngineError(
      'no-visit',
      `${field}.standard`,
      `"${observation.standard}"`,
      'The pilot never measured this standard; add its visits.',
    );
  }
  const times = visits.map(({ time }) => time);
  const weights = visitWeights(circulation.drift ?? 'line', times, observation.time, `${field}.time`);
  const reference = visits.reduce((sum, { value }, v) => sum + weights[v]! * (value - visits[0]!.value), 0);
  return {
    observation,
    field,
    value: observation.value - visits[0]!.value - reference,
    weights,
    visits: times,
  };
}

function referredCovariance(circulation: Circulation, terms: readonly Referred[]): number[][] {
  const { pilotRepeatability, transport = 0, drift, randomWalk = 0 } = circulation;
  return terms.map((a, i) =>
    terms.map((b, j) => {
      const [one, other] = [a.observation, b.observation];
      let sum = 0;
      if (i === j) sum += one.standardUncertainty! ** 2 + transport ** 2;
      else if (one.participant === other.participant)
        sum += one.commonUncertainty! * other.commonUncertainty!;
      if (one.standard !== other.standard) return sum;
      sum +=
        pilotRepeatability ** 2 * a.weights.reduce((total, weight, v) => total + weight * b.weights[v]!, 0);
      if (drift !== 'bracketing' || randomWalk === 0) return sum;
      return sum + wanderCovariance(a.visits, one.time, other.time, randomWalk, `${a.field}.time`);
    }),
  );
}

/** `(A' W A)^-1 A' W y`, A saying which observation belongs to which participant. */
function participantMeans(participants: string[], terms: readonly Referred[], covariance: number[][]) {
  const values = terms.map(({ value }) => value);
  if (participants.length === terms.length) return { values, covariance };
  const belongs = terms.map(({ observation }) =>
    participants.map((name) => Number(name === observation.participant)),
  );
  const pulled = multiply(transpose(belongs), inverseSymmetric(covariance, 'observations'));
  const ofMeans = inverseSymmetric(multiply(pulled, belongs), 'observations');
  const column = multiply(
    multiply(ofMeans, pulled),
    values.map((value) => [value]),
  );
  return { values: column.map((row) => row[0]!), covariance: ofMeans };
}

function checkCirculation(circulation: Circulation): void {
  requireNumber(circulation.pilotRepeatability, 'pilotRepeatability', { above: 0 });
  requireNumber(circulation.pilotSystematic, 'pilotSystematic', { above: 0 });
  requireNumber(circulation.transport ?? 0, 'transport', { min: 0 });
  requireNumber(circulation.randomWalk ?? 0, 'randomWalk', { min: 0 });
  const counts = new Map<string, number>();
  for (const { participant } of circulation.observations)
    counts.set(participant, (counts.get(participant) ?? 0) + 1);
  circulation.observations.forEach((observation, at) => {
    const field = `observations[${at}]`;
    requireNumber(observation.time, `${field}.time`);
    requireNumber(observation.value, `${field}.value`);
    if (observation.participant !== circulation.pilot) {
      checkUncertainties(observation, counts.get(observation.participant)! > 1, field);
    }
  });
}

function checkUncertainties(
  { standardUncertainty, commonUncertainty }: Observation,
  isRepeated: boolean,
  field: string,
): void {
  if (standardUncertainty === undefined) {
    throw new EngineError(
      'missing-uncertainties',
      `${field}.standardUncertainty`,
      'nothing',
      'A participant states the standard uncertainty of each result.',
    );
  }
  requireNumber(standardUncertainty, `${field}.standardUncertainty`, { above: 0 });
  if (!isRepeated) return;
  if (commonUncertainty === undefined) {
    throw new EngineError(
      'missing-common-uncertainty',
      `${field}.commonUncertainty`,
      'nothing',
      'A participant with several results states which part of the uncertainty they share; 0 if none.',
    );
  }
  requireNumber(commonUncertainty, `${field}.commonUncertainty`, { min: 0, max: standardUncertainty });
}
