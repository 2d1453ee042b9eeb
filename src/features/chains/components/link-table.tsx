import { Fragment, useState } from 'react';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Cell, Head, Row, RowButton, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { drawnPart } from '#shared/drawing/drawn-part.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import { linksUpwards, namesOf } from '#shared/drawing/link-order.ts';
import type { ChainQuestion } from '../question.ts';
import {
  nextOrder,
  rulesOfLinks,
  rulesText,
  sortedLinks,
  type LinkOrder,
  type RulesFound,
  type SortColumn,
} from './sorted-links.ts';
import { shareText } from '#shared/numbers/share-text.ts';

interface LinkTableProps {
  chain: ChainResponse;
  question: ChainQuestion;
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** The same facts as the drawing, one row per link from the weight upwards. */
export function LinkTable({ chain: whole, question, onChange }: LinkTableProps) {
  const { chain, leftOut } = drawnPart(whole, question.effects);
  const { decimalMark } = usePreferences();
  const names = namesOf(chain);
  const [order, setOrder] = useState<LinkOrder | null>(null);
  const shown = linksUpwards(chain).filter(
    (link) => question.only !== 'fails' || ['broken', 'caution'].includes(link[question.verdict]),
  );
  const rows = sortedLinks(shown, order, names, question.verdict);
  const rules = rulesOfLinks(chain, question.verdict);
  const sorting = (by: SortColumn) => ({
    sort:
      order?.by !== by
        ? ('none' as const)
        : order.isDescending
          ? ('descending' as const)
          : ('ascending' as const),
    onSort: () => setOrder(nextOrder(order, by)),
  });
  return (
    <Table caption="Links of the chain">
      <thead>
        <tr>
          <Head {...sorting('link')}>Link</Head>
          <Head className="max-sm:hidden" {...sorting('used')}>
            Used
          </Head>
          <Head align="right" {...sorting('flow')}>
            Flow
          </Head>
          <Head {...sorting('judged')}>Judged</Head>
        </tr>
      </thead>
      <tbody>
        {rows.map((link) => (
          <Row key={linkKey(link)} isSelected={linkKey(link) === question.at}>
            <Cell className="font-mono text-sm">
              <RowButton onClick={() => onChange({ at: linkKey(link) })}>
                {/* The name of a shared effect, a notice above all, may be long: it breaks. */}
                <span className={link.role === 'source' ? '' : 'whitespace-nowrap'}>
                  {names.get(link.parentUid)}
                </span>{' '}
                <span className="whitespace-nowrap">→ {names.get(link.childUid)}</span>
              </RowButton>
            </Cell>
            <Cell className="max-sm:hidden">{link.usedEnd ? <DateText value={link.usedEnd} /> : ''}</Cell>
            <Cell align="right" className="whitespace-nowrap">
              {flowText(link, decimalMark)}
            </Cell>
            <Cell>
              <Judged chain={chain} link={link} verdict={question.verdict} />
              <Rules found={rules.get(linkKey(link))} isNoted={link[question.verdict] === 'sound'} />
            </Cell>
          </Row>
        ))}
        {rows.length === 0 && (
          <Row>
            <Cell colSpan={4}>
              {chain.links.length === 0
                ? 'This value is itself a root: it leans on nothing.'
                : 'No link fails a check.'}
            </Cell>
          </Row>
        )}
        {leftOut > 0 && question.only !== 'fails' && (
          <Row>
            <Cell colSpan={4}>
              <RowButton onClick={() => onChange({ effects: 'all' })}>
                and {leftOut} shared {leftOut === 1 ? 'effect' : 'effects'} below 1 %
              </RowButton>
            </Cell>
          </Row>
        )}
      </tbody>
    </Table>
  );
}

/** Which rules a link fails or leaves open, by number; a press on the row says them in words. Some are worth a note only. */
function Rules({ found, isNoted }: { found: RulesFound | undefined; isNoted: boolean }) {
  const text = found ? rulesText(found) : '';
  if (text === '') return null;
  return (
    <span className="block text-xs text-ink-2">
      {isNoted && 'noted: '}
      {/* A rule's number is not parted at its hyphen. */}
      {text.split(' ').map((word, at) => (
        <Fragment key={at}>
          {at > 0 && ' '}
          <span className="whitespace-nowrap">{word}</span>
        </Fragment>
      ))}
    </span>
  );
}

type Link = ChainResponse['links'][number];

interface JudgedProps {
  chain: ChainResponse;
  link: Link;
  verdict: ChainQuestion['verdict'];
}

/** How the link stands; one that lies after the day, or after what was known, is not judged before it was made. */
function Judged({ chain, link, verdict }: JudgedProps) {
  if (link.role !== 'reference')
    return <span className="text-ink-3">{link.role === 'informs' ? 'informs' : 'shared'}</span>;
  const before = beforeLink(chain, link);
  return before ? <span className="text-ink-3">{before}</span> : <StateMark state={link[verdict]} />;
}

function beforeLink(chain: ChainResponse, link: Link): string | null {
  const { day } = chain.question;
  if (link.usedBegin !== null && link.usedBegin > day) return 'not yet made';
  const child = chain.nodes.find((node) => node.uid === link.childUid);
  const isUnknown = child?.type === 'value' && child.state === 'not yet in force' && child.issuedOn <= day;
  return isUnknown ? 'not yet recorded' : null;
}

function flowText(link: Link, decimalMark: '.' | ','): string {
  if (link.role === 'informs') return '–';
  return link.flow === null ? 'unknown' : shareText(link.flow, decimalMark);
}
