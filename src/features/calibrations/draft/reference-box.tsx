import { useFormContext } from 'react-hook-form';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { QuantityKind } from '#shared/contracts/common.ts';
import type { StandardRow } from '#shared/contracts/standards.ts';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { findReferences, findStandards } from '../api.ts';
import { useDraft } from './draft-context.ts';
import { useKnown } from './known.ts';
import type { DraftValues } from './draft-values.ts';

type SetOfWeights = NonNullable<StandardRow['set']>;

/** One value, or a set whose pieces are each the reference of their like. */
type ReferenceOption = ComboboxOption & ({ reference: ReferenceChoice } | { set: SetOfWeights });

const LONGEST_LIST = 30;

interface ReferenceBoxProps {
  label: string;
  isLabelHidden?: boolean;
  /** Kind of the results that lean on it; a value of the other kind is no reference for them. */
  quantity?: QuantityKind;
  onChosen: (reference: ReferenceChoice) => void;
  /** Offers whole sets beside single values. */
  onSet?: (set: SetOfWeights) => void;
  className?: string;
}

/** Finds the assigned value a result leans on: own ones by part of the number, the issuer's by a whole one. */
export function ReferenceBox({
  label,
  isLabelHidden,
  quantity,
  onChosen,
  onSet,
  className,
}: ReferenceBoxProps) {
  const { laboratoryId } = useDraft();
  const { getValues } = useFormContext<DraftValues>();
  const { learnReferences } = useKnown();
  return (
    <Combobox<ReferenceOption>
      {...{ label, isLabelHidden, className }}
      placeholder={onSet ? 'registry number; a set by its number' : 'registry number'}
      emptyText="No value by that number. The issuer’s weights are found by their whole registry number, or by the certificate’s."
      value={null}
      onChange={(option) => {
        if (!option) return;
        if ('set' in option) {
          onSet?.(option.set);
          return;
        }
        learnReferences([option.reference]);
        onChosen(option.reference);
      }}
      search={async (q, signal) => {
        const issuer = getValues('issuerId') ?? undefined;
        const values = findReferences({ laboratory: laboratoryId, issuer, q, quantity }, signal);
        const rows = onSet ? await findStandards(laboratoryId, q, LONGEST_LIST, signal) : [];
        return [...setOptions(rows), ...(await values).map(optionOf)];
      }}
    />
  );
}

function setOptions(rows: readonly StandardRow[]): ReferenceOption[] {
  const sets = new Map(rows.flatMap(({ set }) => (set ? [[set.id, set] as const] : [])));
  return [...sets.values()].map((set) => ({
    id: set.id,
    label: `Set ${set.registryNo}, piece by piece`,
    detail: 'each line from the piece of its nominal',
    set,
  }));
}

function optionOf(reference: ReferenceChoice): ReferenceOption {
  const { valueUid, registryNo, marking, certificateNo, performedEnd, state, isNewest } = reference;
  const standing = state === 'in force' && !isNewest ? 'in force, a newer value exists' : state;
  return {
    id: valueUid,
    label: `${registryNo}, ${marking}`,
    detail: `${certificateNo}, ${performedEnd}, ${standing}`,
    reference,
  };
}
