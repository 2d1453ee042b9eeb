import { compiled } from './compile-network.ts';
import type { CompiledNetwork } from './compiled-network.ts';
import { chainDegreesOfFreedom, type VarianceTerm } from './degrees-of-freedom.ts';
import { groupKey, type Network } from './network.ts';
import { groupPull, requireNode, type Walk, walkUp } from './walk.ts';

/** What one value rests on. All variances are in the square of the network's unit. */
export type Propagation = {
  /** Combined standard uncertainty of the focus; null where a local part it depends on is not known. */
  standardUncertainty: number | null;
  /** Values whose unknown local part the focus depends on. */
  missing: string[];
  /** Welch-Satterthwaite over distinct estimates, truncated; infinite if none is finite. Known parts only. */
  degreesOfFreedom: number;
  /** Change of the focus per change of the ancestor; 0 behind a class limit. */
  sensitivities: Record<string, number>;
  /**
   * Variance by origin: a value's local part or a class limit it stood for (its id), a source (its id) or a group
   * (`group:` and its index). Sums to the variance; an unknown part has no entry.
   */
  contributions: Record<string, number>;
  /** Covariance of the focus with each ancestor, with what is known. */
  covarianceWithFocus: Record<string, number>;
  /** Variance carried by each link; may be negative or exceed the total where correlations cancel. */
  flows: { child: string; parent: string; variance: number }[];
  /** Variance that enters at a node itself: inflows plus this equal outflows; at the focus they sum to u2. */
  localFlows: Record<string, number>;
};

/**
 * The exact uncertainty of one value of a linear network, correlations included, with its origins and flows:
 * reverse accumulation for the sensitivities, one forward pass for the covariances (JCGM 102 6.2.1.3).
 * @param focus id of a value or source
 * @throws EngineError `unknown-node` for the focus; `circle` and those of `compileNetwork`
 */
export function propagate(network: Network | CompiledNetwork, focus: string): Propagation {
  const net = compiled(network);
  const walk = walkUp(net, requireNode(net, focus, 'focus'));
  const origins = originsOf(net, walk);
  const covariances = covarianceWithFocus(net, walk);
  const named = <T>(pairs: Iterable<[number, T]>) =>
    Object.fromEntries(Array.from(pairs, ([node, value]) => [net.idOf(node), value]));
  const missing = walk.nodes.filter((node) => net.unknown[node] && walk.gain.get(node) !== 0);
  const variance = origins.terms.reduce((sum, term) => sum + term.variance, 0);
  return {
    standardUncertainty: missing.length > 0 ? null : Math.sqrt(Math.max(0, variance)),
    missing: missing.map(net.idOf),
    degreesOfFreedom: chainDegreesOfFreedom(origins.terms),
    sensitivities: named(walk.gain),
    contributions: origins.contributions,
    covarianceWithFocus: named(covariances),
    flows: flowsOf(net, walk, covariances),
    localFlows: named(origins.localFlows),
  };
}

type Origins = {
  contributions: Record<string, number>;
  localFlows: Map<number, number>;
  terms: VarianceTerm[];
};

/** What enters at each node: its own part, its share of a group, and class limits that stood for it. */
function originsOf(net: CompiledNetwork, walk: Walk): Origins {
  const byKey = new Map<string, number>();
  const localFlows = new Map<number, number>();
  const terms: VarianceTerm[] = [];
  const add = (node: number, variance: number, key: string) => {
    byKey.set(key, (byKey.get(key) ?? 0) + variance);
    localFlows.set(node, (localFlows.get(node) ?? 0) + variance);
  };
  const groups = new Map<number, number>();
  for (const node of walk.nodes) {
    const own = ownFlow(net, node, walk);
    const index = net.groupOf[node]!;
    if (index >= 0) groups.set(index, (groups.get(index) ?? 0) + own);
    else
      terms.push({
        variance: own,
        degreesOfFreedom: net.degreesOfFreedom[node]!,
        estimate: net.estimateOf(node),
      });
    if (!net.unknown[node]) add(node, own, index >= 0 ? groupKey(index) : net.idOf(node));
    for (const [parent, variance] of limitFlows(net, node, walk)) {
      add(parent, variance, net.idOf(parent));
      terms.push({ variance, degreesOfFreedom: Infinity });
    }
  }
  for (const [index, variance] of groups) terms.push({ ...net.groups[index]!, variance });
  return { contributions: Object.fromEntries(byKey), localFlows, terms };
}

/** `g_a sum K_am g_m` for a group member, `g_a^2 l_a^2` otherwise. */
function ownFlow(net: CompiledNetwork, node: number, walk: Walk): number {
  const gain = walk.gain.get(node)!;
  const index = net.groupOf[node]!;
  if (index < 0) return gain * gain * net.ownVariance[node]!;
  return gain * groupPull(net.groups[index]!, net.placeInGroup[node]!, walk.gain);
}

/** Variances that class limits bring to `node`, by the parent whose nominal value was used. */
function limitFlows(net: CompiledNetwork, node: number, walk: Walk): [number, number][] {
  const flows: [number, number][] = [];
  for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
    const spread = walk.gain.get(node)! * net.linkSpread[link]!;
    if (spread !== 0) flows.push([net.linkParent[link]!, spread * spread]);
  }
  return flows;
}

/** Forward pass over the ancestors: `C_s = g_s u_s^2`, `C_a = sum c_aq C_q + sum K_am g_m`. */
function covarianceWithFocus(net: CompiledNetwork, walk: Walk): Map<number, number> {
  const covariances = new Map<number, number>();
  for (const node of walk.nodes.toReversed()) {
    const gain = walk.gain.get(node)!;
    const index = net.groupOf[node]!;
    let sum =
      index < 0
        ? gain * net.ownVariance[node]!
        : groupPull(net.groups[index]!, net.placeInGroup[node]!, walk.gain);
    for (let link = net.linkStart[node]!; link < net.linkStart[node + 1]!; link += 1) {
      sum += net.linkSensitivity[link]! * covariances.get(net.linkParent[link]!)!;
      sum += gain * net.linkSpread[link]! ** 2;
    }
    covariances.set(node, sum);
  }
  return covariances;
}

/** `f(p -> n) = g_n c_np C_p`, and what a class limit brings through the link. */
function flowsOf(net: CompiledNetwork, walk: Walk, covariances: Map<number, number>): Propagation['flows'] {
  return walk.nodes.flatMap((node) => {
    const gain = walk.gain.get(node)!;
    const from = net.linkStart[node]!;
    return Array.from(net.linkParent.subarray(from, net.linkStart[node + 1]!), (parent, at) => {
      const through = gain * net.linkSensitivity[from + at]! * covariances.get(parent)!;
      const limit = (gain * net.linkSpread[from + at]!) ** 2;
      return { child: net.idOf(node), parent: net.idOf(parent), variance: through + limit };
    });
  });
}
