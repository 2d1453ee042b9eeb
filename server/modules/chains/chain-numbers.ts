import { compileNetwork } from '#shared/engine/network/compile-network.ts';
import type { CompiledNetwork } from '#shared/engine/network/compiled-network.ts';
import { covariance } from '#shared/engine/network/covariance.ts';
import type { Network } from '#shared/engine/network/network.ts';
import { propagate, type Propagation } from '#shared/engine/network/propagate.ts';
import { variances } from '#shared/engine/network/variances.ts';
import { networkOf } from './chain-network.ts';
import type { Closure } from './chain-store.ts';
import type { StoredValue } from './stored.ts';

/** What the references of a value bring, g2. */
export interface Carried {
  /** With every covariance; null: not computable. */
  variance: number | null;
  /** Covariances between the references left out. */
  independentVariance: number | null;
  /** Ancestors whose certificates state no U. */
  missing: StoredValue[];
  /** Ancestors, by id, that two or more of its references share. */
  shared: Set<number>;
}

/** Every number a chain needs, from one compiled network. */
export interface ChainNumbers {
  propagation: Propagation;
  /** The same of another value of the closure. */
  propagationOf(uid: string): Propagation;
  /** Variance of a value as computed now, notices included, g2; null where something above it states no U. */
  variance(uid: string): number | null;
  /** The same without notices, as whoever certified it could compute it. */
  varianceAsCertified(uid: string): number | null;
  carried(value: StoredValue): Carried;
  /** Covariance of two values of the closure, g2; null where it hangs on an unknown part. */
  covariance(a: string, b: string): number | null;
}

/**
 * Works out the numbers of a chain.
 * @param closure the focus, the earlier values its rules compare with, and all they lean on
 * @param noticed the same with the notices in force (`withNotices`): what a certificate carries is judged without
 * them, since it is not re-issued; flows and u now are those with them
 */
export function chainNumbers(closure: Closure, focusUid: string, noticed: Closure = closure): ChainNumbers {
  const network = networkOf(closure);
  const exact = compileNetwork(network);
  const certified = variancesByUid(network, exact);
  const { compiledNow, varianceNow } = numbersNow(closure, noticed, exact, certified);
  const floor = withoutUnknowns(network);
  const varianceFloor = floor === network ? certified : variancesByUid(floor, compileNetwork(floor));
  const ancestors = ancestorSets(closure.values);
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const localVariance = localVariances(closure);
  const variance = (uid: string) => finite(certified.get(uid));
  return {
    propagation: propagate(compiledNow, focusUid),
    propagationOf: (uid) => propagate(compiledNow, uid),
    variance: (uid) => finite(varianceNow.get(uid)),
    varianceAsCertified: variance,
    covariance: (a, b) => knownCovariance(exact, a, b),
    carried: (asked) => {
      // As certified, also where the value is met with its notices.
      const value = byId.get(asked.id)!;
      const missing = [...ancestors.get(value.id)!]
        .map((id) => byId.get(id)!)
        .filter((above) => above.localU === null);
      const whole = varianceFloor.get(value.uid)! - localVariance.get(value.id)!;
      const isKnown = missing.length === 0;
      return {
        variance: isKnown ? Math.max(0, whole + usedDifferently(value, byId, variance)) : null,
        independentVariance: isKnown ? independentVariance(value, byId, closure, variance) : null,
        missing,
        shared: sharedAncestors(value, ancestors),
      };
    },
  };
}

/** A chain that no notice touches is compiled once. */
function numbersNow(
  closure: Closure,
  noticed: Closure,
  exact: CompiledNetwork,
  certified: Map<string, number>,
): { compiledNow: CompiledNetwork; varianceNow: Map<string, number> } {
  if (noticed === closure) return { compiledNow: exact, varianceNow: certified };
  const network = networkOf(noticed);
  const compiledNow = compileNetwork(network);
  return { compiledNow, varianceNow: variancesByUid(network, compiledNow) };
}

function finite(variance: number | undefined): number | null {
  return variance === undefined || !Number.isFinite(variance) ? null : variance;
}

function variancesByUid(network: Network, compiled: CompiledNetwork): Map<string, number> {
  const found = variances(compiled);
  return new Map(network.values.map((value, index) => [value.id, found[index]!]));
}

/** The same network with unknown local parts at zero: what is carried below them can still be read off. */
function withoutUnknowns(network: Network): Network {
  if (network.values.every((value) => value.local !== null)) return network;
  return { ...network, values: network.values.map((value) => ({ ...value, local: value.local ?? 0 })) };
}

function localVariances(closure: Closure): Map<number, number> {
  return new Map(
    closure.values.map((value) => {
      const grouped = value.groupId === null ? undefined : closure.groups.get(value.groupId)!;
      const own = grouped ? grouped.covariance.between(value.id, value.id) : (value.localU ?? 0) ** 2;
      return [value.id, own];
    }),
  );
}

/** A reference used with another U than its own brings that U: the difference in variance. */
function usedDifferently(
  value: StoredValue,
  byId: Map<number, StoredValue>,
  variance: (uid: string) => number | null,
): number {
  return value.parents.reduce((sum, link) => {
    if (link.usedAs === 'class limit' || link.usedExpandedU === null || link.usedK === null) return sum;
    const used = Number(link.usedExpandedU) / Number(link.usedK);
    const own = variance(byId.get(link.parentId)!.uid) ?? used ** 2;
    return sum + link.sensitivity ** 2 * (used ** 2 - own);
  }, 0);
}

function independentVariance(
  value: StoredValue,
  byId: Map<number, StoredValue>,
  closure: Closure,
  variance: (uid: string) => number | null,
): number {
  const references = value.parents.reduce(
    (sum, link) => sum + link.sensitivity ** 2 * (variance(byId.get(link.parentId)!.uid) ?? 0),
    0,
  );
  const sources = value.sources.reduce(
    (sum, link) => sum + (link.sensitivity * closure.sources.get(link.sourceId)!.u) ** 2,
    0,
  );
  return references + sources;
}

function ancestorSets(values: StoredValue[]): Map<number, Set<number>> {
  const sets = new Map<number, Set<number>>();
  for (const value of values) {
    const above = new Set<number>();
    for (const { parentId } of value.parents) {
      above.add(parentId);
      for (const id of sets.get(parentId)!) above.add(id);
    }
    sets.set(value.id, above);
  }
  return sets;
}

function sharedAncestors(value: StoredValue, ancestors: Map<number, Set<number>>): Set<number> {
  const seen = new Set<number>();
  const shared = new Set<number>();
  for (const { parentId, role } of value.parents) {
    if (role === 'informs') continue;
    for (const id of [parentId, ...ancestors.get(parentId)!]) {
      if (seen.has(id)) shared.add(id);
      seen.add(id);
    }
  }
  return shared;
}

function knownCovariance(network: CompiledNetwork, a: string, b: string): number | null {
  try {
    return covariance(network, a, b);
  } catch (error) {
    if ((error as { code?: string }).code === 'unknown-local') return null;
    throw error;
  }
}
