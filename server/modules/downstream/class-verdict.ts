import type { ClassVerdict } from '#shared/contracts/downstream.ts';
import { Decimal } from '#shared/decimal.ts';
import { classConformity } from '#shared/engine/conformity/class-conformity.ts';
import type { WeightClass } from '#shared/engine/conformity/r111-2004.ts';
import { classLimits } from './effects.ts';
import { UNKNOWN_PLACE, type GraphArrays } from './graph-arrays.ts';

/** Closer to a limit than this part of it, doubles do not decide: the engine does, in decimals. */
const TOO_CLOSE = 1e-9;
/** The coverage factor that OIML R 111-1, 5.2 and 5.3 speak of. */
const K = 2;
/** Decimals taken where a certificate does not tell its own: no allowance for rounding. */
const MANY_DECIMALS = 12;

/** A value moved by `shift` and less certain by `addedVariance`; both 0 for the value as it stands. */
export type JudgeClass = (node: number, shift: number, addedVariance: number) => ClassVerdict;

/**
 * Whether values keep the class stated for them by the rule declared for them (guarded where none is), with
 * U <= MPE/3: `classConformity`, asked only where doubles lie too close to a limit to tell.
 */
export function judgeClassOf(graph: GraphArrays): JudgeClass {
  const limits = classLimits(graph);
  return (node, shift, addedVariance) => {
    const limit = limits(node);
    const u = graph.u[node]!;
    if (limit === undefined || graph.isConventional[node] !== 1 || !(u > 0) || Number.isNaN(shift)) {
      return 'not judged';
    }
    const expandedU = K * Math.sqrt(u * u + addedVariance);
    const size = Math.abs(graph.deviation[node]! + shift);
    const halfDigit = 0.5 * 10 ** (-milligramDecimals(graph, node) - 3);
    const margins = [
      (graph.isSimpleRule[node] ? limit : limit - expandedU) - size,
      limit / 3 + halfDigit - expandedU,
    ];
    const isClear = margins.every((margin) => Math.abs(margin) > TOO_CLOSE * limit);
    const keeps = isClear
      ? margins.every((margin) => margin > 0)
      : engineKeeps(graph, node, shift, addedVariance);
    return keeps ? 'keeps' : 'does not keep';
  };
}

function engineKeeps(graph: GraphArrays, node: number, shift: number, addedVariance: number): boolean {
  // A deviation of up to 1 000 g keeps its twelve decimals in a double: this is the register's own decimal.
  const deviation = new Decimal(graph.deviation[node]!.toFixed(12)).plus(shift);
  const result = classConformity({
    class: graph.classes.at(graph.class[node]! - 1) as WeightClass,
    nominal: new Decimal(graph.nominals.at(graph.nominal[node]!)),
    deviation: deviation.times(1000),
    expandedUncertainty: expandedMilligrams(graph, node, addedVariance),
    decisionRule: graph.isSimpleRule[node] ? 'simple' : 'guarded',
    uncertaintyDecimals: milligramDecimals(graph, node),
  });
  return result.conforms === true && result.uncertaintyAllowed !== false;
}

/** U at k = 2 in milligrams: the certificate's own digits where it states k = 2 and nothing is added. */
function expandedMilligrams(graph: GraphArrays, node: number, addedVariance: number): number {
  const u = graph.u[node]!;
  const stated = graph.expandedU[node]!;
  const isAsStated = addedVariance === 0 && Math.abs(stated / u - K) < TOO_CLOSE;
  return isAsStated
    ? new Decimal(stated.toFixed(12)).times(1000).toNumber()
    : K * Math.sqrt(u * u + addedVariance) * 1000;
}

function milligramDecimals(graph: GraphArrays, node: number): number {
  const place = graph.uPlace[node]!;
  return place === UNKNOWN_PLACE ? MANY_DECIMALS : Math.max(0, -place - 3);
}
