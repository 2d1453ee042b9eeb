import { useFormContext } from 'react-hook-form';
import type { ReferenceChoice } from '#shared/contracts/calibrations.ts';
import type { QuantityKind } from '#shared/contracts/common.ts';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { findReferences } from '../api.ts';
import { useDraft } from './draft-context.ts';
import { useKnown } from './known.ts';
import type { DraftValues } from './draft-values.ts';

interface ReferenceOption extends ComboboxOption {
  reference: ReferenceChoice;
}

interface ReferenceBoxProps {
  label: string;
  isLabelHidden?: boolean;
  /** Kind of the results that lean on it; a value of the other kind is no reference for them. */
  quantity?: QuantityKind;
  onChosen: (reference: ReferenceChoice) => void;
  className?: string;
}

/** Finds the assigned value a result leans on: own ones by part of the number, the issuer's by a whole one. */
export function ReferenceBox({ label, isLabelHidden, quantity, onChosen, className }: ReferenceBoxProps) {
  const { laboratoryId } = useDraft();
  const { getValues } = useFormContext<DraftValues>();
  const { learnReferences } = useKnown();
  return (
    <Combobox<ReferenceOption>
      {...{ label, isLabelHidden, className }}
      placeholder="registry number"
      emptyText="No value by that number. The issuer’s weights are found by their whole registry number, or by the certificate’s."
      value={null}
      onChange={(option) => {
        if (!option) return;
        learnReferences([option.reference]);
        onChosen(option.reference);
      }}
      search={async (q, signal) =>
        (
          await findReferences(
            { laboratory: laboratoryId, issuer: getValues('issuerId') ?? undefined, q, quantity },
            signal,
          )
        ).map(optionOf)
      }
    />
  );
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
