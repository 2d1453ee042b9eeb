import { useQueries } from '@tanstack/react-query';
import type { TogetherResponse } from '#shared/contracts/together.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { placedQuery } from '../api.ts';
import type { Placed } from '../search.ts';

interface PlacedListProps {
  placed: readonly Placed[];
  together: TogetherResponse | undefined;
  /** Whether no answer about all of them is to come: then each is asked for by itself. */
  isAlone: boolean;
  onPlaced: (placed: readonly Placed[]) => void;
}

const PANS = [
  { value: '1', label: 'this pan' },
  { value: '-1', label: 'the other' },
] as const;

/** The weights as they lie on the pans. */
export function PlacedList({ placed, together, isAlone, onPlaced }: PlacedListProps) {
  const { decimalMark } = usePreferences();
  const known = (uid: string) => together?.weights[together.valueUids.indexOf(uid)];
  const single = useQueries({
    queries: placed.map(({ uid }) => ({ ...placedQuery(uid), enabled: isAlone && !known(uid) })),
  });
  return (
    <ul className="border-t border-rule">
      {placed.map(({ uid, sign }, at) => {
        const found = single[at]?.data;
        const weight = known(uid) ?? (found?.type === 'value' ? found : undefined);
        const name = weight?.registryNo ?? `weight ${at + 1}`;
        return (
          <li
            key={uid}
            className="flex flex-wrap items-center justify-between gap-x-3 gap-y-1 border-b border-rule py-1"
          >
            <span>
              <span className="font-mono text-sm">{weight?.registryNo ?? `Weight ${at + 1}`}</span>
              {weight && (
                <span className="ml-2 whitespace-nowrap">{nominalText(weight.nominal, decimalMark)}</span>
              )}
              {weight && <span className="block text-sm text-ink-2">certificate {weight.certificateNo}</span>}
              {!weight && single[at]?.error && (
                <span className="block text-sm text-ink-2">
                  Cannot be opened: there is no such value, or it is not yours to see.
                </span>
              )}
            </span>
            <span className="flex items-center gap-3">
              <Switch
                label={`Pan of ${name}`}
                isLabelHidden
                value={sign === 1 ? '1' : '-1'}
                onChange={(pan) =>
                  onPlaced(
                    placed.map((each, place) =>
                      place === at ? { ...each, sign: pan === '1' ? 1 : -1 } : each,
                    ),
                  )
                }
                choices={PANS}
              />
              <Button
                weight="text"
                aria-label={`Take off ${name}`}
                onClick={() => onPlaced(placed.filter((_, place) => place !== at))}
              >
                Take off
              </Button>
            </span>
          </li>
        );
      })}
    </ul>
  );
}
