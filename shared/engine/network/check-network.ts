import { EngineError } from '../errors.ts';
import type { Network } from './network.ts';

/** Refuses what is not a finite number of at least zero. @throws EngineError `out-of-range` */
export function requireNonNegative(value: number, field: string): void {
  if (Number.isFinite(value) && value >= 0) return;
  throw new EngineError(
    'out-of-range',
    field,
    `${field} is ${value}; a finite number of at least 0 is expected.`,
  );
}

/** Refuses degrees of freedom that are not positive; infinity is allowed. @throws EngineError `out-of-range` */
export function requireDegreesOfFreedom(value: number, field: string): void {
  if (value > 0) return;
  throw new EngineError('out-of-range', field, `${field} is ${value}; degrees of freedom must be above 0.`);
}

/**
 * Refuses a network whose names clash, whose links lead nowhere or whose numbers cannot be uncertainties.
 * @throws EngineError `duplicate-id`, `reserved-id`, `unknown-node`, `source-as-child`, `out-of-range`,
 * `not-finite`
 */
export function checkNetwork(network: Network): void {
  const values = new Set<string>();
  const sources = new Set<string>();
  network.values.forEach((value, at) => {
    addId(value.id, `values[${at}].id`, values, sources);
    if (value.local !== null) requireNonNegative(value.local, `values[${at}].local`);
    requireDegreesOfFreedom(value.degreesOfFreedom ?? Infinity, `values[${at}].degreesOfFreedom`);
  });
  network.sources?.forEach((source, at) => {
    addId(source.id, `sources[${at}].id`, sources, values);
    requireNonNegative(source.standardUncertainty, `sources[${at}].standardUncertainty`);
    requireDegreesOfFreedom(source.degreesOfFreedom ?? Infinity, `sources[${at}].degreesOfFreedom`);
  });
  network.groups?.forEach((group, index) => {
    group.members.forEach((member, at) => {
      if (!values.has(member)) throw unknownNode(member, `groups[${index}].members[${at}]`);
    });
  });
  checkLinks(network.links, values, sources);
}

function addId(id: string, field: string, own: Set<string>, other: Set<string>): void {
  if (own.has(id) || other.has(id)) {
    throw new EngineError(
      'duplicate-id',
      field,
      `The id "${id}" is given twice; values and sources share one list of ids.`,
    );
  }
  if (id.startsWith('group:')) {
    throw new EngineError(
      'reserved-id',
      field,
      `The id "${id}" begins with "group:", which names groups; choose another id.`,
    );
  }
  own.add(id);
}

function checkLinks(links: Network['links'], values: Set<string>, sources: Set<string>): void {
  links.forEach((link, at) => {
    const field = `links[${at}]`;
    if (sources.has(link.child)) {
      throw new EngineError(
        'source-as-child',
        `${field}.child`,
        `"${link.child}" is a source; a source leans on nothing.`,
      );
    }
    if (!values.has(link.child)) throw unknownNode(link.child, `${field}.child`);
    if (!values.has(link.parent) && !sources.has(link.parent))
      throw unknownNode(link.parent, `${field}.parent`);
    if (!Number.isFinite(link.sensitivity)) {
      throw new EngineError(
        'not-finite',
        `${field}.sensitivity`,
        `The sensitivity is ${link.sensitivity}; a finite number is expected.`,
      );
    }
    if (link.classLimit)
      requireNonNegative(link.classLimit.standardUncertainty, `${field}.classLimit.standardUncertainty`);
  });
}

/** The error for an id that no value or source of the network bears. */
export function unknownNode(id: string, field: string): EngineError {
  return new EngineError('unknown-node', field, `"${id}" is neither a value nor a source of this network.`);
}
