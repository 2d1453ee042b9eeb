import { Combobox } from '#src/components/ui/combobox.tsx';
import { find, type Found } from '../api.ts';

/** One box for everything with a number or a name; a scanned code arrives in it as typed text. */
export function FindBox({ onFound }: { onFound: (found: Found) => void }) {
  return (
    <Combobox<Found>
      label="Find anything"
      isLabelHidden
      placeholder="Find anything"
      value={null}
      onChange={(found) => found && onFound(found)}
      search={find}
      emptyText="Nothing by that number, marking or name"
    />
  );
}
