import type { WeightClass } from '#shared/contracts/common.ts';
import type { ValueFacts } from './facts.ts';
import { certificateText, roundedText } from './numbers.ts';
import { cannotBeJudged, doesNotApply, fails, holds, type ValueRule } from './rule.ts';
import { classOf } from './weight-class.ts';

const BUOYANCY = /buoyan|air density|density of (the )?air|volume/i;
/** One component alone breaks nothing down. */
const FEWEST_COMPONENTS = 2;
/** Below these classes buoyancy between conventional masses is lost in U (common practice, no source). */
const FINE: readonly WeightClass[] = ['E1', 'E2', 'F1'];
/** kg/m³. */
const CONVENTIONAL_AIR = 1.2;
/** Beyond a tenth of it mass and true volume are to be used (OIML R 111-1:2004, 10.2.1, from memory). */
const LARGEST_DEVIATION = 0.1 * CONVENTIONAL_AIR;
/** Air densities that a sensitivity can stand for, kg/m³; any other is one of several volumes added up. */
const AIR = [0.3, 1.5] as const;

/**
 * Air buoyancy is counted: by the volumes a result leans on, or by a component of its budget. Where the volumes are
 * named, the sensitivity to the weight's own tells the air density.
 */
export const buoyancyCounted: ValueRule = {
  id: 'B-25',
  title: 'Air buoyancy counted',
  scope: 'value',
  severity: 'major',
  verdicts: ['conduct'],
  isLasting: true,
  sentences: {
    volumes: 'Certificate {certificate} counts air buoyancy by the volumes of {names}.',
    'other air':
      'The air density was about {air} kg/m³, more than a tenth from 1.2 kg/m³; certificate {certificate} counts it by the volumes of {names}.',
    component: 'The budget of certificate {certificate} has a term for air buoyancy.',
    'left out':
      'The budget of certificate {certificate} for {registryNo} has no term for air buoyancy and names no volume; add what the density of the air brings.',
    'no budget':
      'Certificate {certificate} names no volume and is on record without a budget that is broken down; whether air buoyancy is counted cannot be seen.',
    received: 'Certificate {certificate} was entered by its recipient: its budget stays with {issuer}.',
    'not in air': 'The weighing was done in {medium}.',
    coarse: 'For class {class} air buoyancy is lost in U.',
    'no comparison': 'Certificate {certificate} names no weight that {registryNo} was compared with.',
  },
  judge(value) {
    const { components, effects, references } = value.budget;
    const weightClass = classOf(value);
    const volumes = effects.filter((effect) => effect.kind === 'volume');
    const air = airOf(value);
    const known = {
      certificate: certificateText(value),
      registryNo: value.registryNo,
      issuer: value.issuer.name,
      medium: value.medium,
      class: weightClass ?? '',
      names: volumes.map((volume) => volume.of).join(', '),
      air: air === null ? '' : roundedText(air, 3),
    };
    if (value.medium === 'vacuum') return doesNotApply('not in air', known);
    if (references.length === 0) return doesNotApply('no comparison', known);
    if (volumes.length > 0) {
      const isOther = air !== null && Math.abs(air - CONVENTIONAL_AIR) > LARGEST_DEVIATION;
      return isOther ? holds('other air', known, 'information') : holds('volumes', known);
    }
    if (components.some((name) => BUOYANCY.test(name))) return holds('component', known);
    if (weightClass !== null && !FINE.includes(weightClass)) return doesNotApply('coarse', known);
    if (components.length >= FEWEST_COMPONENTS) return fails('left out', known);
    return value.registeredByIssuer
      ? cannotBeJudged('no budget', known, 'information')
      : doesNotApply('received', known);
  },
};

/** Air density by the sensitivity to the weight's own volume, kg/m³: rho for mass, rho - 1.2 for conventional mass. */
function airOf({ budget, standardId, quantity }: ValueFacts): number | null {
  const own = budget.effects.find((effect) => effect.kind === 'volume' && effect.standardId === standardId);
  if (!own) return null;
  // g/cm3 to kg/m³.
  const air = 1000 * own.sensitivity + (quantity === 'mass' ? 0 : CONVENTIONAL_AIR);
  return air >= AIR[0] && air <= AIR[1] ? air : null;
}
