import type { StandardRow } from '#shared/contracts/standards.ts';
import { Combobox, type ComboboxOption } from '#src/components/ui/combobox.tsx';
import { findStandards } from '../api.ts';
import { useDraft } from './draft-context.ts';
import { useKnown } from './known.ts';

/** One weight, or a whole set in the order of its numbers. */
interface WeightOption extends ComboboxOption {
  weights: () => Promise<StandardRow[]>;
}

interface StandardBoxProps {
  label: string;
  isLabelHidden?: boolean;
  /** Offers whole sets beside single weights. */
  hasSets?: boolean;
  hint?: string;
  onChosen: (weights: StandardRow[]) => void;
  className?: string;
}

const LONGEST_LIST = 30;
const LARGEST_SET = 200;

/** Finds weights of the laboratory by part of a number or marking; a set comes as a whole. */
export function StandardBox({ label, isLabelHidden, hint, hasSets, onChosen, className }: StandardBoxProps) {
  const { laboratoryId } = useDraft();
  const { learnStandards } = useKnown();
  return (
    <Combobox<WeightOption>
      {...{ label, isLabelHidden, hint, className }}
      placeholder={hasSets ? 'registry number or marking; a set by its number' : 'number or marking'}
      emptyText="No weight of this laboratory by that number or marking"
      value={null}
      onChange={(option) => {
        void option?.weights().then((weights) => {
          learnStandards(weights);
          onChosen(weights);
        });
      }}
      search={async (text, signal) => {
        const rows = await findStandards(laboratoryId, text, LONGEST_LIST, signal);
        const weights = rows.map(weightOption);
        if (!hasSets) return weights;
        // Whoever types a whole number means that weight, not the set it belongs to.
        const isOne = rows[0]?.registryNo.toLowerCase() === text.trim().toLowerCase();
        const sets = setOptions(rows, laboratoryId);
        return isOne ? [...weights, ...sets] : [...sets, ...weights];
      }}
    />
  );
}

function weightOption(row: StandardRow): WeightOption {
  const detail = [row.marking, row.class && `class ${row.class}`].filter(Boolean).join(', ');
  return { id: row.id, label: row.registryNo, detail, weights: async () => [row] };
}

/** The pieces of one set, in the order of their numbers. */
export async function piecesOf(
  laboratoryId: string,
  set: { id: string; registryNo: string },
): Promise<StandardRow[]> {
  const members = await findStandards(laboratoryId, set.registryNo, LARGEST_SET);
  return members.filter((row) => row.set?.id === set.id);
}

function setOptions(rows: readonly StandardRow[], laboratoryId: string): WeightOption[] {
  const sets = new Map(rows.flatMap(({ set }) => (set ? [[set.id, set] as const] : [])));
  return [...sets.values()].map(({ id, registryNo }) => ({
    id,
    label: `Whole set ${registryNo}`,
    detail: 'every weight of it, a line each',
    weights: () => piecesOf(laboratoryId, { id, registryNo }),
  }));
}
