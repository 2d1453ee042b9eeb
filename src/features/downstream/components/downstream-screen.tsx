import { lazy, type ReactNode, Suspense, useRef, useState } from 'react';
import { Link } from 'react-router';
import { paths } from '#src/app/paths.ts';
import { Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Page } from '#src/components/layout/page.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { Coverage, Quantity } from '#src/components/ui/quantity.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { suppositionOf, type Supposition } from '../api.ts';
import { GROUPINGS } from '../groups.ts';
import type { DownstreamSearch } from '../search.ts';
import { supposedChange } from '../supposed-change.ts';
import { Leaning } from './leaning.tsx';
import { NotAsked } from './not-asked.tsx';
import { RealActs, type ActDialogs } from './real-acts.tsx';
import { RecordedNotice } from './recorded-notice.tsx';
import { WhatIfForm, type Asked } from './what-if-form.tsx';
import { WhatIf } from './what-if.tsx';

/** The form and its library are fetched when there is a dry run to keep. */
const KeepDryRun = lazy(() =>
  import('./keep-dry-run.tsx').then((module) => ({ default: module.KeepDryRun })),
);

/** The value that is asked about, as its chain tells it. */
export interface DownstreamSubject {
  uid: string;
  registryNo: string;
  nominal: string;
  deviation: string;
  expandedU: string | null;
  k: string | null;
  quantity: string;
  certificateNo: string;
  /** Null where this person may not open the certificate. */
  revisionId: string | null;
}

interface DownstreamScreenProps {
  subject: DownstreamSubject;
  /** What stands below the title: what the weight is, and the way back to its chain. */
  sub: ReactNode;
  /** The days the answer is about, where the address names none. */
  answered: { day: string; known: string };
  search: DownstreamSearch;
  onChange: (change: Partial<DownstreamSearch>) => void;
  dialogs: ActDialogs;
}

/** Who leans on a value, and what if it were otherwise. */
export function DownstreamScreen(props: DownstreamScreenProps) {
  const { subject, sub, answered, search, onChange, dialogs } = props;
  const [actSeq, setActSeq] = useState<number | null>(null);
  const [isRefused, setRefused] = useState(false);
  const answer = useRef<HTMLDivElement>(null);
  const change = supposedChange(search, subject);
  const onOpen = (group: string | undefined) => onChange({ group });
  const asked = change && suppositionOf([change], search);
  const ask = (next: Asked) => {
    setActSeq(null);
    setRefused(false);
    onChange({ ...next, sort: 'word' });
    // On a phone the answer stands above the form: it comes into sight, and is read out next.
    answer.current?.focus();
  };
  const leave = () => {
    setRefused(false);
    onChange({ suppose: undefined, amount: undefined, sort: 'word' });
    answer.current?.focus();
  };
  const done = (seq: number) => {
    setActSeq(seq);
    leave();
  };
  return (
    <Page
      title={`Who leans on ${subject.registryNo}`}
      sub={sub}
      value={
        <Quantity
          value={decimalText(new Decimal(subject.nominal).plus(subject.deviation))}
          expandedUncertainty={subject.expandedU}
          coverageFactor={subject.k}
          isOfRecord
        />
      }
      valueNote={
        <>
          {subject.quantity}
          {subject.k && (
            <>
              , <Coverage coverageFactor={subject.k} />
            </>
          )}
        </>
      }
    >
      <Toolbar label="What is asked">
        <DayField label="In force on" value={search.day ?? answered.day} onDay={(day) => onChange({ day })} />
        <DayField
          label="As known on"
          value={search.known ?? answered.known}
          onDay={(known) => onChange({ known })}
        />
        <Switch
          label="Grouped by"
          value={search.by}
          onChange={(by) => onChange({ by })}
          choices={GROUPINGS}
        />
      </Toolbar>
      <TwoColumns
        sideWidth="narrow"
        side={
          <>
            <WhatIfForm
              key={`${search.suppose} ${search.amount} ${search.beyond}`}
              asked={search}
              certificateNo={subject.revisionId === null ? null : subject.certificateNo}
              onAsk={ask}
              onRefused={() => setRefused(true)}
              onLeave={leave}
              further={
                <Link
                  to={paths.whatIf.href(asked ? { changes: JSON.stringify(asked.changes) } : {})}
                  className="underline underline-offset-3"
                >
                  Suppose several changes at once
                </Link>
              }
            />
            {asked && !isRefused && (
              <>
                <RealActs asked={asked} dialogs={dialogs} onDone={done} />
                <Suspense fallback={null}>
                  <KeepDryRun question={questionOf(asked)} />
                </Suspense>
              </>
            )}
          </>
        }
      >
        <div ref={answer} tabIndex={-1} className="outline-none">
          {actSeq !== null && <RecordedNotice actSeq={actSeq} />}
          {isRefused ? (
            <NotAsked onFormer={() => setRefused(false)} />
          ) : asked ? (
            <WhatIf
              changes={asked.changes}
              search={search}
              onOpen={onOpen}
              onSort={(sort) => onChange({ sort })}
            />
          ) : (
            <Leaning uid={subject.uid} search={search} onOpen={onOpen} />
          )}
        </div>
      </TwoColumns>
    </Page>
  );
}

/** What is kept of a supposition: the order of its rows is not part of the question. */
function questionOf({ sort: _sort, ...question }: Supposition) {
  return question;
}
