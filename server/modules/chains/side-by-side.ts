import type { ChainResponse } from '#shared/contracts/chains.ts';
import { decimalText, Decimal } from '#shared/decimal.ts';
import { massAndConventional } from '#shared/engine/air/mass-and-conventional.ts';
import { EngineError } from '#shared/engine/errors.ts';
import { assertedOn } from './asserted-on.ts';
import type { StandardDossier, StoredHistoryValue, StoredValue } from './stored.ts';

type Side = ChainResponse['sideBySide'][number];

/** Air density at which balances and conventional mass meet, kg/m3 (OIML D 28). */
const CONVENTIONAL_AIR_DENSITY = 1.2;

/**
 * Mass and conventional mass of the focus, and which one to type into a balance. The other kind is taken from
 * the same certificate where it states both, else worked out from the density in force when it was weighed.
 */
export function sideBySide(
  focus: StoredValue,
  dossier: StandardDossier,
  knownAt: string,
): { sides: Side[]; note: string | null } {
  const u = focus.uStated;
  const own = side(focus, 'stated', focus.expandedU === null ? null : Number(focus.expandedU));
  const other = statedOther(focus, dossier);
  if (other) return { sides: inOrder([own, side(other, 'stated', Number(other.expandedU))]), note: null };
  const density = assertedOn(
    dossier.properties.filter((property) => property.kind === 'density'),
    focus.performedEnd,
    knownAt,
  );
  if (!density) {
    return {
      sides: [own],
      note: `The density of ${focus.registryNo} is not recorded: the other kind cannot be worked out.`,
    };
  }
  if (u === null)
    return { sides: [own], note: 'The certificate states no U: the other kind is not worked out.' };
  const computed = computedOther(focus, density, u);
  return typeof computed === 'string'
    ? { sides: [own], note: computed }
    : { sides: inOrder([own, computed]), note: null };
}

function statedOther(focus: StoredValue, dossier: StandardDossier): StoredHistoryValue | undefined {
  return dossier.history.find(
    (row) =>
      row.revisionId === focus.revisionId && row.quantity !== focus.quantity && row.stage === focus.stage,
  );
}

function computedOther(
  focus: StoredValue,
  density: { value: string; expandedU: string | null; k: string | null },
  u: number,
): Side | string {
  const nominal = new Decimal(focus.nominal);
  const volume = nominal.div(density.value).times(1000).toNumber();
  const relativeU =
    density.expandedU === null
      ? 0
      : Number(density.expandedU) / Number(density.k ?? '2') / Number(density.value);
  try {
    const both = massAndConventional({
      value: nominal.plus(focus.deviation),
      kind: focus.quantity === 'mass' ? 'mass' : 'conventional',
      standardUncertainty: u,
      volume,
      volumeUncertainty: volume * relativeU,
      airDensity: focus.medium === 'air' ? CONVENTIONAL_AIR_DENSITY : 0,
    });
    const isMass = focus.quantity === 'conventional mass';
    const value = isMass ? both.mass : both.conventional;
    const variance = isMass ? both.covariance[0][0] : both.covariance[1][1];
    return {
      quantity: isMass ? 'mass' : 'conventional mass',
      deviation: decimalText(value.minus(nominal).toDecimalPlaces(12)),
      expandedU: Math.sqrt(variance) * Number(focus.k ?? '2'),
      origin: 'computed from the other and the density',
      isTheOneToType: !isMass,
    };
  } catch (error) {
    if (error instanceof EngineError) return `The other kind is not worked out: ${error.message}`;
    throw error;
  }
}

function side(
  value: { quantity: Side['quantity']; deviation: string },
  origin: Side['origin'],
  expandedU: number | null,
): Side {
  const known = expandedU === null || Number.isNaN(expandedU) || expandedU === 0 ? null : expandedU;
  return {
    quantity: value.quantity,
    deviation: value.deviation,
    expandedU: known,
    origin,
    // Balances are adjusted to show conventional mass.
    isTheOneToType: value.quantity === 'conventional mass',
  };
}

function inOrder(sides: Side[]): Side[] {
  return sides.sort((a) => (a.quantity === 'mass' ? -1 : 1));
}
