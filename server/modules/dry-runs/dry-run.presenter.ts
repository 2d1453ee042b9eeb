import type { z } from 'zod';
import type { DryRunHead, DryRunQuestion, DryRunResponse } from '#shared/contracts/dry-runs.ts';
import { abilitiesFor } from '#server/policy/permission.ts';
import type { User } from '#server/policy/user.ts';
import type { DryRunNote, DryRunRow } from './dry-run.queries.ts';
import { noteDryRunPermission } from './dry-runs.policy.ts';

/** A dry run opened by a reader: the question is null where it names what they may not know. */
export interface OpenedDryRun {
  run: DryRunRow;
  question: DryRunQuestion | null;
  notes: DryRunNote[];
  actsSince: number;
}

/** A dry run as the list mentions it. */
export function presentHead(row: DryRunRow): DryRunHead {
  return {
    id: row.id,
    name: row.name,
    laboratory: { id: row.laboratoryId, code: row.laboratoryCode, name: row.laboratoryName },
    savedBy: row.savedBy,
    savedAt: row.recordedAt.toISOString(),
    actSeq: row.actSeq,
    changes: row.changes,
    isDiscarded: row.isDiscarded === 1,
  };
}

/** A dry run with its question and remarks. */
export function presentDryRun(
  { run, question, notes, actsSince }: OpenedDryRun,
  user: User,
): z.input<typeof DryRunResponse> {
  return {
    ...presentHead(run),
    question,
    actsSince,
    savedOn: run.recordedAt.toISOString().slice(0, 10),
    notes: notes.map(({ kind, text, by, at }) => ({ kind, text, by, at: at.toISOString() })),
    abilities: abilitiesFor(user, { laboratoryId: run.laboratoryId }, [noteDryRunPermission]),
  };
}
