import { useQuery } from '@tanstack/react-query';
import type { DownstreamBy } from '#shared/contracts/downstream.ts';
import type { DryRunResponse } from '#shared/contracts/dry-runs.ts';
import { Link } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { Toolbar } from '#src/components/layout/columns.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { suppositionOf, whatIfQuery } from '../api.ts';
import {
  differenceOf,
  measured,
  MEASURES,
  pairGroups,
  tellingMeasure,
  wholeOf,
  type Measure,
} from '../compare-runs.ts';
import { GROUPED_BY, groupName, GROUPINGS } from '../groups.ts';
import { askedOfRun } from '../run-view.ts';
import { ratioText, roundedText } from '../rounded.ts';
import { OTHERS_BEYOND } from '../search.ts';

interface CompareScreenProps {
  one: DryRunResponse;
  other: DryRunResponse;
  by: DownstreamBy;
  /** Undefined: the first that tells them apart. */
  measure: Measure | undefined;
  onChange: (change: { by?: DownstreamBy; measure?: Measure }) => void;
}

/** Two kept dry runs side by side, both answered on the register of today. */
export function CompareScreen({ one, other, by, measure: asked, onChange }: CompareScreenProps) {
  const [ofOne, ofOther] = [useAnswer(one, by), useAnswer(other, by)];
  const measure =
    asked ?? (ofOne.data && ofOther.data ? tellingMeasure(ofOne.data, ofOther.data) : MEASURES[0]);
  const error = ofOne.error ?? ofOther.error;
  const isHidden = one.question === null || other.question === null;
  return (
    <Page
      title="Two dry runs side by side"
      sub={
        <>
          <RunLink run={one} /> and <RunLink run={other} />, as the register stands now
        </>
      }
    >
      {isHidden && <EmptyState>One of them names what is not yours to see.</EmptyState>}
      {error && <ErrorNotice error={error} />}
      {!isHidden && !error && (!ofOne.data || !ofOther.data) && <Waiting>Working both out</Waiting>}
      {ofOne.data && ofOther.data && (
        <>
          <Section title="In all" note={`weights of others: material beyond ${OTHERS_BEYOND} % of U`}>
            <Table caption="Both in all" isScrolled>
              <thead>
                <Heads first="" one={one} other={other} />
              </thead>
              <tbody>
                {MEASURES.map((each) => (
                  <MeasuredRow
                    key={each}
                    name={capital(each)}
                    measure={each}
                    one={measured(wholeOf(ofOne.data), each)}
                    other={measured(wholeOf(ofOther.data), each)}
                  />
                ))}
              </tbody>
            </Table>
          </Section>
          <Section title="Group by group">
            <Toolbar>
              <Switch
                label="Compared by"
                value={measure}
                onChange={(next) => onChange({ measure: next })}
                choices={MEASURES.map((value) => ({ value, label: capital(value) }))}
              />
              <Switch
                label="Grouped by"
                value={by}
                onChange={(next) => onChange({ by: next })}
                choices={GROUPINGS}
              />
            </Toolbar>
            <Table caption="Both, group by group" isScrolled>
              <thead>
                <Heads first={GROUPED_BY[by]} one={one} other={other} />
              </thead>
              <tbody>
                {pairGroups(ofOne.data.groups, ofOther.data.groups).map((pair) => (
                  <MeasuredRow
                    key={pair.key}
                    name={groupName(pair, by)}
                    measure={measure}
                    one={pair.one ? measured(pair.one, measure) : 'none'}
                    other={pair.other ? measured(pair.other, measure) : 'none'}
                  />
                ))}
              </tbody>
            </Table>
          </Section>
        </>
      )}
    </Page>
  );
}

function useAnswer(run: DryRunResponse, by: DownstreamBy) {
  const { question } = run;
  const view = { as: 'now', by, group: undefined, sort: 'word' } as const;
  const asked = question
    ? suppositionOf(question.changes, askedOfRun(run.savedOn, question, view))
    : { changes: [], threshold: 0, by, sort: 'word' as const };
  return useQuery({ ...whatIfQuery(asked), enabled: question !== null });
}

function RunLink({ run }: { run: DryRunResponse }) {
  return (
    <Link to={paths.dryRun.href(run.id)} className="text-ink underline underline-offset-3">
      {run.name}
    </Link>
  );
}

function Heads({ first, one, other }: { first: string; one: DryRunResponse; other: DryRunResponse }) {
  return (
    <tr>
      <Head>{first === '' ? <span className="sr-only">Measure</span> : first}</Head>
      <Head align="right">{one.name}</Head>
      <Head align="right">{other.name}</Head>
      <Head align="right">Second less first</Head>
    </tr>
  );
}

interface MeasuredRowProps {
  name: string;
  measure: Measure;
  /** Null where it is not told; `none` where nothing of the group leans on what is supposed. */
  one: number | null | 'none';
  other: number | null | 'none';
}

function MeasuredRow({ name, measure, one, other }: MeasuredRowProps) {
  return (
    <Row>
      <Cell isHeading>{name}</Cell>
      <Cell align="right">
        <MeasuredText value={one} measure={measure} />
      </Cell>
      <Cell align="right">
        <MeasuredText value={other} measure={measure} />
      </Cell>
      <Cell align="right">
        <MeasuredText
          value={differenceOf(one === 'none' ? null : one, other === 'none' ? null : other)}
          measure={measure}
          isSigned
        />
      </Cell>
    </Row>
  );
}

function MeasuredText({
  value,
  measure,
  isSigned = false,
}: {
  value: MeasuredRowProps['one'];
  measure: Measure;
  isSigned?: boolean;
}) {
  const { decimalMark } = usePreferences();
  if (value === 'none') return <span className="text-ink-3">none</span>;
  if (value === null) return <span className="text-ink-3">not told</span>;
  if (measure === 'largest shift') {
    if (value === 0) return <>0</>;
    return <Quantity value={roundedText(value)} kind={isSigned ? 'deviation' : 'value'} shownIn="auto" />;
  }
  if (measure === 'largest shift/U') return <>{ratioText(value, { decimalMark, isSigned })}</>;
  return <>{isSigned && value > 0 ? `+${value}` : String(value).replace('-', '\u2212')}</>;
}

function capital(text: string): string {
  return text[0]!.toUpperCase() + text.slice(1);
}
