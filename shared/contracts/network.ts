import { z } from 'zod';
import { Abilities, Day, DecimalString, Id, LaboratoryName, QuantityKind } from './common.ts';

export const LaboratoryKind = z.enum(['national institute', 'calibration laboratory', 'external institute']);

export const LaboratoryListQuery = z.object({ day: Day.optional() });

const LaboratorySummary = LaboratoryName.extend({
  kind: LaboratoryKind,
  country: z.string(),
  place: z.string(),
  /** Standing of its recognition on the day: `none` where nothing was ever asserted. */
  recognition: z.enum(['granted', 'suspended', 'withdrawn', 'none']),
  recognitionBody: z.string().nullable(),
  /** Scope lines in force on the day. */
  scopeLines: z.number().int(),
});

export const LaboratoryListResponse = z.object({ laboratories: z.array(LaboratorySummary) });
export type LaboratoryListResponse = z.infer<typeof LaboratoryListResponse>;

/** One line of a scope: the best measurement capability at a nominal m is U = constant + relative x m, at k. */
export const ScopeLine = z.object({
  line: z.number().int(),
  quantity: QuantityKind,
  nominalFrom: DecimalString,
  nominalTo: DecimalString,
  method: z.string(),
  bestUConstant: DecimalString,
  bestURelative: z.number(),
  k: DecimalString,
  coverage: DecimalString,
  state: z.enum(['granted', 'suspended', 'withdrawn']),
  validFrom: Day,
  validTo: Day.nullable(),
});

export const LaboratoryResponse = z.object({
  laboratory: LaboratorySummary,
  recognitions: z.array(
    z.object({
      kind: z.enum(['institute arrangement', 'accreditation']),
      body: z.string(),
      number: z.string(),
      arrangement: z.string(),
      state: z.enum(['granted', 'suspended', 'withdrawn']),
      validFrom: Day,
      validTo: Day.nullable(),
    }),
  ),
  scope: z.array(ScopeLine),
  /** People, where the reader may see them; null otherwise. */
  people: z
    .array(
      z.object({
        accountId: Id,
        name: z.string(),
        role: z.string(),
        validFrom: Day,
        validTo: Day.nullable(),
      }),
    )
    .nullable(),
  abilities: Abilities,
});
export type LaboratoryResponse = z.infer<typeof LaboratoryResponse>;
