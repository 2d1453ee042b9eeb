import type { z } from 'zod';
import type { AuditFinding, AuditResult } from '#shared/contracts/audits.ts';
import { fillSentence } from '#shared/rules/sentence.ts';

type Finding = z.input<typeof AuditFinding>;
type Rule = z.input<typeof AuditResult>['rules'][number];

const HEAD = [
  'rule',
  'title',
  'clause',
  'edition',
  'verdict',
  'outcome',
  'severity',
  'subject',
  'weight',
  'certificate',
  'leans on',
  'its certificate',
  'laboratory',
  'finding',
];

/** The head of an export, by RFC 4180: commas, CRLF; UTF-8 with a mark that spreadsheets read. */
export function csvHead(): string {
  return `\ufeff${HEAD.join(',')}\r\n`;
}

/** One finding as a line. */
export function csvLine(finding: Finding, rules: ReadonlyMap<string, Rule>): string {
  const rule = rules.get(finding.rule);
  const template = finding.sentence === null ? undefined : rule?.sentences[finding.sentence];
  const cells = [
    finding.rule,
    rule?.title ?? '',
    rule?.clause ?? '',
    rule?.edition ?? '',
    finding.verdict === 'conduct' ? 'at use' : 'today',
    finding.outcome,
    finding.severity,
    finding.subject,
    finding.value.registryNo,
    finding.value.certificateNo,
    finding.reference?.registryNo ?? '',
    finding.reference?.certificateNo ?? '',
    finding.laboratory.name,
    template === undefined ? '' : fillSentence(template, finding.parameters),
  ];
  return `${cells.map(cell).join(',')}\r\n`;
}

/** A cell that a spreadsheet would read as a formula is set behind an apostrophe. */
function cell(text: string): string {
  const safe = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
