import type { CalibrationInput, CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { Context } from '#server/http/context.ts';
import { correctedByNotices, storeOf, type CorrectedValue } from '#server/modules/chains/index.ts';
import type { IssueFacts } from './issue-facts.ts';

/**
 * Fixes what was used where a reference was used as corrected by notices and the input does not say its value: the
 * certificate's with the notices in force on the last day of use. So the local part of a result is inferred with the u
 * that was used, and what was used stands on the link.
 */
export async function completeNotices(
  context: Context,
  input: CalibrationInput,
  facts: IssueFacts,
): Promise<CalibrationInput> {
  const corrections = new Map<string, CorrectedValue>();
  for (const [day, uids] of openUses(input)) {
    const ids = [...uids].flatMap((uid) => facts.references.get(uid)?.id ?? []);
    const found = await correctedByNotices(storeOf(context.database), ids, day);
    for (const uid of uids) {
      const corrected = found.get(facts.references.get(uid)?.id ?? 0);
      if (corrected) corrections.set(`${uid} ${day}`, corrected);
    }
  }
  if (corrections.size === 0) return input;
  const complete = (used: Used): Used =>
    isOpen(used) ? { ...used, ...corrections.get(`${used.valueUid} ${used.usedEnd}`) } : used;
  return {
    ...input,
    lines: input.lines.map((line) => ({ ...line, references: line.references.map(complete) })),
  };
}

type Used = CalibrationLine['references'][number];

function isOpen({ usedAs, usedDeviation, usedExpandedU }: Used): boolean {
  return usedAs === 'by notice' && usedDeviation === null && usedExpandedU === null;
}

/** Values used by notice without their numbers, by the last day of use. */
function openUses(input: CalibrationInput): Map<string, Set<string>> {
  const open = new Map<string, Set<string>>();
  for (const used of input.lines.flatMap((line) => line.references).filter(isOpen)) {
    const uids = open.get(used.usedEnd) ?? new Set<string>();
    open.set(used.usedEnd, uids.add(used.valueUid));
  }
  return open;
}
