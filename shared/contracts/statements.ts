import { z } from 'zod';
import { RootKind, UsedAs } from './calibration-input.ts';
import { AsNowKnown, ChainQuery, ChainResponse } from './chains.ts';
import {
  Day,
  DecimalString,
  Deviation,
  Id,
  Outcome,
  QuantityKind,
  Severity,
  ValueState,
  Verdict,
  WeightClass,
} from './common.ts';

/** What a document of a chain is asked: the chain's own question, and how it is judged and drawn. */
export const StatementQuery = ChainQuery.extend({
  verdict: Verdict.default('today'),
  draw: z.enum(['flow', 'plain']).default('flow'),
  effects: z.enum(['main', 'all']).default('main'),
  only: z.enum(['fails']).optional(),
  fold: z.enum(['laboratory']).optional(),
  open: z.string().max(2000).optional(),
});
export type StatementQuery = z.infer<typeof StatementQuery>;

/**
 * A drawing is also asked for its ground (the two themes of the screen, or white for paper), and may show a second
 * value's chain beside the first.
 */
export const DrawingQuery = StatementQuery.extend({
  theme: z.enum(['paper', 'lamp', 'print']).default('paper'),
  with: Id.optional(),
});
export type DrawingQuery = z.infer<typeof DrawingQuery>;

const Standing = z.enum(['sound', 'caution', 'broken', 'not judged']);

/** One value of the chain, from the weight upwards, as a statement tells it. */
export const StatementStep = z.object({
  uid: Id,
  registryNo: z.string(),
  marking: z.string(),
  nominal: DecimalString,
  class: WeightClass.nullable(),
  /** Null where this reader may not know who holds the weight. */
  holder: z.string().nullable(),
  issuer: z.string(),
  certificateNo: z.string(),
  revisionN: z.number().int(),
  quantity: QuantityKind,
  /** Grams. */
  deviation: Deviation,
  expandedU: DecimalString.nullable(),
  k: DecimalString.nullable(),
  determinedOn: z.string(),
  issuedOn: Day,
  state: ValueState,
  rootKind: RootKind.nullable(),
  scaleVersion: z.string().nullable(),
  /** Share of the weight's variance that passes through; null where it cannot be worked out. */
  share: z.number().nullable(),
  /** What it leaned on. */
  leanedOn: z.array(
    z.object({
      uid: Id,
      name: z.string(),
      role: z.enum(['reference', 'informs', 'source']),
      usedAs: UsedAs.nullable(),
      usedBegin: Day.nullable(),
      usedEnd: Day.nullable(),
      sensitivity: z.number(),
      flow: z.number().nullable(),
      conduct: Standing,
      today: Standing,
    }),
  ),
  /** The step in words; null for what carries little and fails nothing: it stands in the table. */
  words: z.string().nullable(),
});
export type StatementStep = z.infer<typeof StatementStep>;

export const StatementCheck = z.object({
  rule: z.string(),
  title: z.string(),
  clause: z.string(),
  edition: z.string(),
  /** What it speaks about: a value, a link, the chain. */
  about: z.string(),
  verdict: Verdict,
  outcome: Outcome,
  severity: Severity,
  /** Null where the words are not this reader's to know. */
  words: z.string().nullable(),
});

/** GET /api/chains/:valueUid/statement.json. Masses grams as text, uncertainties grams, shares fractions. */
export const StatementResponse = z.object({
  kind: z.literal('statement of traceability'),
  question: ChainResponse.shape.question.extend({ verdict: Verdict }),
  /** The weight and its value, in one line. */
  title: z.string(),
  /** What was asked, in a sentence. */
  asked: z.string(),
  definition: z.string(),
  steps: z.array(StatementStep),
  /** The whole in a few sentences, before the steps. */
  summary: z.array(z.string()),
  uncertainty: ChainResponse.shape.uncertainty,
  asNowKnown: AsNowKnown.nullable(),
  scaleVersions: z.array(z.string()),
  rootShares: z.array(z.object({ uid: Id, registryNo: z.string(), rootKind: RootKind, share: z.number() })),
  sharedEffects: z.array(z.object({ uid: Id, name: z.string(), share: z.number().nullable() })),
  checks: z.array(StatementCheck),
  /** What the statement does not say. */
  notSaid: z.array(z.string()),
  /** SHA-256 of the chain it was made from, as `chain.json` gives it to the same reader. */
  chainSha256: z.string(),
});
export type StatementResponse = z.infer<typeof StatementResponse>;
