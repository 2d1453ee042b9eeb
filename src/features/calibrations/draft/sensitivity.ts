import { Decimal } from '#shared/decimal.ts';
import type { ReferenceChoice } from '#shared/contracts/drafts.ts';
import type { KnownStandard } from './known.ts';

/**
 * The sensitivity that stands where none is typed: the ratio of the nominals for one reference, 1 where several
 * together make up the weight. Null where a person has to say it.
 */
export function defaultSensitivity(
  standard: KnownStandard | undefined,
  references: readonly (ReferenceChoice | undefined)[],
): { value: string; why: string } | null {
  if (!standard || references.some((one) => !one)) return null;
  const nominals = references.map((one) => new Decimal(one?.nominal ?? 0));
  const [first, only] = [references[0], nominals[0]];
  if (first && only && references.length === 1 && only.gt(0)) {
    const ratio = new Decimal(standard.nominal).div(only).toSignificantDigits(6).toFixed();
    const why = ratio === '1' ? 'the nominals are equal' : `${standard.marking} from ${first.marking}`;
    return { value: ratio, why };
  }
  const sum = nominals.reduce((total, nominal) => total.plus(nominal), new Decimal(0));
  return sum.eq(standard.nominal) ? { value: '1', why: 'together they make up the weight' } : null;
}
