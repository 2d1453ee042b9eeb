import type { ChainLink, ChainResponse } from '#shared/contracts/chains.ts';
import type { StatementQuery } from '#shared/contracts/statements.ts';
import { STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { datedTo } from '#shared/numbers/dated-to.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { prose, Sheet, span } from '#server/print/sheet.ts';
import { setTable, type Cell, type Column } from '#server/print/table.ts';
import { contentOf } from './content.ts';
import { createdOn, footOf } from './foot.ts';
import { massBranch, type BranchStep } from './mass-branch.ts';
import { notSaid } from './not-said.ts';
import { setQuantity } from './set-quantity.ts';
import { focusOf } from './statement.ts';
import { definitionWords, weightWords } from './words.ts';

const SIZE = 8.8;
const SMALL = 7.6;

/** How a reference's value was taken, in the room of a column. */
const TAKEN: Readonly<Record<NonNullable<ChainLink['usedAs']>, string>> = {
  certificate: 'as certified',
  'by notice': 'as corrected by a notice',
  'class limit': 'as the limit of its class',
  fit: 'as predicted',
  bracketing: 'as a bracketing mean',
};

const COLUMNS: readonly Column[] = [
  { head: 'Weight, calibrated by', parts: 22 },
  { head: 'Certificate', parts: 24.5 },
  { head: 'Deviation and U', parts: 26 },
  { head: 'Leaned on the next', parts: 28 },
  { head: 'Share', parts: 9, align: 'right' },
  { head: 'Checks', parts: 15 },
];

/** The chain's mass branch on paper, from the weight up to the SI, one step a row. */
export async function stripPdf(chain: ChainResponse, query: StatementQuery): Promise<Buffer> {
  const { sha256 } = contentOf(chain);
  const focus = focusOf(chain);
  const sheet = new Sheet({
    title: `Strip of the chain of ${weightWords(focus)}`,
    subject: 'The mass branch of a traceability chain, one step a row',
    keywords: `sha256 ${sha256}`,
    created: createdOn(chain),
    foot: footOf(chain, query, sha256),
  });
  const steps = massBranch(chain);
  sheet.paragraph([span(weightWords(focus), 19, 'serif')], { leading: 25, after: 0 });
  sheet.paragraph(
    [
      span(
        `The mass branch of its chain, from the weight up to the SI: ${steps.length} ${steps.length === 1 ? 'value' : 'values'}. At each step the reference through which most of the variance flows.`,
        9.5,
        'sans',
        'ink-2',
      ),
    ],
    { leading: 13, after: 10 },
  );
  setTable(sheet, COLUMNS, steps.map(rowOf), 11.5);
  sheet.paragraph(prose(`At the top: ${definitionWords(chain.definition)}.`, 10.4), { after: 8 });
  sheet.paragraph([span(notSaid(chain).slice(0, 3).join(' '), SMALL, 'sans', 'ink-2')], { leading: 11 });
  return sheet.finish();
}

function rowOf({ value, link, others }: BranchStep): Cell[] {
  const stands =
    value.state === 'in force' ? [] : [[span(value.state, SMALL, 'sans', stateInk(value.state))]];
  const what = value.rootKind ?? `${nominalText(value.nominal)}${value.class ? ` ${value.class}` : ''}`;
  return [
    [
      [span(value.registryNo, SIZE, 'mono')],
      [span(what, SMALL, 'sans', 'ink-2')],
      [span(value.issuer.name, SMALL, 'sans', 'ink-2')],
    ],
    [
      [span(value.certificateNo, SIZE, 'mono')],
      [span(`determined ${datedTo(value.performedEnd, value.datePrecision)}`, SMALL, 'sans', 'ink-2')],
      [span(`issued ${value.issuedOn}`, SMALL, 'sans', 'ink-2')],
      ...stands,
    ],
    [
      setQuantity(
        {
          value: value.deviation,
          expandedUncertainty: value.expandedU,
          coverageFactor: value.k,
          kind: 'deviation',
          shownIn: 'auto',
        },
        9.6,
      ),
      [span(value.quantity, SMALL, 'sans', 'ink-2')],
      [span(value.k === null ? 'U not stated' : `k = ${value.k}`, SMALL, 'sans', 'ink-2')],
    ],
    usedCell(link, others),
    [[span(value.share === null ? 'unknown' : shareText(value.share), SIZE, 'serif')]],
    link === null
      ? [[span(value.rootKind === null ? 'the chain ends here' : 'a root', SMALL, 'sans', 'ink-2')]]
      : [
          [span(`at use ${link.conduct}`, SMALL, 'sans', STATE_INKS[link.conduct])],
          [span(`today ${link.today}`, SMALL, 'sans', STATE_INKS[link.today])],
        ],
  ];
}

function usedCell(link: ChainLink | null, others: readonly ChainLink[]): Cell {
  if (link === null) return [[]];
  const days = link.usedEnd === link.usedBegin ? link.usedEnd : `${link.usedBegin} to ${link.usedEnd}`;
  const beside =
    others.length === 0 ? [] : [[span(`and ${others.length} more beside`, SMALL, 'sans', 'ink-2')]];
  return [
    [span(days === null ? '' : days, SMALL)],
    [span(TAKEN[link.usedAs ?? 'certificate'], SMALL, 'sans', 'ink-2')],
    ...beside,
  ];
}

function stateInk(state: 'superseded' | 'withdrawn' | 'not yet in force') {
  return ({ superseded: 'caution', withdrawn: 'broken', 'not yet in force': 'unjudged' } as const)[state];
}
