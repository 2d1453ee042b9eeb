import { Quantity } from '#src/components/ui/quantity.tsx';
import { partsOfBestU, type Line } from '../best-capability.ts';

/** U of a scope line as a function of the nominal m, written as on a schedule: 0.8 µg + 5 × 10⁻⁸ m. */
export function BestCapability({ line }: { line: Line }) {
  const { constant, relative } = partsOfBestU(line);
  return (
    <span className="whitespace-nowrap">
      {constant !== null && <Quantity value={constant} shownIn="auto" />}
      {constant !== null && relative !== null && ' + '}
      {relative !== null && (
        <>
          <Quantity value={relative} unit="" isScientific />{' '}
          <span className="font-serif text-[1.1em] italic">m</span>
        </>
      )}
    </span>
  );
}
