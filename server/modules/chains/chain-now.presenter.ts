import type { z } from 'zod';
import type { AsNowKnown, ChainResponse, ChainValue } from '#shared/contracts/chains.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';
import type { Chain } from './chain.service.ts';
import { keepsClass } from './keeps-class.ts';
import type { Move } from './moves.ts';
import type { StoredValue } from './stored.ts';

/** Places of a gram that the register keeps: shifts come of sensitivities that are doubles. */
const PLACES = 12;

/** The focus as certified moved to what is known now; null where neither it nor anything above it has ended. */
export function presentAsNowKnown(chain: Chain, k: number): AsNowKnown | null {
  const { now, focus } = chain;
  if (!now) return null;
  const u = now.numbers.propagation.standardUncertainty;
  return {
    ...moved(focus, now.focus),
    keepsClass: keepsClass(chain),
    expandedU: u === null || now.focus.shift === null ? null : u * k,
    replaced: now.replaced.map(({ value, by, shift }) => ({
      uid: value.uid,
      byUid: by?.uid ?? null,
      registryNo: value.registryNo,
      certificateNo: value.certificateNo,
      shift: shift && rounded(shift),
    })),
    notices: [],
  };
}

/** A value of the chain as now known; null where its certificate and all above it are what they were. */
export function nowOf(value: StoredValue, { now, as, focus }: Chain): z.input<typeof ChainValue>['now'] {
  if (!now) return null;
  if (value.id === focus.id) return now.focus.isTouched ? moved(value, now.focus) : null;
  // In the chain as now known successors stand for themselves.
  const move = as === 'certified' ? now.moves.whole(value) : now.moves.of(value);
  return move.isTouched ? moved(value, move) : null;
}

/** Values of a chain as now known that were withdrawn with nothing in their place. */
export function becauseLost({ now, as, closure }: Chain): ChainResponse['uncertainty']['missing'] {
  if (!now || as === 'certified') return [];
  return closure.values.flatMap(({ id, uid }) => {
    const fate = now.fates.get(id);
    return fate?.kind === 'lost' ? [{ uid, because: fate.because }] : [];
  });
}

function moved(value: StoredValue, move: Move): Pick<AsNowKnown, 'shift' | 'deviation' | 'because'> {
  if (move.shift === null) return { shift: null, deviation: null, because: move.because };
  const shift = rounded(move.shift);
  return { shift, deviation: decimalText(new Decimal(value.deviation).plus(shift)), because: null };
}

function rounded(shift: Decimal): string {
  return decimalText(shift.toDecimalPlaces(PLACES));
}
