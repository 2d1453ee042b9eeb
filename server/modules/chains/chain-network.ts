import type { Network, NetworkGroup, NetworkLink, NetworkValue } from '#shared/engine/network/network.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { Decimal } from '#shared/decimal.ts';
import type { Closure } from './chain-store.ts';
import type { StoredGroup, StoredLink, StoredValue } from './stored.ts';

const MILLIGRAMS_PER_GRAM = 1000;

/** Node names in the engine's network: uids, since values and sources share one name space. */
export function networkOf(closure: Closure): Network {
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  return {
    values: closure.values.map(networkValue),
    sources: [...closure.sources.values()].map((source) => ({
      id: source.uid,
      standardUncertainty: source.u,
      ...estimateOf(source.degreesOfFreedom, source.estimate),
    })),
    groups: [...closure.groups.values()].map((group) => networkGroup(group, closure.values)),
    links: closure.values.flatMap((value) => linksOf(value, byId, closure)),
  };
}

/** The groups' keys of a propagation, back to the members they stand for. */
export function groupMembers(closure: Closure): string[][] {
  return [...closure.groups.values()].map((group) =>
    closure.values.filter((value) => value.groupId === group.id).map((value) => value.uid),
  );
}

function networkValue(value: StoredValue): NetworkValue {
  return {
    id: value.uid,
    local: value.localU,
    ...estimateOf(value.localDegreesOfFreedom, value.localEstimate),
  };
}

function networkGroup(group: StoredGroup, values: StoredValue[]): NetworkGroup {
  const members = values.filter((value) => value.groupId === group.id);
  return {
    members: members.map((value) => value.uid),
    covariance: groupCovariance(group, members),
    ...estimateOf(group.degreesOfFreedom, group.estimate),
  };
}

/** Members outside the closure have no influence on the focus: their rows are left out. */
function groupCovariance(group: StoredGroup, members: StoredValue[]): number[][] {
  return members.map((row) => members.map((column) => group.covariance.between(row.id, column.id)));
}

function linksOf(value: StoredValue, byId: Map<number, StoredValue>, closure: Closure): NetworkLink[] {
  const references = value.parents
    .filter((link) => link.role === 'reference')
    .map((link) => {
      const parent = byId.get(link.parentId)!;
      const base = { child: value.uid, parent: parent.uid, sensitivity: link.sensitivity };
      return link.usedAs === 'class limit'
        ? { ...base, classLimit: { standardUncertainty: classLimitU(parent, link) } }
        : base;
    });
  const sources = value.sources.map((link) => ({
    child: value.uid,
    parent: closure.sources.get(link.sourceId)!.uid,
    sensitivity: link.sensitivity,
  }));
  return [...references, ...sources];
}

/**
 * The u (g) with which a class limit was used: as fixed on the link at issue, else nominal +/- MPE taken as
 * rectangular, u = MPE / sqrt 3.
 */
function classLimitU(parent: StoredValue, link: StoredLink): number {
  if (link.usedExpandedU !== null) return Number(link.usedExpandedU) / Number(link.usedK ?? Math.sqrt(3));
  const limit = parent.class
    ? maximumPermissibleError(
        parent.class as Parameters<typeof maximumPermissibleError>[0],
        new Decimal(parent.nominal),
      )
    : null;
  if (!limit)
    throw new Error(
      `${parent.registryNo} was used by its class limit, but neither link nor value says which`,
    );
  return limit.div(MILLIGRAMS_PER_GRAM).toNumber() / Math.sqrt(3);
}

function estimateOf(
  degreesOfFreedom: number | null,
  estimate: string | null,
): { degreesOfFreedom?: number; estimate?: string } {
  return {
    ...(degreesOfFreedom === null ? {} : { degreesOfFreedom }),
    ...(estimate === null ? {} : { estimate }),
  };
}
