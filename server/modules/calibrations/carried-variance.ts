import { Decimal } from '#shared/decimal.ts';
import type { CalibrationLine } from '#shared/contracts/calibration-input.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { compileNetwork } from '#shared/engine/network/compile-network.ts';
import { covariance } from '#shared/engine/network/covariance.ts';
import type { Network } from '#shared/engine/network/network.ts';
import { sourceNode, valueNode } from './ancestor-network.queries.ts';
import type { IssueFacts, ReferenceFacts } from './issue-facts.ts';

/** One thing a result leaned on, for its variance. */
interface Term {
  /** Node of the network; null for what is independent of everything else (a class limit). */
  node: string | null;
  sensitivity: number;
  /** Standard uncertainty as used, g or the unit of the source; null where the certificate states none. */
  u: number | null;
}

/**
 * Whether the covariance between the things that some line leaned on is needed at all; a single reference needs
 * no ancestors.
 */
export function needsAncestors(lines: readonly CalibrationLine[], facts: IssueFacts): boolean {
  return lines.some((line) => termsOf(line, facts).filter((term) => term.node !== null).length > 1);
}

/**
 * Gives, line by line, the variance that the things it leaned on bring with them:
 * `var(sum c_p x_p + sum c_s s)`, each with its uncertainty **as used** and the covariances between them exact
 * through their ancestors. Null where one of them has no stated uncertainty, or an unknown one is shared.
 */
export function carriedVariances(
  lines: readonly CalibrationLine[],
  facts: IssueFacts,
  network: Network | null,
): (number | null)[] {
  const compiled = network && compileNetwork(network);
  const known = new Map<string, number | null>();
  const shared = (a: string, b: string): number | null => {
    if (!compiled) return 0;
    const key = a < b ? `${a} ${b}` : `${b} ${a}`;
    const before = known.get(key);
    if (before !== undefined) return before;
    const value = covarianceIfKnown(() => covariance(compiled, a, b));
    known.set(key, value);
    return value;
  };
  return lines.map((line) => varianceOf(termsOf(line, facts), shared));
}

function varianceOf(terms: readonly Term[], shared: (a: string, b: string) => number | null): number | null {
  let sum = 0;
  for (const [i, one] of terms.entries()) {
    if (one.u === null) return null;
    sum += (one.sensitivity * one.u) ** 2;
    for (const other of terms.slice(i + 1)) {
      if (one.node === null || other.node === null) continue;
      const both = shared(one.node, other.node);
      if (both === null) return null;
      sum += 2 * one.sensitivity * other.sensitivity * both;
    }
  }
  return Math.max(0, sum);
}

function covarianceIfKnown(compute: () => number): number | null {
  try {
    return compute();
  } catch (error) {
    if (error instanceof EngineError && error.code === 'unknown-local') return null;
    throw error;
  }
}

function termsOf(line: CalibrationLine, facts: IssueFacts): Term[] {
  const references = line.references.flatMap((used): Term[] => {
    const reference = facts.references.get(used.valueUid);
    if (!reference || used.role !== 'reference') return [];
    const { sensitivity } = used;
    if (used.usedAs === 'class limit') return [{ node: null, sensitivity, u: classLimitU(used, reference) }];
    return [{ node: valueNode(reference.id), sensitivity, u: uAsUsed(used, reference) }];
  });
  const sources = line.sources.flatMap(({ sourceUid, sensitivity }): Term[] => {
    const source = facts.sources.get(sourceUid);
    return source ? [{ node: sourceNode(source.id), sensitivity, u: source.u }] : [];
  });
  return [...references, ...sources];
}

type Used = CalibrationLine['references'][number];

function uAsUsed(used: Used, reference: ReferenceFacts): number | null {
  if (used.usedExpandedU === null) return reference.u;
  const k = used.usedK ?? reference.k;
  return k === null ? null : new Decimal(used.usedExpandedU).div(k).toNumber();
}

function classLimitU(used: Used, reference: ReferenceFacts): number | null {
  if (used.usedExpandedU !== null) return Number(used.usedExpandedU) / Number(used.usedK ?? Math.sqrt(3));
  const limit = classLimit(reference);
  return limit === null ? null : limit.div(new Decimal(3).sqrt()).toNumber();
}

/** Maximum permissible error of the reference's class at its nominal, in g; null where there is none. */
export function classLimit(reference: ReferenceFacts): Decimal | null {
  const limit = reference.class && maximumPermissibleError(reference.class, new Decimal(reference.nominal));
  return limit ? limit.div(1000) : null;
}
