import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementResponse } from '#shared/contracts/statements.ts';
import { namesOf } from '#shared/drawing/link-order.ts';
import { fillSentence } from '#shared/rules/sentence.ts';

type Check = ChainResponse['checks'][number];
type Row = StatementResponse['checks'][number];

const ORDER = ['fails', 'cannot be judged', 'holds', 'does not apply'];

/** Every check with its clause, what failed first; words that are not this reader's to know are left out. */
export function checkRows(chain: ChainResponse): Row[] {
  const rules = new Map(chain.rules.map((rule) => [rule.id, rule]));
  const names = namesOf(chain);
  return chain.checks
    .map((check): Row => {
      const rule = rules.get(check.rule)!;
      const sentence = check.sentence === null ? null : rule.sentences[check.sentence]!;
      const { title, clause, edition } = rule;
      const { verdict, outcome, severity } = check;
      return {
        ...{ rule: check.rule, title, clause, edition, verdict, outcome, severity },
        about: aboutWords(check.subject, names),
        words: sentence === null ? null : fillSentence(sentence, check.parameters),
      };
    })
    .sort(
      (a, b) =>
        ORDER.indexOf(a.outcome) - ORDER.indexOf(b.outcome) ||
        compare(a.rule, b.rule) ||
        compare(a.verdict, b.verdict) ||
        compare(a.about, b.about),
    );
}

/** What failed, in sentences, by the value whose step it is: a link belongs to the value that leans. */
export function failingSentences(chain: ChainResponse): Map<string, string[]> {
  const rules = new Map(chain.rules.map((rule) => [rule.id, rule]));
  const found = new Map<string, string[]>();
  for (const { subject, rule: id, sentence, parameters, outcome } of chain.checks) {
    if (outcome !== 'fails' || subject.type === 'chain') continue;
    const uid = subject.type === 'value' ? subject.uid : subject.childUid;
    const rule = rules.get(id)!;
    const words =
      sentence === null ? `${rule.title}: this fails.` : fillSentence(rule.sentences[sentence]!, parameters);
    const told = found.get(uid) ?? [];
    // What fails under both verdicts is told once.
    if (!told.includes(`${words} (${id})`)) found.set(uid, [...told, `${words} (${id})`]);
  }
  return found;
}

/** Outcomes of one rule under one verdict, counted. */
export interface RuleCount {
  rule: string;
  title: string;
  clause: string;
  conduct: string;
  today: string;
}

/** One row a rule: how often it held, failed or could not be judged, under both verdicts. */
export function ruleCounts(rows: readonly Row[]): RuleCount[] {
  const rules = [...new Map(rows.map((row) => [row.rule, row])).values()].sort((a, b) =>
    compare(a.rule, b.rule),
  );
  return rules.map(({ rule, title, clause, edition }) => ({
    rule,
    title,
    clause: clause === 'none' ? edition : `${edition}: ${clause}`,
    conduct: counted(rows.filter((row) => row.rule === rule && row.verdict === 'conduct')),
    today: counted(rows.filter((row) => row.rule === rule && row.verdict === 'today')),
  }));
}

function counted(rows: readonly Row[]): string {
  const parts = ORDER.flatMap((outcome) => {
    const count = rows.filter((row) => row.outcome === outcome).length;
    return count === 0 ? [] : [`${outcome} ${count}`];
  });
  return parts.length === 0 ? 'not asked' : parts.join(', ');
}

function aboutWords(subject: Check['subject'], names: ReadonlyMap<string, string>): string {
  if (subject.type === 'chain') return 'the chain';
  if (subject.type === 'value') return names.get(subject.uid) ?? 'a value';
  return `${names.get(subject.parentUid) ?? 'a value'} → ${names.get(subject.childUid) ?? 'a value'}`;
}

function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
