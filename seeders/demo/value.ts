import type { Effects } from './effects.ts';
import type { Quantity, Weight } from './weight.ts';

/** A result on a certificate of the demo network, as printed, and what its error is made of. */
export interface DemoValue {
  /** `<certificate>/<line>`, with `@<revision>` from the second revision on. */
  key: string;
  certificateNo: string;
  revision: number;
  line: number;
  weight: Weight;
  quantity: Quantity;
  stage: 'as found' | 'as left' | null;
  /** As printed, g. */
  deviation: number;
  expandedU: number;
  /** expandedU / 2: every certificate of the network states k = 2. */
  u: number;
  /** Half of the last printed digit, g. */
  halfDigit: number;
  class: string | null;
  effects: Effects;
  performedEnd: string;
  issuedOn: string;
  /** Number of the epoch, from 0. */
  epoch: number;
  scale: string | null;
  /** Printed wrong on purpose. */
  isFaulty: boolean;
  ends: { effectiveOn: string; knownOn: string; changesValue: boolean }[];
}

/** Whether a value stood, as known before a day. */
export function isInForce(value: DemoValue, day: string): boolean {
  return !value.ends.some((end) => end.effectiveOn <= day && end.knownOn <= day);
}

/** The newest value of a weight that was known on a day and stood; null: none. */
export function newestValue(weight: Weight, quantity: Quantity, day: string): DemoValue | null {
  const known = weight.values.filter(
    (value) =>
      value.quantity === quantity &&
      value.performedEnd <= day &&
      value.issuedOn <= day &&
      value.epoch === weight.epochs.length - 1 &&
      value.stage !== 'as found' &&
      isInForce(value, day),
  );
  return known.reduce<DemoValue | null>(
    (newest, value) => (newest === null || value.performedEnd >= newest.performedEnd ? value : newest),
    null,
  );
}
