import type { z } from 'zod';
import type { AsNowKnown, ChainResponse, ChainValue } from '#shared/contracts/chains.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';
import type { Chain } from './chain.service.ts';
import type { ChainNow } from './chain-now.ts';
import { keepsClass } from './keeps-class.ts';
import type { Move } from './moves.ts';
import type { NoticeEffect } from './noticed-closure.ts';
import type { StoredValue } from './stored.ts';

/** Places of a gram that the register keeps: shifts come of sensitivities that are doubles. */
const PLACES = 12;

/** The focus as certified moved to what is known now; null where nothing of it or above it has changed since. */
export function presentAsNowKnown(chain: Chain, k: number): AsNowKnown | null {
  const { now, focus } = chain;
  if (!now) return null;
  const u = (now.numbers ?? chain.numbers).propagation.standardUncertainty;
  const effects = effectsAt(focus, now);
  const move = withEffects(now.focus, effects);
  return {
    ...moved(focus, move),
    keepsClass: keepsClass(chain, move),
    expandedU: u === null || now.focus.shift === null ? null : u * k,
    replaced: now.replaced.map(({ value, by, shift }) => ({
      uid: value.uid,
      byUid: by?.uid ?? null,
      registryNo: value.registryNo,
      certificateNo: value.certificateNo,
      shift: shift && rounded(shift),
    })),
    notices: effects.map(({ notice, shift, u: added }) => ({
      id: notice.id,
      number: notice.number,
      title: notice.title,
      effectiveOn: notice.effectiveOn,
      shift: rounded(new Decimal(shift)),
      u: added,
    })),
  };
}

/** A value of the chain as now known; null where its certificate and all above it are what they were. */
export function nowOf(value: StoredValue, { now, as, focus }: Chain): z.input<typeof ChainValue>['now'] {
  if (!now) return null;
  const move = withEffects(moveOf(value, now, as, focus), effectsAt(value, now));
  return move.isTouched ? moved(value, move) : null;
}

function moveOf(value: StoredValue, now: ChainNow, as: Chain['as'], focus: StoredValue): Move {
  if (value.id === focus.id) return now.focus;
  // In the chain as now known successors stand for themselves.
  return as === 'certified' ? now.moves.whole(value) : now.moves.of(value);
}

/** What notices bring to a value, or to what took its place. */
function effectsAt(value: StoredValue, { notices, fates, closure }: ChainNow): NoticeEffect[] {
  const fate = fates.get(value.id);
  const uid = fate?.kind === 'replaced' ? closure.values.find(({ id }) => id === fate.byId)?.uid : value.uid;
  return (uid && notices.get(uid)) || [];
}

function withEffects(move: Move, effects: readonly NoticeEffect[]): Move {
  if (move.shift === null || effects.length === 0) return move;
  const shift = effects.reduce((sum, effect) => sum.plus(effect.shift), move.shift);
  return { shift, because: null, isTouched: true };
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
