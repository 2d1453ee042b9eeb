import type { z } from 'zod';
import type { Contribution, Improvement } from '#shared/contracts/chains.ts';
import type { Propagation } from '#shared/engine/network/propagate.ts';
import { assertedOn } from './asserted-on.ts';
import type { Closure } from './chain-store.ts';
import type { StandardDossier, StoredSource, StoredValue } from './stored.ts';

type ImprovementRow = z.infer<typeof Improvement>;
type ContributionRow = z.infer<typeof Contribution>;

/** Relative standard uncertainty of a density measured by hydrostatic weighing. Common practice, no source. */
const MEASURED_DENSITY_RELATIVE_U = 1e-4;
/** An improvement is worth a line from here on. */
const WORTH_SAYING = 0.02;
const LONGEST_LIST = 3;

/**
 * What would help most: each candidate changes one input and leaves the rest, so the figures are exact for
 * that change alone.
 * @returns at most three, best first; U in grams at the focus's coverage factor
 */
export function improvementsOf(
  closure: Closure,
  focus: StoredValue,
  propagation: Propagation,
  contributions: ContributionRow[] | null,
  standards: Map<string, StandardDossier>,
  horizon: string,
): ImprovementRow[] {
  if (propagation.standardUncertainty === null) return [];
  const variance = propagation.standardUncertainty ** 2;
  const k = Number(focus.k ?? '2');
  const candidates = [
    ...densityCandidates(closure, propagation, standards, horizon),
    ...referenceCandidates(closure, focus, contributions ?? [], variance),
    ...ownCandidate(focus, propagation),
  ];
  return candidates
    .filter((candidate) => candidate.saves > variance * WORTH_SAYING && candidate.saves <= variance)
    .sort((a, b) => b.saves - a.saves)
    .slice(0, LONGEST_LIST)
    .map((candidate) => ({
      action: candidate.action,
      uids: candidate.uids,
      expandedUNow: k * Math.sqrt(variance),
      expandedUThen: k * Math.sqrt(Math.max(0, variance - candidate.saves)),
    }));
}

interface Candidate {
  action: string;
  uids: string[];
  /** Variance saved, g2. */
  saves: number;
}

function densityCandidates(
  closure: Closure,
  propagation: Propagation,
  standards: Map<string, StandardDossier>,
  horizon: string,
): Candidate[] {
  return [...closure.sources.values()].flatMap((source) => {
    const target = measuredVolumeU(source, standards, horizon);
    if (target === null || target >= source.u) return [];
    const gain = propagation.sensitivities[source.uid] ?? 0;
    return [
      {
        action: `Measure the density of ${source.registryNo}`,
        uids: [source.uid],
        saves: gain ** 2 * (source.u ** 2 - target ** 2),
      },
    ];
  });
}

/** Standard uncertainty of the volume (cm3) once measured; null where it is measured already, or unknown. */
function measuredVolumeU(
  source: StoredSource,
  standards: Map<string, StandardDossier>,
  horizon: string,
): number | null {
  const dossier = source.standardId === null ? undefined : standards.get(source.standardId);
  if (source.kind !== 'volume' || !dossier) return null;
  const density = assertedOn(
    dossier.properties.filter((row) => row.kind === 'density'),
    horizon.slice(0, 10),
    horizon,
  );
  if (!density || density.origin === 'measured') return null;
  const volume = (Number(dossier.nominal) / Number(density.value)) * 1000;
  return volume * MEASURED_DENSITY_RELATIVE_U;
}

/**
 * A reference with half the uncertainty halves what reaches the focus through it alone. What also arrives on
 * another way, such as the volume of the reference in its own calibration and in its use, stays as it is.
 */
function referenceCandidates(
  closure: Closure,
  focus: StoredValue,
  contributions: ContributionRow[],
  variance: number,
): Candidate[] {
  const reach = reachOf(closure);
  const byId = new Map(closure.values.map((value) => [value.id, value]));
  const references = focus.parents
    .filter((link) => link.role === 'reference')
    .map((link) => byId.get(link.parentId)!);
  const own = new Set(focus.sources.map((link) => closure.sources.get(link.sourceId)!.uid));
  return references.map((reference) => {
    const elsewhere = new Set([
      ...own,
      ...references.flatMap((other) => (other === reference ? [] : [...reach.get(other.id)!])),
    ]);
    const isItsAlone = (uid: string) => reach.get(reference.id)!.has(uid) && !elsewhere.has(uid);
    const share = contributions
      .filter((row) => row.uids.every(isItsAlone))
      .reduce((sum, row) => sum + row.share, 0);
    return {
      action: `Use a reference with half the uncertainty of ${reference.registryNo}`,
      uids: [reference.uid],
      saves: 0.75 * share * variance,
    };
  });
}

/** By value: the uids of itself and of all it leans on, sources included. */
function reachOf(closure: Closure): Map<number, Set<string>> {
  const reach = new Map<number, Set<string>>();
  for (const value of closure.values) {
    const uids = new Set([
      value.uid,
      ...value.sources.map((link) => closure.sources.get(link.sourceId)!.uid),
    ]);
    for (const { parentId, role } of value.parents) {
      if (role === 'reference') for (const uid of reach.get(parentId)!) uids.add(uid);
    }
    reach.set(value.id, uids);
  }
  return reach;
}

function ownCandidate(focus: StoredValue, propagation: Propagation): Candidate[] {
  const own = propagation.localFlows[focus.uid] ?? 0;
  return [
    {
      action: `Halve what the weighing of ${focus.registryNo} itself adds`,
      uids: [focus.uid],
      saves: 0.75 * own,
    },
  ];
}
