import { z } from 'zod';
import { ChainCheck, ChainResponse } from './chains.ts';
import { Id } from './common.ts';

/**
 * The checks of a chain with everything that repeats said once. A chain of thirty values has some fifteen hundred
 * checks: written out they are nine tenths of the reply, and most of the time it takes.
 */
export const PackedChecks = z.object({
  /** What many checks have in common: rule, verdict, outcome, severity, sentence, and the names of its parameters. */
  kinds: z.array(
    ChainCheck.pick({ rule: true, verdict: true, outcome: true, severity: true, sentence: true }).extend({
      names: z.array(z.string()),
    }),
  ),
  /** None for the chain, one for a value, child and parent for a link. */
  subjects: z.array(z.array(Id).max(2)),
  texts: z.array(z.string()),
  /** Check after check: its kind, its subject, and a text for each name of its kind, as places in the lists above. */
  rows: z.array(z.number().int().nonnegative()),
});
export type PackedChecks = z.infer<typeof PackedChecks>;

/** GET /api/chains/:valueUid?checks=packed: the same reply, its checks packed. */
export const PackedChainResponse = ChainResponse.extend({ checks: PackedChecks });
export type PackedChainResponse = z.infer<typeof PackedChainResponse>;

/** Packs the checks of a reply; nothing is lost, their order included. */
export function packChecks(checks: readonly ChainCheck[]): PackedChecks {
  const packed: PackedChecks = { kinds: [], subjects: [], texts: [], rows: [] };
  const kinds = new Map<string, number>();
  const subjects = new Map<string, number>();
  const texts = new Map<string, number>();
  for (const check of checks) {
    const { rule, verdict, outcome, severity, sentence, subject, parameters } = check;
    const names = Object.keys(parameters);
    const kindKey = [rule, verdict, outcome, severity, sentence ?? '', ...names].join('\n');
    const uids = uidsOf(subject);
    packed.rows.push(
      placeOf(kinds, kindKey, () => packed.kinds.push({ rule, verdict, outcome, severity, sentence, names })),
      placeOf(subjects, uids.join(' '), () => packed.subjects.push(uids)),
    );
    for (const name of names) {
      const text = parameters[name]!;
      packed.rows.push(placeOf(texts, text, () => packed.texts.push(text)));
    }
  }
  return packed;
}

/** The checks as they were. @throws RangeError for rows that lead nowhere */
export function unpackChecks({ kinds, subjects, texts, rows }: PackedChecks): ChainCheck[] {
  const checks: ChainCheck[] = [];
  for (let at = 0; at < rows.length;) {
    const { names, ...kind } = itemAt(kinds, rows[at++]);
    const subject = subjectOf(itemAt(subjects, rows[at++]));
    const parameters: Record<string, string> = {};
    for (const name of names) parameters[name] = itemAt(texts, rows[at++]);
    checks.push({ ...kind, subject, parameters });
  }
  return checks;
}

function placeOf(places: Map<string, number>, key: string, add: () => number): number {
  const known = places.get(key);
  if (known !== undefined) return known;
  const place = add() - 1;
  places.set(key, place);
  return place;
}

function itemAt<Item>(items: readonly Item[], place: number | undefined): Item {
  const item = place === undefined ? undefined : items[place];
  if (item === undefined) throw new RangeError('Packed checks lead to nothing: the reply is not whole.');
  return item;
}

function uidsOf(subject: ChainCheck['subject']): string[] {
  if (subject.type === 'chain') return [];
  return subject.type === 'value' ? [subject.uid] : [subject.childUid, subject.parentUid];
}

function subjectOf([first, second]: readonly string[]): ChainCheck['subject'] {
  if (first === undefined) return { type: 'chain' };
  return second === undefined
    ? { type: 'value', uid: first }
    : { type: 'link', childUid: first, parentUid: second };
}
