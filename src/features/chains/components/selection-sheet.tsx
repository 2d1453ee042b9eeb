import type { ChainResponse } from '#shared/contracts/chains.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Stack } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { SideSheet } from '#src/components/ui/dialog.tsx';
import { Coverage, Quantity } from '#src/components/ui/quantity.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { stateOfValue } from '#shared/states.ts';
import { linkKey } from '#shared/drawing/drawing-question.ts';
import { shareText } from '#shared/numbers/share-text.ts';
import { CheckList } from './check-list.tsx';
import { toPlain } from './contributions.tsx';
import { namesOf } from '#shared/drawing/link-order.ts';

interface SelectionSheetProps {
  chain: ChainResponse;
  /** A node's uid, or a link's key. */
  at: string;
  onClose: () => void;
  /** Links to other screens, made by the route: a feature knows no other. */
  actionsFor: (node: ValueNode) => React.ReactNode;
}

type Node = ChainResponse['nodes'][number];
export type ValueNode = Extract<Node, { type: 'value' }>;

/** What is behind a plate or a link: the calibration, its numbers with their origins, and every check. */
export function SelectionSheet({ chain, at, onClose, actionsFor }: SelectionSheetProps) {
  const link = chain.links.find((candidate) => linkKey(candidate) === at);
  const node = chain.nodes.find((candidate) => candidate.uid === at);
  if (link) return <LinkSheet chain={chain} link={link} onClose={onClose} />;
  if (node?.type === 'value')
    return <ValueSheet chain={chain} node={node} onClose={onClose} actionsFor={actionsFor} />;
  if (node?.type === 'source') return <SourceSheet node={node} onClose={onClose} />;
  return null;
}

function ValueSheet({
  chain,
  node,
  onClose,
  actionsFor,
}: { chain: ChainResponse; node: ValueNode } & Pick<SelectionSheetProps, 'onClose' | 'actionsFor'>) {
  const { decimalMark } = usePreferences();
  const checks = chain.checks.filter(
    (check) => check.subject.type === 'value' && check.subject.uid === node.uid,
  );
  return (
    <SideSheet isLeftWhereNarrow title={node.registryNo} onClose={onClose}>
      <Stack gap="loose">
        <p className="text-lg">
          <Quantity
            value={node.deviation}
            expandedUncertainty={node.expandedU}
            coverageFactor={node.k}
            kind="deviation"
            shownIn="auto"
            face="serif"
          />
          {node.k && (
            <span className="ml-2 text-sm text-ink-2">
              <Coverage coverageFactor={node.k} />
            </span>
          )}
        </p>
        <Facts
          facts={[
            [
              'Certificate',
              <span
                key="c"
                className="font-mono text-sm"
              >{`${node.certificateNo}${node.revisionN > 1 ? `, revision ${node.revisionN}` : ''}`}</span>,
            ],
            ['By', node.issuer.name],
            ['Held by', node.holder?.name],
            ['Kind', `${node.quantity}, in ${node.medium}${node.stage ? `, ${node.stage}` : ''}`],
            ['Root', node.rootKind],
            ['Determined', <DateText key="d" value={node.performedEnd} />],
            ['Issued', <DateText key="i" value={node.issuedOn} />],
            [
              'Stands',
              <StateMark
                key="s"
                state={stateOfValue(node.state)}
              >{`${node.state}${node.stateSince ? ` since ${node.stateSince}` : ''}`}</StateMark>,
            ],
            ['As now known', node.now && <NowKnown key="n" node={node} />],
            ['Scale', node.scaleVersion],
            ['u stated', <StandardU key="us" value={node.uStated} />],
            ['u carried', node.view === 'full' ? <StandardU key="uc" value={node.uCarried} /> : null],
            [
              'u now',
              node.view === 'full' ? (
                <span key="un">
                  <StandardU value={node.uNow} /> <span className="text-ink-3">{node.uOrigin}</span>
                </span>
              ) : null,
            ],
            ['Share', node.share === null ? 'unknown' : shareText(node.share, decimalMark)],
            ['Own share', node.localShare === null ? 'unknown' : shareText(node.localShare, decimalMark)],
          ]}
        />
        {actionsFor(node)}
        {node.view === 'statement' && (
          <p className="text-sm text-ink-2">
            Another laboratory’s standard: shown as a traceability statement shows it.
          </p>
        )}
        <Section title="Checks">
          <CheckList chain={chain} checks={checks} />
        </Section>
      </Stack>
    </SideSheet>
  );
}

/** What the value is held to be now: moved by what changed above it, or by its own replacement. */
function NowKnown({ node }: { node: ValueNode }) {
  const { deviation, because } = node.now!;
  if (deviation === null) return <>not computable, because {because}</>;
  return (
    <Quantity
      value={deviation}
      expandedUncertainty={node.expandedU}
      coverageFactor={node.k}
      kind="deviation"
      shownIn="auto"
      hidesUncertainty
    />
  );
}

function LinkSheet({
  chain,
  link,
  onClose,
}: {
  chain: ChainResponse;
  link: ChainResponse['links'][number];
  onClose: () => void;
}) {
  const { decimalMark } = usePreferences();
  const names = namesOf(chain);
  const checks = chain.checks.filter(
    ({ subject }) =>
      subject.type === 'link' && subject.childUid === link.childUid && subject.parentUid === link.parentUid,
  );
  const childs = chain.checks.filter(
    (check) => check.subject.type === 'value' && check.subject.uid === link.childUid,
  );
  return (
    <SideSheet
      isLeftWhereNarrow
      title={`${names.get(link.parentUid)} → ${names.get(link.childUid)}`}
      onClose={onClose}
    >
      <Stack gap="loose">
        <Facts
          facts={[
            ['Used', link.usedBegin && <Span key="u" from={link.usedBegin} to={link.usedEnd!} />],
            ['Used as', link.usedAs],
            ['Sensitivity', link.sensitivity.toPrecision(6).replace('-', '\u2212')],
            [
              'Flow',
              link.role === 'informs'
                ? 'none: it informs'
                : link.flow === null
                  ? 'unknown'
                  : shareText(link.flow, decimalMark, 2),
            ],
            ['At use', link.role === 'reference' ? <StateMark key="c" state={link.conduct} /> : null],
            ['Today', link.role === 'reference' ? <StateMark key="t" state={link.today} /> : null],
          ]}
        />
        <Section title="Checks of this step">
          <CheckList chain={chain} checks={checks} />
        </Section>
        {childs.length > 0 && (
          <Section title={`Checks of ${names.get(link.childUid)}`}>
            <CheckList chain={chain} checks={childs} />
          </Section>
        )}
      </Stack>
    </SideSheet>
  );
}

function SourceSheet({ node, onClose }: { node: Extract<Node, { type: 'source' }>; onClose: () => void }) {
  const { decimalMark } = usePreferences();
  return (
    <SideSheet isLeftWhereNarrow title={node.name} onClose={onClose}>
      <Facts
        facts={[
          ['Kind', node.kind],
          ['Of', node.registryNo && <span className="font-mono text-sm">{node.registryNo}</span>],
          ['u', node.u === null ? null : <Quantity key="u" value={node.u.toPrecision(6)} unit={node.unit} />],
          ['Share', node.share === null ? 'unknown' : shareText(node.share, decimalMark)],
        ]}
      />
    </SideSheet>
  );
}

function Span({ from, to }: { from: string; to: string }) {
  if (from === to) return <DateText value={to} />;
  return (
    <>
      <DateText value={from} /> to <DateText value={to} />
    </>
  );
}

/** A standard uncertainty in grams; a double, so it is written by its own two digits. */
function StandardU({ value }: { value: number | null }) {
  return value === null ? (
    <span className="text-ink-3">unknown</span>
  ) : (
    <Quantity value={toPlain(value)} kind="uncertainty" coverageFactor={1} shownIn="auto" />
  );
}
