import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { NoticeResponse } from '#shared/contracts/notices.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { paths } from '#src/app/paths.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { AddedUText, NoticeStateMark, ScalesText, ShiftText } from './notice-words.tsx';

interface NoticePageProps {
  notice: NoticeResponse;
  /** What it brings to one's own values. */
  children: ReactNode;
}

/** A notice as published: what changes, from when, for which certificates; and beside it what that means here. */
export function NoticePage({ notice, children }: NoticePageProps) {
  return (
    <Page
      title={`Notice ${notice.number}`}
      sub={`${notice.title} · ${notice.issuer.name}`}
      value={<NoticeStateMark state={notice.state} />}
      valueNote={
        <>
          from <DateText value={notice.effectiveOn} />
        </>
      }
    >
      {notice.replacedBy && (
        <Notice tone="caution" title="This notice is replaced">
          {'What stands instead is notice '}
          <NoticeLink notice={notice.replacedBy} />.
        </Notice>
      )}
      {notice.isBackDated && (
        <Notice title="Back-dated">
          {'It was made known on '}
          <DateText value={notice.madeKnownOn} />
          {' and takes effect from '}
          <DateText value={notice.effectiveOn} />
          {': nobody who weighed in between could have known. Conduct is judged by what was known.'}
        </Notice>
      )}
      <WhatItSays notice={notice} />
      {children}
    </Page>
  );
}

/** What changes, for which certificates, and why: beside one another where there is room. */
function WhatItSays({ notice }: { notice: NoticeResponse }) {
  return (
    <div className="grid gap-x-8 gap-y-5 sm:grid-cols-2 columns:grid-cols-3">
      <Section title="What changes">
        <Facts
          facts={[
            ['Kind', notice.kind],
            ['Scale version', <ScalesText key="scale" notice={notice} />],
            ['In force from', <DateText key="from" value={notice.effectiveOn} />],
            ['Made known on', <DateText key="known" value={notice.madeKnownOn} />],
            ['It matters', notice.threshold],
            ['Replaces', notice.replaces && <NoticeLink key="replaces" notice={notice.replaces} />],
          ]}
        />
      </Section>
      {notice.terms.map((term, at) => (
        <Section
          key={at}
          title={
            notice.terms.length === 1
              ? 'Which certificates, and what they get'
              : `Certificates of line ${at + 1}`
          }
        >
          <Term term={term} issuer={notice.issuer.name} scale={notice.fromScale.name} />
        </Section>
      ))}
      <Section title="Why">
        <p className="max-w-[60ch] whitespace-pre-line">{notice.reason}</p>
        <p className="max-w-[60ch] text-sm text-ink-2">
          Shifts and uncertainties are those of one kilogram: a value gets its share by its mass. The
          uncertainty is one effect, the same for every value, and counts once along a chain.
        </p>
      </Section>
    </div>
  );
}

interface TermProps {
  term: NoticeResponse['terms'][number];
  issuer: string;
  scale: string;
}

function Term({ term, issuer, scale }: TermProps) {
  const { decimalMark } = usePreferences();
  const { performedFrom: from, performedTo: to, nominalFrom, nominalTo } = term;
  const nominal = (grams: string) => nominalText(grams, decimalMark);
  return (
    <Facts
      facts={[
        ['Certificates of', issuer],
        ['On', `${scale}, or where none is stated`],
        ['Quantity', term.quantity ?? 'either'],
        ['Calibrated', <Range key="days" from={from} to={to} all="on any day" />],
        [
          'Nominal',
          <Range
            key="nominals"
            from={nominalFrom && nominal(nominalFrom)}
            to={nominalTo && nominal(nominalTo)}
            all="any"
          />,
        ],
        ['Shift', <Shifts key="shift" points={term.shiftPerKilogram} />],
        ['Added u (k = 1)', <AddedUText key="u" grams={term.addedUPerKilogram} />],
      ]}
    />
  );
}

function Range({ from, to, all }: { from: string | null; to: string | null; all: string }) {
  if (from === null && to === null) return <>{all}</>;
  if (from === null) return <>up to {to}</>;
  return to === null ? <>from {from}</> : <>{`${from} to ${to}`}</>;
}

/** One shift, or a line by the day of calibration. */
function Shifts({ points }: { points: TermProps['term']['shiftPerKilogram'] }) {
  const [only] = points;
  if (points.length === 1) return <ShiftText grams={Number(only!.shift)} />;
  return (
    <>
      <span className="text-ink-2">linear by the day of calibration:</span>
      {points.map(({ on, shift }) => (
        <span key={on} className="block whitespace-nowrap">
          <DateText value={on} /> <Quantity value={shift} kind="deviation" shownIn="ug" />
        </span>
      ))}
    </>
  );
}

function NoticeLink({ notice }: { notice: { id: string; number: string; title: string } }) {
  return (
    <Link to={paths.notice.href(notice.id)} className="underline underline-offset-3">
      {notice.number}, {notice.title}
    </Link>
  );
}
