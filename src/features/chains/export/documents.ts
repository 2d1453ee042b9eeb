import type { StatementQuery } from '#shared/contracts/statements.ts';
import { getFile, type ReceivedFile } from '#src/lib/api-client.ts';
import type { ChainQuestion } from '../question.ts';
import { toPng } from './to-png.ts';

/** What can be taken along of a chain, in the order in which it is offered. */
export interface ChainDocument {
  id: string;
  label: string;
  /** What it is for, in a few words. */
  note: string;
  /** The file that the register makes; a PNG is drawn from it here. */
  file: string;
  /** Pixels of the PNG for one of the drawing. */
  scale?: 2 | 3;
}

export const CHAIN_DOCUMENTS: readonly ChainDocument[] = [
  {
    id: 'statement',
    label: 'Statement of traceability, PDF',
    note: 'in words, as a table and drawn, with its checks',
    file: 'statement.pdf',
  },
  {
    id: 'page',
    label: 'Page for offline, HTML',
    note: 'needs no connection and verifies itself',
    file: 'take-along.html',
  },
  { id: 'strip', label: 'Strip for paper, PDF', note: 'A4, one step a row up to the SI', file: 'strip.pdf' },
  { id: 'pdf', label: 'Drawing, PDF', note: 'one page of its own size', file: 'drawing.pdf' },
  { id: 'svg', label: 'Drawing, SVG', note: 'fonts in it, text stays text', file: 'drawing.svg' },
  { id: 'png2', label: 'Drawing, PNG', note: 'twice as fine as the screen', file: 'drawing.svg', scale: 2 },
  { id: 'png3', label: 'Drawing, PNG, large', note: 'three times as fine', file: 'drawing.svg', scale: 3 },
  { id: 'json', label: 'Chain, JSON', note: 'the same question, the same bytes', file: 'chain.json' },
  {
    id: 'statement-json',
    label: 'Statement, JSON',
    note: 'what the PDF says, as data',
    file: 'statement.json',
  },
];

/** Fetches a document of the chain as it is asked on the screen, on the ground that the screen has. */
export async function fetchDocument(
  document: ChainDocument,
  valueUid: string,
  question: ChainQuestion,
  isDark: boolean,
): Promise<ReceivedFile> {
  const theme = document.file.endsWith('.pdf') ? 'print' : isDark ? 'lamp' : 'paper';
  const file = await getFile(`/api/chains/${valueUid}/${document.file}`, {
    query: {
      ...askedOf(question),
      ...(document.file.startsWith('drawing') && { theme, with: question.with }),
    },
  });
  if (document.scale === undefined) return file;
  const name = file.name.replace(/\.svg$/, ` ${document.scale}x.png`);
  return { name, blob: await toPng(await file.blob.text(), document.scale) };
}

/** What of the screen's question a document is asked. */
function askedOf({
  day,
  known,
  as,
  verdict,
  draw,
  effects,
  only,
  fold,
  open,
}: ChainQuestion): Partial<StatementQuery> {
  return { day, known, as, verdict, draw, effects, only, fold, open };
}
