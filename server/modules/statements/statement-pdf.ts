import type { ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery, StatementResponse } from '#shared/contracts/statements.ts';
import { STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { prose, Sheet, span } from '#server/print/sheet.ts';
import { setTable, type Cell, type Column } from '#server/print/table.ts';
import { ruleCounts } from './check-rows.ts';
import { contentOf } from './content.ts';
import { pictureOfChain, type DrawnDocument } from './drawing.ts';
import { createdOn, footOf } from './foot.ts';
import { setQuantity } from './set-quantity.ts';
import { focusOf, statementOf } from './statement.ts';
import { setSteps } from './step-table.ts';

const TEXT = 9.6;
/** Prose is set in the serif, a little larger: its figures stand higher there. */
const PROSE = 10.4;
const SMALL = 8.2;
/** A drawing smaller than this on an upright page is turned on its side. */
const LEAST_SCALE = 0.62;
/** Below this the words of a plate are smaller than print that is read without a glass. */
const READABLE_SCALE = 0.45;

/** The statement of traceability on paper: in words, as a table, drawn, with its checks and what it does not say. */
export async function statementPdf(chain: ChainResponse, query: StatementQuery): Promise<Buffer> {
  const statement = statementOf(chain, query);
  const { sha256 } = contentOf(statement);
  const sheet = new Sheet({
    title: `Statement of traceability of ${statement.title}`,
    subject: statement.asked,
    keywords: `sha256 ${sha256}`,
    created: createdOn(chain),
    foot: footOf(chain, query, sha256),
  });
  setHead(sheet, chain, statement);
  setWords(sheet, statement);
  setNotSaid(sheet, statement);
  setSteps(sheet, statement);
  setDrawing(sheet, pictureOfChain(chain, query));
  sheet.addPage();
  setShares(sheet, statement);
  setChecks(sheet, statement);
  setHash(sheet, statement, sha256);
  return sheet.finish();
}

function setHead(sheet: Sheet, chain: ChainResponse, statement: StatementResponse): void {
  const focus = focusOf(chain);
  sheet.paragraph([span('Statement of traceability', 11, 'sans', 'ink-2')], { leading: 16, after: 2 });
  sheet.paragraph([span(statement.title, 23, 'serif')], { leading: 29, after: 2 });
  sheet.paragraph(
    [
      ...setQuantity(
        {
          value: focus.deviation,
          expandedUncertainty: focus.expandedU,
          coverageFactor: focus.k,
          kind: 'deviation',
          shownIn: 'auto',
        },
        15,
      ),
    ],
    { leading: 20, after: 0 },
  );
  const k = focus.k === null ? 'U not stated' : `k = ${focus.k}`;
  sheet.paragraph([span(`${focus.quantity}, deviation from nominal; ${k}`, TEXT, 'sans', 'ink-2')], {
    after: 2,
  });
  const held = focus.holder ? `${focus.holder.name} · ` : '';
  sheet.paragraph(
    [
      span(
        `${held}certificate ${focus.certificateNo}, issued ${focus.issuedOn} by ${focus.issuer.name}`,
        TEXT,
        'sans',
        'ink-2',
      ),
    ],
    { after: 2 },
  );
  sheet.paragraph([span(statement.asked, TEXT, 'sans', 'ink-2')], { after: 8 });
  sheet.rule('ink', 0.7);
  sheet.y += 6;
}

function setWords(sheet: Sheet, statement: StatementResponse): void {
  for (const sentence of statement.summary) sheet.paragraph(prose(sentence, PROSE), { after: 3 });
  sheet.heading('The chain in words');
  for (const step of statement.steps) {
    if (step.words !== null) sheet.paragraph(prose(unparted(step.words, statement), PROSE), { after: 7 });
  }
  const untold = statement.steps.filter((step) => step.words === null).length;
  if (untold > 0)
    sheet.paragraph(
      prose(
        `${untold} further ${untold === 1 ? 'value stands' : 'values stand'} in the table: through each of them passes less than 1\u2009% of the variance, and no check of them fails.`,
        PROSE,
      ),
    );
  sheet.paragraph(prose(`At the top stands ${statement.definition}.`, PROSE));
}

/** Numbers of weights and certificates are not parted at a line's end. */
function unparted(words: string, { steps }: StatementResponse): string {
  const numbers = steps.flatMap((step) => [step.registryNo, step.certificateNo]);
  return numbers
    .filter((number) => number.includes(' '))
    .reduce((text, number) => text.replaceAll(number, number.replaceAll(' ', '\u00a0')), words);
}

function setNotSaid(sheet: Sheet, statement: StatementResponse): void {
  sheet.heading('What this statement does not say');
  for (const sentence of statement.notSaid) sheet.paragraph(prose(sentence, PROSE), { after: 3 });
}

/** On an upright page where it can be read there, else on a page of its own on its side. */
function setDrawing(sheet: Sheet, { picture, legend }: DrawnDocument): void {
  const isWide = sheet.width / picture.width < LEAST_SCALE && picture.width > picture.height;
  sheet.addPage(isWide ? 'landscape' : 'portrait');
  sheet.heading('The chain, drawn');
  sheet.paragraph([span(legend, SMALL, 'sans', 'ink-2')], { leading: 11.5, after: 10 });
  if (sheet.scaleOf(picture) < READABLE_SCALE) {
    const words =
      'It is drawn small to fit this page. The register gives the same drawing as a page of its own size.';
    sheet.paragraph([span(words, SMALL, 'sans', 'ink-2')], { leading: 11.5, after: 10 });
  }
  sheet.picture(picture);
}

const SHARE_COLUMNS: readonly Column[] = [
  { head: 'Root or shared effect', parts: 40 },
  { head: 'Kind', parts: 40 },
  { head: 'Share of the variance', parts: 20, align: 'right' },
];

function setShares(sheet: Sheet, { rootShares, sharedEffects, scaleVersions }: StatementResponse): void {
  sheet.heading('Where the variance comes in');
  const row = (name: string, kind: string, share: number | null, face: 'mono' | 'sans'): Cell[] => [
    [[span(name, SMALL, face)]],
    [[span(kind, SMALL, 'sans', 'ink-2')]],
    [[span(share === null ? 'unknown' : shareText(share), SMALL, 'serif')]],
  ];
  setTable(sheet, SHARE_COLUMNS, [
    ...rootShares.map((root) => row(root.registryNo, root.rootKind, root.share, 'mono')),
    ...sharedEffects.map((effect) => row(effect.name, 'shared effect', effect.share, 'sans')),
  ]);
  const scales =
    scaleVersions.length === 0
      ? 'No value of this chain names a version of the mass scale.'
      : `Versions of the mass scale in this chain: ${scaleVersions.join('; ')}.`;
  sheet.paragraph(prose(scales, PROSE));
}

const RULE_COLUMNS: readonly Column[] = [
  { head: 'Rule', parts: 9 },
  { head: 'Asks, and where it comes from', parts: 49 },
  { head: 'By what was known at use', parts: 21 },
  { head: 'By what is known now', parts: 21 },
];
const FINDING_COLUMNS: readonly Column[] = [
  { head: 'Rule', parts: 8 },
  { head: 'About', parts: 26 },
  { head: 'Outcome', parts: 20 },
  { head: 'In words', parts: 46 },
];

function setChecks(sheet: Sheet, { checks }: StatementResponse): void {
  sheet.heading('The checks');
  setTable(
    sheet,
    RULE_COLUMNS,
    ruleCounts(checks).map((count) => [
      [[span(count.rule, SMALL, 'mono')]],
      [[span(count.title, SMALL)], [span(count.clause, SMALL - 0.8, 'sans', 'ink-3')]],
      [[span(count.conduct, SMALL)]],
      [[span(count.today, SMALL)]],
    ]),
    11,
  );
  const findings = checks.filter(({ outcome }) => outcome === 'fails' || outcome === 'cannot be judged');
  sheet.heading('What failed or could not be judged', 12);
  if (findings.length === 0) {
    sheet.paragraph(prose('Nothing.', PROSE));
    return;
  }
  setTable(
    sheet,
    FINDING_COLUMNS,
    findings.map((check) => [
      [[span(check.rule, SMALL, 'mono')]],
      [[span(check.about, SMALL - 0.4, 'mono')]],
      [
        [span(check.outcome, SMALL, 'sans', STATE_INKS[stateOfOutcome(check.outcome, check.severity)])],
        [
          span(
            `${check.verdict === 'conduct' ? 'at use' : 'today'}, ${check.severity}`,
            SMALL - 0.8,
            'sans',
            'ink-3',
          ),
        ],
      ],
      [[span(check.words ?? `${check.title}. The words are not for this reader.`, SMALL)]],
    ]),
    11,
  );
}

function setHash(sheet: Sheet, statement: StatementResponse, sha256: string): void {
  sheet.heading('How to verify', 12);
  sheet.paragraph(
    prose(
      'This document is made from data that the register gives as JSON for the same question and the same reader. SHA-256 of that statement, and of the chain it was made from:',
      PROSE,
    ),
  );
  sheet.paragraph([span(`statement  ${sha256}`, SMALL, 'mono')], { after: 1, leading: 12 });
  sheet.paragraph([span(`chain      ${statement.chainSha256}`, SMALL, 'mono')], { leading: 12 });
}
