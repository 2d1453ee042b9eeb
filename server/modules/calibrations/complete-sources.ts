import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { IssueFacts, SourceFacts } from './issue-facts.ts';

/** Air density of the convention, in g/cm3 (OIML D 28: 1.2 kg/m3). */
const CONVENTIONAL_AIR = 0.0012;
/** c of "conventional from mass": 1/(1 - 1.2/8000) (OIML D 28). */
const CONVENTIONAL_FACTOR = 1 / (1 - 1.2 / 8000);

interface NeededSource {
  source: SourceFacts;
  sensitivity: number;
}

/**
 * Adds the volume effects that a change between mass and conventional mass brings and that the input left out,
 * so that the correlation of the two kinds need not be typed in:
 * - both kinds of one weight on the certificate: they differ by rho0 V. Weighed in air the conventional mass is
 *   what the balance gives (its sensitivity to V is rho - 1.2 kg/m3, taken as 0) and the mass carries +rho0; in
 *   vacuum the mass is, and the conventional mass carries -c rho0;
 * - a conventional mass from a reference's mass: the reference's volume, with -rho0 times the sensitivity;
 * - a mass from a reference's conventional mass: the weight's own volume, with +rho0.
 * A line with its own budget or group is left as it is: its buoyancy stands there.
 */
export function completeSources(input: CalibrationInput, facts: IssueFacts): CalibrationInput {
  if (input.group) return input;
  const lines = input.lines.map((line) => {
    if (line.components.length > 0) return line;
    const present = new Set(line.sources.map((source) => source.sourceUid));
    const added = neededSources(line, input, facts).filter(({ source }) => !present.has(source.uid));
    if (added.length === 0) return line;
    return {
      ...line,
      sources: [
        ...line.sources,
        ...added.map(({ source, sensitivity }) => ({ sourceUid: source.uid, sensitivity })),
      ],
    };
  });
  return { ...input, lines };
}

function neededSources(line: CalibrationLine, input: CalibrationInput, facts: IssueFacts): NeededSource[] {
  const own = facts.standards.get(line.standardId)?.volumeSource ?? null;
  const byUid = new Map<string, NeededSource>();
  const need = (source: SourceFacts | null, sensitivity: number) => {
    if (!source) return;
    const before = byUid.get(source.uid)?.sensitivity ?? 0;
    byUid.set(source.uid, { source, sensitivity: before + sensitivity });
  };
  const other = twin(line, input);
  if (other && own && !other.sources.some((source) => source.sourceUid === own.uid)) {
    if (line.medium === 'air' && line.quantity === 'mass') need(own, CONVENTIONAL_AIR);
    if (line.medium !== 'air' && line.quantity === 'conventional mass') {
      need(own, -CONVENTIONAL_FACTOR * CONVENTIONAL_AIR);
    }
    return [...byUid.values()];
  }
  for (const { valueUid, role, sensitivity } of line.references) {
    const reference = facts.references.get(valueUid);
    if (!reference || role !== 'reference' || reference.quantity === line.quantity) continue;
    if (line.quantity === 'conventional mass') need(reference.volumeSource, -CONVENTIONAL_AIR * sensitivity);
    else if (byUid.size === 0) need(own, CONVENTIONAL_AIR);
  }
  return [...byUid.values()];
}

/** The line with the other kind of mass of the same weight in the same state. */
export function twin(line: CalibrationLine, input: CalibrationInput): CalibrationLine | undefined {
  return input.lines.find(
    (other) =>
      other.standardId === line.standardId &&
      other.stage === line.stage &&
      other.medium === line.medium &&
      other.quantity !== line.quantity,
  );
}
