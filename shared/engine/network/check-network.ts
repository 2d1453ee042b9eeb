import { EngineError } from '../errors.ts';
import { requireDegreesOfFreedom, requireNumber } from '../quantity/domain.ts';
import type { Network } from './network.ts';

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
    if (value.local !== null) requireNumber(value.local, `values[${at}].local`, { min: 0 });
    requireDegreesOfFreedom(value.degreesOfFreedom ?? Infinity, `values[${at}].degreesOfFreedom`);
  });
  network.sources?.forEach((source, at) => {
    addId(source.id, `sources[${at}].id`, sources, values);
    requireNumber(source.standardUncertainty, `sources[${at}].standardUncertainty`, { min: 0 });
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
      `"${id}"`,
      'The id is given twice; values and sources share one list of ids.',
    );
  }
  if (id.startsWith('group:')) {
    throw new EngineError(
      'reserved-id',
      field,
      `"${id}"`,
      'Ids that begin with "group:" name groups; choose another id.',
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
        `"${link.child}"`,
        'This is a source; a source leans on nothing.',
      );
    }
    if (!values.has(link.child)) throw unknownNode(link.child, `${field}.child`);
    if (!values.has(link.parent) && !sources.has(link.parent))
      throw unknownNode(link.parent, `${field}.parent`);
    requireNumber(link.sensitivity, `${field}.sensitivity`);
    if (link.classLimit)
      requireNumber(link.classLimit.standardUncertainty, `${field}.classLimit.standardUncertainty`, {
        min: 0,
      });
  });
}

/** The error for an id that no value or source of the network bears. */
export function unknownNode(id: string, field: string): EngineError {
  return new EngineError(
    'unknown-node',
    field,
    `"${id}"`,
    'The id of a value or a source of this network is expected.',
  );
}
