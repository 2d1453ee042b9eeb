import { z } from 'zod';

/**
 * Everything a chain's screen can be asked, as it stands in the address: a link sent to a colleague shows the
 * same picture, within that reader's rights. What cannot be read is left out, not an error.
 */
const Question = z.object({
  day: z.iso.date().optional().catch(undefined),
  known: z.iso.date().optional().catch(undefined),
  draw: z.enum(['flow', 'plain']).catch('flow'),
  verdict: z.enum(['conduct', 'today']).catch('today'),
  /** Shared effects below 1 % are counted, and shown when asked for. */
  effects: z.enum(['main', 'all']).catch('main'),
  only: z.enum(['fails']).optional().catch(undefined),
  /** Links as used, or with each superseded ancestor replaced by what took its place. */
  as: z.enum(['certified', 'now known']).catch('certified'),
  /** Plates of one laboratory drawn as one. */
  fold: z.enum(['laboratory']).optional().catch(undefined),
  /** Keys of the folded groups that are opened in place, joined by commas. */
  open: z.string().max(2000).optional().catch(undefined),
  /** The other question that this one is compared with: its two days, and which chain. */
  thenDay: z.iso.date().optional().catch(undefined),
  thenKnown: z.iso.date().optional().catch(undefined),
  thenAs: z.enum(['certified', 'now known']).optional().catch(undefined),
  /** The rule set that answered whoever sent the link; the present one answers. */
  rules: z.string().max(40).optional().catch(undefined),
  /** The drawing as wide as the page, above its table. */
  place: z.enum(['wide']).optional().catch(undefined),
  /** A second value: what both lean on lights up. */
  with: z.uuid().optional().catch(undefined),
  /** What is selected: a node's uid, or child and parent of a link joined by a dot. */
  at: z.string().max(80).optional().catch(undefined),
});
export type ChainQuestion = z.infer<typeof Question>;

/** Reads the question from the address. */
export function readQuestion(parameters: URLSearchParams): ChainQuestion {
  return Question.parse(Object.fromEntries(parameters));
}

/** The address's parameters with a change; what is at its default is left out. */
export function withChange(question: ChainQuestion, change: Partial<ChainQuestion>): Record<string, string> {
  const next = { ...question, ...change };
  const defaults: Record<string, string> = {
    draw: 'flow',
    verdict: 'today',
    effects: 'main',
    as: 'certified',
  };
  return Object.fromEntries(
    Object.entries(next).flatMap(([name, value]) =>
      value && value !== defaults[name] ? [[name, value]] : [],
    ),
  );
}

/** The question with its days and rule set named: what a colleague opens later is the same question. */
export function pinned(
  question: ChainQuestion,
  answered: { day: string; known: string; ruleSet: string },
): Record<string, string> {
  return withChange(question, { day: answered.day, known: answered.known, rules: answered.ruleSet });
}

/** Whether another question is laid beside this one. */
export function isCompared({ thenDay, thenKnown, thenAs }: ChainQuestion): boolean {
  return thenDay !== undefined || thenKnown !== undefined || thenAs !== undefined;
}
