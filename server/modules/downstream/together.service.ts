import type { TogetherInput, TogetherResponse } from '#shared/contracts/together.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { today, type Context } from '#server/http/context.ts';
import {
  chainNumbers,
  closureOn,
  storeOf,
  type ChainSubject,
  type Closure,
  type StoredValue,
} from '#server/modules/chains/index.ts';
import { combinedU, type KnownPair } from './combined-u.ts';

/**
 * Several weights on the pans of one balance: what they share, how they are correlated, and the uncertainty of their
 * sum and difference. Where a covariance is undeclared the largest it can be stands beside.
 */
export async function togetherOf(
  context: Context,
  subjects: readonly ChainSubject[],
  input: TogetherInput,
): Promise<TogetherResponse> {
  const store = storeOf(context.database);
  await store.catchUp();
  const ids = subjects.map((subject) => subject.id);
  const closure = await closureOn(store, ids, today(context));
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const values = subjects.map((subject) => byId.get(subject.id)!);
  const numbers = chainNumbers(closure, values[0]!.uid);
  const us = values.map((value) => {
    const variance = numbers.variance(value.uid);
    return variance === null ? value.uStated : Math.sqrt(variance);
  });
  const pairs = pairsOf(values, us, numbers);
  const signs = input.signs ?? values.map(() => 1);
  const covariance = matrixOf(values.length, (i, j) =>
    i === j ? square(us[i]!) : pairOf(pairs, i, j).covariance,
  );
  return {
    valueUids: values.map((value) => value.uid),
    signs,
    weights: values.map(weightOf),
    standardUncertainties: us,
    covariance,
    correlation: matrixOf(values.length, (i, j) => {
      const shared = covariance[i]![j]!;
      const product = (us[i] ?? 0) * (us[j] ?? 0);
      return shared === null || product === 0 ? null : i === j ? 1 : shared / product;
    }),
    undeclared: pairs.flatMap(({ i, j, because }) =>
      because === null ? [] : [{ pair: [i, j] as [number, number], because }],
    ),
    ...addedUp(values, us, pairs, signs),
    shared: sharedOf(values, closure, byId),
  };
}

/** Mass and conventional mass differ by about 1 mg/kg for steel: they are never added. */
function addedUp(
  values: StoredValue[],
  us: (number | null)[],
  pairs: KnownPair[],
  signs: readonly number[],
): Pick<TogetherResponse, 'notAdded' | 'sum' | 'signed'> {
  if (new Set(values.map((value) => value.quantity)).size > 1) {
    const none = { u: null, bound: null, linear: null, total: null };
    const notAdded = 'Some state mass and some conventional mass: the two are not added.';
    return { notAdded, sum: none, signed: none };
  }
  const plus = values.map(() => 1);
  return {
    notAdded: null,
    sum: { ...combinedU(us, pairs, plus), total: totalOf(values, plus) },
    signed: { ...combinedU(us, pairs, signs), total: totalOf(values, signs) },
  };
}

function totalOf(values: StoredValue[], signs: readonly number[]): string {
  const total = values.reduce(
    (sum, { nominal, deviation }, at) => sum.plus(new Decimal(nominal).plus(deviation).times(signs[at]!)),
    new Decimal(0),
  );
  return decimalText(total);
}

function weightOf(value: StoredValue): TogetherResponse['weights'][number] {
  const { registryNo, marking, nominal, quantity, deviation, expandedU, k, certificateNo } = value;
  return {
    registryNo,
    marking,
    nominal: decimalText(nominal),
    class: value.class as TogetherResponse['weights'][number]['class'],
    quantity,
    deviation: decimalText(deviation),
    expandedU: expandedU === null ? null : decimalText(expandedU),
    k: k === null ? null : decimalText(k),
    certificateNo,
  };
}

function pairsOf(
  values: StoredValue[],
  us: (number | null)[],
  numbers: ReturnType<typeof chainNumbers>,
): KnownPair[] {
  return values.flatMap((one, i) =>
    values.slice(i + 1).map((other, at): KnownPair => {
      const j = i + 1 + at;
      const known = numbers.covariance(one.uid, other.uid);
      if (known === null) {
        const because = 'Both lean on a value whose certificate states no uncertainty.';
        return { i, j, covariance: null, known: 0, unknown: (us[i] ?? 0) * (us[j] ?? 0), because };
      }
      if (isCovarianceStated(one, other))
        return { i, j, covariance: known, known, unknown: 0, because: null };
      const because = `Both come from certificate ${one.certificateNo}, which states no covariance of its results.`;
      return { i, j, covariance: null, known, unknown: (one.localU ?? 0) * (other.localU ?? 0), because };
    }),
  );
}

/** Local parts of one calibration may be correlated; whether they are is known only where it gave their covariance. */
function isCovarianceStated(one: StoredValue, other: StoredValue): boolean {
  if (one.revisionId !== other.revisionId) return true;
  return one.groupId !== null && one.groupId === other.groupId;
}

function pairOf(pairs: KnownPair[], i: number, j: number): KnownPair {
  return pairs.find((pair) => pair.i === Math.min(i, j) && pair.j === Math.max(i, j))!;
}

/** Values and sources that two or more of them lean on, a value that another leans on included. */
function sharedOf(
  values: StoredValue[],
  closure: Closure,
  byId: Map<number, StoredValue>,
): TogetherResponse['shared'] {
  const places = new Map<string, number[]>();
  const note = (uid: string, place: number) => {
    const known = places.get(uid);
    if (known) known.push(place);
    else places.set(uid, [place]);
  };
  values.forEach((value, place) => {
    const above = new Set([value]);
    const sources = new Set<number>();
    // The set grows while it is walked: each new reference is visited in its turn.
    for (const each of above) {
      for (const link of each.parents) if (link.role === 'reference') above.add(byId.get(link.parentId)!);
      for (const { sourceId } of each.sources) sources.add(sourceId);
    }
    for (const each of above) note(each.uid, place);
    for (const id of sources) note(closure.sources.get(id)!.uid, place);
  });
  const labels = [
    ...closure.values.map(({ uid, registryNo }) => ({ uid, type: 'value' as const, label: registryNo })),
    ...[...closure.sources.values()].map(({ uid, name }) => ({ uid, type: 'source' as const, label: name })),
  ];
  return labels.flatMap((row) => {
    const found = places.get(row.uid) ?? [];
    return found.length > 1 ? [{ ...row, places: found }] : [];
  });
}

function matrixOf(size: number, entry: (i: number, j: number) => number | null): (number | null)[][] {
  return Array.from({ length: size }, (_, i) => Array.from({ length: size }, (__, j) => entry(i, j)));
}

function square(u: number | null): number | null {
  return u === null ? null : u * u;
}
