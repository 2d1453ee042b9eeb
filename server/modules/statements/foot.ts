import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery } from '#shared/contracts/statements.ts';
import type { TextSpan } from '#shared/drawing/shapes.ts';
import { span } from '#server/print/sheet.ts';

const SIZE = 7.5;

/** At the foot of every page: what was asked, and the hash that names the content. */
export function footOf(chain: ChainResponse, { verdict }: StatementQuery, sha256: string): TextSpan[] {
  const { day, known, as, ruleSet, engine } = chain.question;
  const judged = verdict === 'today' ? 'known now' : 'known at use';
  return [
    span(
      `In force on ${day}, as known on ${known}; links as ${as}; judged by what was ${judged}; rule set ${ruleSet}, engine ${engine}. SHA-256 `,
      SIZE,
      'sans',
      'ink-2',
    ),
    span(sha256, SIZE - 0.7, 'mono', 'ink-2'),
  ];
}

/** The day that a document is dated by: what was known then is what it says. */
export function createdOn({ question }: ChainResponse): Date {
  return new Date(`${question.known}T00:00:00Z`);
}
