import { Notice } from '#src/components/ui/notice.tsx';
import { Decimal } from '#shared/decimal.ts';
import type { KnownStandard } from './known.ts';

const HEAVY_GRAMS = 10_000;

/** A caution where weights of 10 kg and more are handled. */
export function HeavyWeights({ standards }: { standards: readonly KnownStandard[] }) {
  if (!standards.some(({ nominal }) => new Decimal(nominal).gte(HEAVY_GRAMS))) return null;
  return (
    <Notice tone="caution" title="Weights of 10 kg and more">
      Lift and move them with the means meant for it, never above a person, and with feet and hands clear of
      where they may fall. The safety rules of your site and the local codes decide.
    </Notice>
  );
}
