import { useState } from 'react';
import { useFormContext } from 'react-hook-form';
import type { DraftLine, ReferenceChoice } from '#shared/contracts/drafts.ts';
import { findReferences } from '../api.ts';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';
import { useKnown } from './known.ts';
import { partnerOf, referenceOfPiece } from './link-set.ts';
import { piecesOf } from './standard-box.tsx';

/** What came of naming a set as the reference of all lines. */
export interface LinkedSet {
  registryNo: string;
  linked: number;
  /** Places of the lines that found no piece with a value of their kind, counted from 0; they stay as they were. */
  without: number[];
  /** Why nothing was linked, where the set could not be read. */
  error: Error | null;
}

/** Links every line to the piece of a set that has its nominal. */
export function useLinkSet(): {
  result: LinkedSet | null;
  link: (set: { id: string; registryNo: string }) => Promise<void>;
} {
  const { getValues, setValue } = useFormContext<DraftValues>();
  const { laboratoryId } = useDraft();
  const known = useKnown();
  const [result, setResult] = useState<LinkedSet | null>(null);

  async function link(set: { id: string; registryNo: string }): Promise<void> {
    const pieces = await piecesOf(laboratoryId, set);
    const found = new Map<string, ReferenceChoice>();
    for (const { key, standardId, quantity } of getValues('lines')) {
      const standard = known.standards.get(standardId ?? '');
      const piece = standard && partnerOf(standard, pieces);
      const reference =
        piece && (referenceOfPiece(piece, quantity) ?? (await newestValue(piece.registryNo, quantity)));
      if (reference) found.set(key, reference);
    }
    known.learnReferences([...found.values()]);
    // Read again: somebody may have typed while the register answered.
    const lines = getValues('lines');
    setValue(
      'lines',
      lines.map((line) => linked(line, found.get(line.key))),
      { shouldDirty: true },
    );
    const without = lines.flatMap(({ key }, at) => (found.has(key) ? [] : [at]));
    setResult({ registryNo: set.registryNo, linked: lines.length - without.length, without, error: null });
  }

  /** The piece's value in force is of the other kind: its newest of this kind, where it has one. */
  async function newestValue(
    registryNo: string,
    quantity: DraftLine['quantity'],
  ): Promise<ReferenceChoice | null> {
    const values = await findReferences({
      laboratory: laboratoryId,
      q: registryNo,
      quantity,
    });
    return (
      values.find((one) => one.registryNo === registryNo && one.state === 'in force' && one.isNewest) ?? null
    );
  }

  return {
    result,
    link: (set) =>
      link(set).catch((error: unknown) => {
        if (!(error instanceof Error)) throw error;
        setResult({ registryNo: set.registryNo, linked: 0, without: [], error });
      }),
  };
}

function linked(line: DraftLine, reference: ReferenceChoice | undefined): DraftLine {
  if (!reference) return line;
  return { ...line, references: [{ valueUid: reference.valueUid, sensitivity: '', usedAs: 'certificate' }] };
}
