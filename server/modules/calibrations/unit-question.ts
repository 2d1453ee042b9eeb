import { Decimal } from '#shared/decimal.ts';
import type { CalibrationLine } from '#shared/contracts/calibration-input.ts';
import type { FieldProblem } from '#shared/errors.ts';
import { maximumPermissibleError } from '#shared/engine/conformity/maximum-permissible-error.ts';
import type { StandardFacts } from './issue-facts.ts';

/** Ratios read as "a factor of a thousand": half a decade either side. */
const THOUSAND = { from: 10 ** 2.5, to: 10 ** 3.5 };

/**
 * Rule B-18 (common practice, no source), which blocks until a person confirms: is the unit right? Asked of a
 * conventional mass whose deviation exceeds ten maximum permissible errors of its class, or whose deviation and
 * U both lie a factor of a thousand above or below the weight's last value.
 */
export function unitQuestion(
  line: Pick<
    CalibrationLine,
    'quantity' | 'deviation' | 'expandedU' | 'reportedUnit' | 'class' | 'unitConfirmed'
  >,
  standard: Pick<StandardFacts, 'registryNo' | 'nominal' | 'class' | 'lastConventional'>,
): FieldProblem[] {
  if (line.unitConfirmed || line.quantity !== 'conventional mass') return [];
  const received = `${line.deviation} g, reported in ${line.reportedUnit}`;
  const weightClass = line.class ?? standard.class;
  const mpe = weightClass && maximumPermissibleError(weightClass, new Decimal(standard.nominal));
  if (mpe && new Decimal(line.deviation).abs().times(1000).gt(mpe.times(10))) {
    return [
      {
        message: `The deviation of ${standard.registryNo} is more than ten times the limit of class ${weightClass}. Is the unit right? Confirm the value if it is.`,
        received,
        expected: `within ${mpe.times(10).toFixed()} mg, or confirmed`,
        clause: 'OIML R 111-1:2004, 5.1',
      },
    ];
  }
  const last = standard.lastConventional;
  if (!last || !isThousandfold(line, last)) return [];
  return [
    {
      message: `Deviation and U of ${standard.registryNo} both differ by a factor of about 1000 from its last value (${last.deviation} g, U = ${last.expandedU} g). Is the unit right? Confirm the value if it is.`,
      received,
      expected: 'values in the unit of the certificate, or confirmed',
    },
  ];
}

function isThousandfold(
  line: Pick<CalibrationLine, 'deviation' | 'expandedU'>,
  last: { deviation: string; expandedU: string | null },
): boolean {
  if (line.expandedU === null || last.expandedU === null) return false;
  const ratios = [ratio(line.deviation, last.deviation), ratio(line.expandedU, last.expandedU)];
  const isLarge = ratios.every((value) => value >= THOUSAND.from && value <= THOUSAND.to);
  const isSmall = ratios.every(
    (value) => value > 0 && 1 / value >= THOUSAND.from && 1 / value <= THOUSAND.to,
  );
  return isLarge || isSmall;
}

/** |a / b|; 0 where b is 0, so that it is no factor of anything. */
function ratio(a: string, b: string): number {
  const divisor = new Decimal(b).abs();
  return divisor.isZero() ? 0 : new Decimal(a).abs().div(divisor).toNumber();
}
