import type { z } from 'zod';
import type { DryRunNoteBody, SaveDryRunBody } from '#shared/contracts/dry-runs.ts';
import { inAct } from '#server/db/act.ts';
import { insertRow } from '#server/db/base-model.ts';
import { readRow } from '#server/db/read.ts';
import { AppError } from '#server/http/app-error.ts';
import { newId } from '#server/http/context.ts';
import type { SignedInContext } from '#server/http/route.ts';
import { dryRunModel, dryRunNoteModel } from './dry-runs.model.ts';

/** Keeps the question of a dry run for a laboratory. What it answers is for each reader to ask anew. */
export async function saveDryRun(
  context: SignedInContext,
  { laboratoryId, name, question }: z.infer<typeof SaveDryRunBody>,
): Promise<string> {
  return inAct(context, { kind: 'dry-run.save', laboratoryId }, async (act) => {
    const id = newId(context);
    const { accountId } = context.user;
    // A key that was left out would not be in the JSON that is read back.
    const kept = JSON.parse(JSON.stringify(question)) as object;
    await insertRow(dryRunModel(context.database), { id, laboratoryId, accountId, name, question: kept });
    act.record({ subject: { type: 'dry run', id }, after: { name, question: kept } });
    return id;
  });
}

/**
 * Adds a remark to a dry run, or says that it is discarded and why.
 * @throws AppError `duplicate` where it is discarded already
 */
export async function noteDryRun(
  context: SignedInContext,
  { id, laboratoryId }: { id: string; laboratoryId: string },
  { kind, text }: z.infer<typeof DryRunNoteBody>,
): Promise<void> {
  const isDiscard = kind === 'discard';
  const act = { kind: isDiscard ? 'dry-run.discard' : 'dry-run.note', laboratoryId } as const;
  await inAct(context, act, async (open) => {
    const discarded = await readRow(
      context.database,
      "SELECT 1 AS yes FROM dry_run_note WHERE dry_run_id = :id AND kind = 'discard' LIMIT 1",
      { id },
    );
    if (discarded) throw new AppError('duplicate', 'This dry run is discarded already.');
    await insertRow(dryRunNoteModel(context.database), {
      id: newId(context),
      dryRunId: id,
      accountId: context.user.accountId,
      kind,
      text,
    });
    open.record({ subject: { type: 'dry run', id }, after: { kind, text } });
  });
}
