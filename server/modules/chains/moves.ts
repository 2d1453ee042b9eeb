import { Decimal } from '#shared/decimal.ts';
import { certificateText } from '#shared/rules/numbers.ts';
import { classLimitOf } from './class-limit.ts';
import { standsFor, type Fates } from './redirected.ts';
import type { StoredLink, StoredValue } from './stored.ts';

/** How far a value is from its own certificate as now known; not computable where `because` says why. */
export type Move =
  { shift: Decimal; because: null; isTouched: boolean } | { shift: null; because: string; isTouched: true };

const UNMOVED: Move = { shift: new Decimal(0), because: null, isTouched: false };
export const CIRCLE =
  'what took the place of a certificate leans in turn on what leaned on it: one of them has to be determined anew';

/**
 * How each value moves when every superseded value above it gives way to its successor: the differences from the
 * certificates used, through the sensitivities; what a successor itself is off by since its own issue comes with it.
 * Of a value that was replaced only its replacement counts, not what lies above the replaced one: what was corrected
 * further up is in the new certificate or comes through its own links.
 */
export class Moves {
  readonly #byId: ReadonlyMap<number, StoredValue>;
  readonly #fates: Fates;
  readonly #known = new Map<number, Move | 'under way'>();

  /** @param values the chain, the successors, and all they lean on, with their links as used */
  constructor(values: readonly StoredValue[], fates: Fates) {
    this.#byId = new Map(values.map((value) => [value.id, value]));
    this.#fates = fates;
  }

  /** The move of a value whose own certificate is taken as it stands: of a child, or of a successor. */
  of(value: StoredValue): Move {
    const known = this.#known.get(value.id);
    if (known === 'under way') return { shift: null, because: CIRCLE, isTouched: true };
    if (known) return known;
    this.#known.set(value.id, 'under way');
    const move = value.parents.map((link) => this.#through(link)).reduce(added, UNMOVED);
    this.#known.set(value.id, move);
    return move;
  }

  /** The move of a value of the chain, its own replacement included: what it is held to be now, less its certificate. */
  whole(value: StoredValue): Move {
    const fate = this.#fates.get(value.id);
    if (fate?.kind === 'lost') return { shift: null, because: fate.because, isTouched: true };
    if (fate?.kind !== 'replaced') return this.of(value);
    const by = this.#byId.get(fate.byId)!;
    return added(this.of(by), { shift: difference(value, by), because: null, isTouched: isOther(value, by) });
  }

  #through(link: StoredLink): Move {
    if (link.role !== 'reference' || link.sensitivity === 0) return UNMOVED;
    const parent = this.#byId.get(link.parentId)!;
    const move = this.whole(parent);
    if (!move.isTouched) return UNMOVED;
    if (link.usedAs === 'class limit') return this.#throughLimit(link, parent, move);
    if (move.shift === null) return move;
    const shift = move.shift.plus(this.#fromCorrected(link, parent)).times(link.sensitivity);
    return { shift, because: null, isTouched: true };
  }

  /** The nominal value was used: nothing moves while the reference keeps its class; if it does not, the use fails. */
  #throughLimit(link: StoredLink, parent: StoredValue, move: Move): Move {
    if (move.shift === null) return UNMOVED;
    const limit = classLimitOf(parent, link);
    const deviation = move.shift.plus(parent.deviation).abs();
    if (limit === null || deviation.lte(limit)) return UNMOVED;
    const by = this.#byId.get(standsFor(link, this.#fates))!;
    return {
      shift: null,
      because: `${parent.registryNo}, used by its class limit, lies outside it by certificate ${certificateText(by)}`,
      isTouched: true,
    };
  }

  /** A value used with a notice's correction is compared with its successor on the newer scale as it was used. */
  #fromCorrected(link: StoredLink, parent: StoredValue): Decimal {
    const by = this.#byId.get(standsFor(link, this.#fates))!;
    const isOnNewScale = by.id !== parent.id && by.scaleVersion !== parent.scaleVersion;
    if (link.usedAs !== 'by notice' || link.usedDeviation === null || !isOnNewScale) return new Decimal(0);
    return new Decimal(parent.deviation).minus(link.usedDeviation);
  }
}

/** What a successor's certificate says less what its predecessor's said, grams. */
export function difference(value: StoredValue, by: StoredValue): Decimal {
  return new Decimal(by.deviation).minus(value.deviation);
}

/** Whether a re-issue changed more than words. */
export function isOther(value: StoredValue, by: StoredValue): boolean {
  return (
    value.deviation !== by.deviation ||
    value.expandedU !== by.expandedU ||
    value.k !== by.k ||
    value.scaleVersion !== by.scaleVersion
  );
}

function added(one: Move, other: Move): Move {
  if (one.shift === null) return one;
  if (other.shift === null) return other;
  const isTouched = one.isTouched || other.isTouched;
  return { shift: one.shift.plus(other.shift), because: null, isTouched };
}
