import { createHash } from 'node:crypto';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery, StatementResponse, StatementStep } from '#shared/contracts/statements.ts';
import { PAGE_INKS } from '#shared/drawing/inks.ts';
import { STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { toSvg } from '#shared/drawing/to-svg.ts';
import { quantitySpans } from '#shared/numbers/ink-spans.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { stateOfOutcome, type State } from '#shared/states.ts';
import { ruleCounts } from './check-rows.ts';
import { contentOf, sha256Of, type Content } from './content.ts';
import { pictureOfChain } from './drawing.ts';
import { fontRules } from './font-rules.ts';
import { escaped, textOf } from './markup.ts';
import { focusOf, statementOf } from './statement.ts';
import { TAKE_ALONG_SCRIPT } from './take-along-script.ts';
import { TAKE_ALONG_STYLE } from './take-along-style.ts';

/** Characters of a name that is kept in one line. */
const LONGEST_WHOLE = 20;

/**
 * A chain as one page that needs nothing from anywhere: drawing, table, checks, and the chain's own data, whose hash
 * the page verifies by itself.
 */
export function takeAlongPage(
  chain: ChainResponse,
  query: StatementQuery,
): { html: string; content: Content } {
  const content = contentOf(chain);
  const statement = statementOf(chain, query);
  const main = mainOf(chain, query, statement);
  const style = fontRules() + TAKE_ALONG_STYLE;
  const policy = [
    "default-src 'none'",
    'font-src data:',
    `style-src '${hashSource(style)}'`,
    `script-src '${hashSource(TAKE_ALONG_SCRIPT)}'`,
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  const html =
    '<!doctype html>\n<html lang="en">\n<head>\n<meta charset="utf-8">\n' +
    `<meta http-equiv="Content-Security-Policy" content="${policy}">\n` +
    '<meta name="viewport" content="width=device-width, initial-scale=1">\n' +
    '<meta name="color-scheme" content="light dark">\n' +
    `<title>${escaped(`Chain of ${statement.title}, ${chain.question.day}`)}</title>\n` +
    `<style>${style}</style>\n</head>\n<body>\n` +
    `<main id="said">${main}</main>\n` +
    verification(content, sha256Of(textOf(main).replace(/\s+/g, ''))) +
    `<script type="application/json" id="chain">${content.json}</script>\n` +
    `<script>${TAKE_ALONG_SCRIPT}</script>\n</body>\n</html>\n`;
  return { html, content };
}

function hashSource(text: string): string {
  return `sha256-${createHash('sha256').update(text, 'utf8').digest('base64')}`;
}

function mainOf(chain: ChainResponse, query: StatementQuery, statement: StatementResponse): string {
  const focus = focusOf(chain);
  const { picture, legend } = pictureOfChain(chain, query);
  const svg = toSvg(picture, { inks: PAGE_INKS });
  const held = focus.holder ? `${focus.holder.name} · ` : '';
  return (
    `<header><p class="quiet">The chain of</p><h1>${escaped(statement.title)}</h1>` +
    `<p class="value">${numberOf(focus)}</p>` +
    `<p class="quiet">${escaped(`${focus.quantity}, deviation from nominal; ${focus.k === null ? 'U not stated' : `k = ${focus.k}`}`)}</p>` +
    `<p class="quiet">${escaped(`${held}certificate ${focus.certificateNo}, issued ${focus.issuedOn} by ${focus.issuer.name}`)}</p>` +
    `<p class="quiet">${escaped(statement.asked)}</p></header>` +
    section('In short', statement.summary.map((sentence) => `<p>${escaped(sentence)}</p>`).join('')) +
    section(
      'Drawn',
      `<div class="drawing" tabindex="0" role="region" aria-label="The chain, drawn">${svg}</div><p class="quiet">${escaped(legend)}</p>`,
    ) +
    section('Step by step', stepTable(statement.steps)) +
    section('The checks', ruleTable(statement) + findings(statement)) +
    section(
      'What this does not say',
      statement.notSaid.map((sentence) => `<p>${escaped(sentence)}</p>`).join(''),
    )
  );
}

function section(title: string, content: string): string {
  return `<section><h2>${title}</h2>${content}</section>`;
}

function numberOf(value: { deviation: string; expandedU: string | null; k: string | null }): string {
  return quantitySpans({
    value: value.deviation,
    expandedUncertainty: value.expandedU,
    coverageFactor: value.k,
    kind: 'deviation',
    shownIn: 'auto',
  })
    .map(({ text, isBeyond }) => (isBeyond ? `<span class="beyond">${escaped(text)}</span>` : escaped(text)))
    .join('');
}

function stepTable(steps: readonly StatementStep[]): string {
  const rows = steps.flatMap((step) => {
    const links = step.leanedOn.filter((link) => link.role !== 'source');
    const own = valueCells(step, Math.max(1, links.length));
    if (links.length === 0)
      return [
        `<tr>${own}<td colspan="3" class="quiet">${escaped(step.rootKind ?? 'the chain ends here')}</td></tr>`,
      ];
    return links.map((link, index) => `<tr>${index === 0 ? own : ''}${linkCells(link)}</tr>`);
  });
  return table(
    ['Weight', 'Certificate', 'Deviation and U', 'Leaned on, used', 'Flow', 'Checks of the link'],
    rows,
  );
}

function valueCells(step: StatementStep, rows: number): string {
  const span = rows > 1 ? ` rowspan="${rows}"` : '';
  const what = `${nominalText(step.nominal)}${step.class ? ` ${step.class}` : ''}`;
  const state = step.state === 'in force' ? '' : `<small>${escaped(step.state)}</small>`;
  return (
    `<th scope="row"${span}><b>${escaped(step.registryNo)}</b><small>${escaped(what)}</small><small>${escaped(step.holder ?? step.issuer)}</small></th>` +
    `<td${span} class="mono">${escaped(step.certificateNo)}<small>determined ${escaped(step.determinedOn)}</small>${state}</td>` +
    `<td${span} class="serif">${numberOf(step)}<small>${escaped(step.quantity)}${step.k === null ? '' : `, k = ${escaped(step.k)}`}</small></td>`
  );
}

function linkCells(link: StatementStep['leanedOn'][number]): string {
  const days =
    link.usedBegin === null
      ? ''
      : link.usedEnd === link.usedBegin
        ? link.usedBegin
        : `${link.usedBegin} to ${link.usedEnd}`;
  const judged =
    link.role === 'informs'
      ? '<span class="quiet">informs</span>'
      : stateWord('at use', link.conduct) + stateWord('today', link.today);
  const flow = link.role === 'informs' ? '–' : link.flow === null ? 'unknown' : shareText(link.flow);
  return `<td class="mono">${wholeNames(link.name)}<small>${escaped(days)}</small></td><td class="number">${escaped(flow)}</td><td>${judged}</td>`;
}

function stateWord(when: string, state: State): string {
  return `<span class="stands ${STATE_INKS[state]}">${when} ${escaped(state)}</span> `;
}

function ruleTable({ checks }: StatementResponse): string {
  return table(
    ['Rule', 'Asks, and where it comes from', 'Known at use', 'Known now'],
    ruleCounts(checks).map(
      (count) =>
        `<tr><th scope="row" class="mono">${escaped(count.rule)}</th><td>${escaped(count.title)}<small>${escaped(count.clause)}</small></td><td>${escaped(count.conduct)}</td><td>${escaped(count.today)}</td></tr>`,
    ),
  );
}

function findings({ checks }: StatementResponse): string {
  const found = checks.filter(({ outcome }) => outcome === 'fails' || outcome === 'cannot be judged');
  if (found.length === 0) return '<p>No check fails, and none is left unjudged.</p>';
  const rows = found.map((check) => {
    const state = stateOfOutcome(check.outcome, check.severity);
    const words = check.words ?? `${check.title}. The words are not for this reader.`;
    return `<tr><th scope="row" class="mono">${escaped(check.rule)}</th><td class="mono">${wholeNames(check.about)}</td><td><span class="${STATE_INKS[state]}">${check.outcome}</span><small>${check.verdict === 'conduct' ? 'at use' : 'today'}, ${check.severity}</small></td><td>${escaped(words)}</td></tr>`;
  });
  return `<h3>What failed or could not be judged</h3>${table(['Rule', 'About', 'Outcome', 'In words'], rows)}`;
}

/** Names around an arrow, each unparted at a line's end unless it is long, as that of a shared effect. */
function wholeNames(about: string): string {
  return about
    .split(' → ')
    .map((name) =>
      name.length > LONGEST_WHOLE ? escaped(name) : `<span class="whole">${escaped(name)}</span>`,
    )
    .join(' → ');
}

function table(heads: readonly string[], rows: readonly string[]): string {
  const head = heads.map((text) => `<th scope="col">${text}</th>`).join('');
  return `<div class="table" tabindex="0" role="region" aria-label="Table"><table><thead><tr>${head}</tr></thead><tbody>${rows.join('')}</tbody></table></div>`;
}

/** The hash, and what is made of it: by the page itself where scripts run, by hand where they do not. */
function verification({ sha256 }: Content, said: string): string {
  return (
    '<footer><section><h2>Is it unchanged?</h2>' +
    `<p id="verdict" data-content="${sha256}" data-said="${said}">Scripts are off: this page has not verified itself. By hand it takes one command.</p>` +
    `<p>SHA-256 of the chain’s data in this page<br><code id="sha256">${sha256}</code></p>` +
    '<p class="quiet">By hand: open this file in a text editor, copy everything between the tag that has id="chain" and the closing tag after it, without a line break at its end, into a file, and compute its SHA-256, for example with <code>sha256sum</code>. The register gives the same bytes as chain.json for the same question and the same reader. A page can be changed together with its hash: compare the hash with the one in the file’s name, or ask the register.</p>' +
    '</section></footer>\n'
  );
}
