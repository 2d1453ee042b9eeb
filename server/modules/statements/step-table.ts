import type { StatementResponse, StatementStep } from '#shared/contracts/statements.ts';
import { STATE_INKS } from '#shared/drawing/state-glyphs.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { span, type Sheet } from '#server/print/sheet.ts';
import { setTable, type Cell, type Column } from '#server/print/table.ts';
import { setQuantity } from './set-quantity.ts';

const SIZE = 8.2;
const SMALL = 7.2;

const COLUMNS: readonly Column[] = [
  { head: 'Weight', parts: 20 },
  { head: 'Certificate', parts: 25 },
  { head: 'Deviation and U', parts: 22 },
  { head: 'Leaned on, used', parts: 28 },
  { head: 'Flow', parts: 8, align: 'right' },
  { head: 'Checks of the link', parts: 18 },
];

/** Every step of the chain as a table: one row a link, the value's own facts on its first. */
export function setSteps(sheet: Sheet, { steps }: StatementResponse): void {
  sheet.heading('The chain as a table');
  setTable(sheet, COLUMNS, steps.flatMap(rowsOf), 10.8);
}

function rowsOf(step: StatementStep): Cell[][] {
  const links = step.leanedOn.filter((link) => link.role !== 'source');
  if (links.length === 0)
    return [[...valueCells(step), [[]], [[]], [[span(endWords(step), SIZE, 'sans', 'ink-2')]]]];
  return links.map((link, index) => [
    ...(index === 0 ? valueCells(step) : [[[]], [[]], [[]]]),
    linkCell(link),
    [
      [
        span(
          link.role === 'informs' ? '–' : link.flow === null ? 'unknown' : shareText(link.flow),
          SIZE,
          'serif',
        ),
      ],
    ],
    link.role === 'informs'
      ? [[span('informs', SIZE, 'sans', 'ink-2')]]
      : [
          [span(`at use ${link.conduct}`, SMALL, 'sans', STATE_INKS[link.conduct])],
          [span(`today ${link.today}`, SMALL, 'sans', STATE_INKS[link.today])],
        ],
  ]);
}

function endWords(step: StatementStep): string {
  return step.rootKind === null ? 'the chain ends here' : step.rootKind;
}

function valueCells(step: StatementStep): Cell[] {
  const what = `${nominalText(step.nominal)}${step.class ? ` ${step.class}` : ''}`;
  return [
    [
      [span(step.registryNo, SIZE, 'mono')],
      [span(what, SMALL, 'sans', 'ink-2')],
      [span(step.holder ?? step.issuer, SMALL, 'sans', 'ink-2')],
    ],
    [
      [span(step.certificateNo, SIZE, 'mono')],
      [span(`determined ${step.determinedOn}`, SMALL, 'sans', 'ink-2')],
      ...(step.state === 'in force' ? [] : [[span(step.state, SMALL, 'sans', 'caution')]]),
    ],
    [
      setQuantity(
        {
          value: step.deviation,
          expandedUncertainty: step.expandedU,
          coverageFactor: step.k,
          kind: 'deviation',
          shownIn: 'auto',
        },
        9.4,
      ),
      [span(step.quantity, SMALL, 'sans', 'ink-2')],
      [span(step.k === null ? 'U not stated' : `k = ${step.k}`, SMALL, 'sans', 'ink-2')],
    ],
  ];
}

function linkCell(link: StatementStep['leanedOn'][number]): Cell {
  const days =
    link.usedBegin === null
      ? []
      : [
          [
            span(
              link.usedEnd === link.usedBegin ? link.usedBegin : `${link.usedBegin} to ${link.usedEnd}`,
              SMALL,
              'sans',
              'ink-2',
            ),
          ],
        ];
  return [[span(link.name, SIZE, 'mono')], ...days];
}
