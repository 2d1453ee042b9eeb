import { Link } from 'react-router';
import type { DeskResponse } from '#shared/contracts/desk.ts';
import { paths } from '#src/app/paths.ts';
import { TwoColumns } from '#src/components/layout/columns.tsx';
import { Facts } from '#src/components/layout/facts.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { LinkButton } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { DeskNotices } from './desk-notices.tsx';
import { DraftTable } from './draft-table.tsx';
import { DueTable } from './due-table.tsx';
import { NewestAudits } from './newest-audits.tsx';
import { UpstreamTable } from './upstream-table.tsx';

/** What needs this person today; parts without anything in them are not drawn. */
export function Desk({ desk }: { desk: DeskResponse }) {
  const places = desk.laboratories.map((laboratory) => laboratory.name).join(' · ');
  const isQuiet = [desk.toSign, desk.drafts, desk.due, desk.upstream, desk.notices].every(
    (part) => part.length === 0,
  );
  return (
    <Page
      title="Desk"
      sub={
        <>
          {places && `${places} · `}today is <DateText value={desk.day} />
        </>
      }
    >
      <TwoColumns side={<DeskSide desk={desk} />} sideWidth="narrow">
        {desk.toSign.length > 0 && (
          <Section title="Sent to you to sign">
            <DraftTable caption="Sent to you to sign" drafts={desk.toSign} />
          </Section>
        )}
        {desk.notices.length > 0 && (
          <Section title="Notices that move your values">
            <DeskNotices notices={desk.notices} day={desk.day} />
          </Section>
        )}
        {desk.upstream.length > 0 && (
          <Section title="Changed above you" note="a reference of these values no longer stands">
            <UpstreamTable rows={desk.upstream} />
          </Section>
        )}
        {desk.due.length > 0 && (
          <Section title="Due for calibration" note="within 60 days, by your own programme">
            <DueTable rows={desk.due} day={desk.day} />
          </Section>
        )}
        {desk.drafts.length > 0 && (
          <Section title="Open drafts">
            <DraftTable caption="Open drafts" drafts={desk.drafts} />
          </Section>
        )}
        {isQuiet && (
          <EmptyState action={<LinkButton to={paths.standards.href()}>Go to the standards</LinkButton>}>
            Nothing needs you today. Certificates to sign, weights that fall due, references that were
            withdrawn and drafts you left open stand here.
          </EmptyState>
        )}
      </TwoColumns>
    </Page>
  );
}

function DeskSide({ desk }: { desk: DeskResponse }) {
  return (
    <>
      {desk.assessments.length > 0 && (
        <Section title="Open to you as assessor">
          <Facts
            facts={desk.assessments.map(({ laboratory, until }) => [
              <Link
                key={laboratory.id}
                to={paths.laboratory.href(laboratory.id)}
                className="underline underline-offset-3"
              >
                {laboratory.name}
              </Link>,
              until ? (
                <>
                  until <DateText value={until} />
                </>
              ) : (
                'without end'
              ),
            ])}
          />
        </Section>
      )}
      {desk.audits.length > 0 && <NewestAudits audits={desk.audits} />}
      {desk.register && (
        <Section title="The register holds">
          <Facts
            facts={[
              ['Laboratories', formatDecimal(String(desk.register.laboratories))],
              ['Standards', formatDecimal(String(desk.register.standards))],
              ['Assigned values', formatDecimal(String(desk.register.values))],
              ['Acts recorded', formatDecimal(String(desk.register.acts))],
            ]}
          />
        </Section>
      )}
    </>
  );
}
