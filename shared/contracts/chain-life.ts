import { z } from 'zod';
import { Day, Id } from './common.ts';

/**
 * Something that changes how a weight's chain stands: on the weight itself, or on what it rests on. Of another
 * laboratory's weight only what a traceability statement tells: that a certificate was superseded or withdrawn.
 */
export const LifeEvent = z.object({
  kind: z.enum(['calibrated', 'issued', 're-issued', 'superseded', 'withdrawn', 'notice', 'epoch', 'due']),
  of: z.enum(['weight', 'chain']),
  /** The value it befell; null for a notice and an epoch. */
  valueUid: Id.nullable(),
  /** Of which weight; null for a notice. */
  registryNo: z.string().nullable(),
  /** Certificate, number and title of a notice, what began an epoch, whose programme ended. */
  what: z.string(),
  /** From which day it counts, when it was made known, and when the register learnt of it (UTC). */
  inForceFrom: Day,
  madeKnownOn: Day,
  recordedOn: Day,
  /** Recorded long after it was made known: imported history. */
  isImported: z.boolean(),
});
export type LifeEvent = z.infer<typeof LifeEvent>;

/** GET /api/chains/:valueUid/life: the days between which a question makes a difference. */
export const ChainLifeResponse = z.object({
  valueUid: Id,
  registryNo: z.string(),
  /** The first day on which something happened, and the last, which may lie ahead; today where none does. */
  from: Day,
  to: Day,
  today: Day,
  /** In the order of the days from which they count. */
  events: z.array(LifeEvent),
});
export type ChainLifeResponse = z.infer<typeof ChainLifeResponse>;
