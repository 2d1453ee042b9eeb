import { Decimal } from '#shared/decimal.ts';
import type { CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { IssueProblem } from './issue-problem.ts';

/** A line of the revision being superseded. */
export interface ReplacedLine {
  id: number;
  uid: string;
  standardId: string;
  registryNo: string;
  quantity: CalibrationLine['quantity'];
  medium: CalibrationLine['medium'];
  stage: CalibrationLine['stage'];
  deviation: string;
  expandedU: string | null;
  k: string | null;
  scaleVersionId: string | null;
}

export interface LineMatch {
  replaced: ReplacedLine;
  /** Place of the line that replaces it. */
  at: number;
  /** `value` where value, U, k, weight, kind, state or scale changed; `text` otherwise. */
  changed: 'text' | 'value';
}

/**
 * Pairs each line of a revision with the one it replaces: by weight, kind and state, then, for lines whose
 * very identity was corrected, in order. A line that would be left without successor is a problem: a revision
 * re-issues every line.
 */
export function matchLines(
  replaced: readonly ReplacedLine[],
  lines: readonly CalibrationLine[],
): { matches: LineMatch[]; problems: IssueProblem[] } {
  const free = new Set(lines.keys());
  const take = (wanted: (line: CalibrationLine) => boolean): number | undefined => {
    const at = [...free].find((place) => wanted(lines[place]!));
    if (at !== undefined) free.delete(at);
    return at;
  };
  const byIdentity = replaced.map((old) => take((line) => isSameThing(old, line)));
  const matches: LineMatch[] = [];
  const problems: IssueProblem[] = [];
  for (const [place, old] of replaced.entries()) {
    const at = byIdentity[place] ?? take(() => true);
    if (at === undefined) {
      problems.push({
        field: 'lines',
        message: `The revision leaves out ${old.registryNo} (${old.quantity}). Every line is issued again; to take a result back, withdraw the calibration.`,
        received: `${lines.length} lines`,
        expected: `${replaced.length} lines or more`,
        clause: 'ISO/IEC 17025:2017, 7.8.8',
      });
      continue;
    }
    matches.push({ replaced: old, at, changed: isSameValue(old, lines[at]!) ? 'text' : 'value' });
  }
  return { matches, problems };
}

function isSameThing(old: ReplacedLine, line: CalibrationLine): boolean {
  return (
    old.standardId === line.standardId &&
    old.quantity === line.quantity &&
    old.medium === line.medium &&
    old.stage === line.stage
  );
}

function isSameValue(old: ReplacedLine, line: CalibrationLine): boolean {
  return (
    isSameThing(old, line) &&
    isSameDecimal(old.deviation, line.deviation) &&
    isSameDecimal(old.expandedU, line.expandedU) &&
    isSameDecimal(old.k, line.k) &&
    old.scaleVersionId === line.scaleVersionId
  );
}

/** Equal as numbers, whatever the zeros. */
function isSameDecimal(a: string | null, b: string | null): boolean {
  if (a === null || b === null) return a === b;
  return new Decimal(a).eq(b);
}
