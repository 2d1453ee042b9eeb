import { useState } from 'react';
import { Link } from 'react-router';
import type { CalibrationResponse } from '#shared/contracts/calibrations.ts';
import { paths } from '#src/app/paths.ts';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import { Facts } from '#src/components/layout/facts.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { can } from '#src/lib/abilities.ts';
import { usePerson } from '#src/lib/session.ts';
import { withdrawalOf, withdrawalText } from '#src/lib/withdrawal.ts';
import { stateOfValue } from '#shared/states.ts';
import { LineTable } from './line-table.tsx';
import { sharedWords } from './shared-words.ts';
import { PerformedText } from './performed-text.tsx';
import { WithdrawDialog } from './withdraw-dialog.tsx';

interface CalibrationSheetProps extends CalibrationResponse {
  /** It was issued a moment ago, from this browser. */
  isJustIssued: boolean;
}

/** One issued calibration, read like the certificate it is. */
export function CalibrationSheet(props: CalibrationSheetProps) {
  const { calibration, revisions, lines, isJustIssued } = props;
  const [first] = lines;
  const isOwn = calibration.issuer.id === calibration.registeredBy.id;
  return (
    <Page
      title={`Certificate ${calibration.certificateNo}`}
      sub={
        <>
          {calibration.issuer.name} · revision {calibration.revisionN} · issued{' '}
          <DateText value={calibration.issuedOn} />
        </>
      }
      value={<StateMark state={stateOfValue(calibration.state)}>{calibration.state}</StateMark>}
      valueNote={calibration.reason ?? undefined}
    >
      {isJustIssued && calibration.state === 'in force' && (
        <Notice role="status" tone="sound" title="Issued">
          {lines.length === 1 ? 'The value is' : `All ${lines.length} values are`} in the register and can be
          leaned on.
        </Notice>
      )}
      <EndReason lines={lines} />
      <Newer lines={lines} />
      <div className="grid grid-cols-1 items-start gap-x-10 gap-y-1 md:grid-cols-2 columns:grid-cols-[auto_auto_1fr]">
        <Facts
          facts={[
            ['Performed', <PerformedText {...calibration} />],
            ['Method', calibration.method],
            ['Decision rule', calibration.decisionRule],
            ['Entered by', isOwn ? null : calibration.registeredBy.name],
          ]}
        />
        <Facts
          facts={[
            ['Signatory', calibration.signatory],
            ['Document', calibration.document && <DocumentLink {...calibration.document} />],
            ['Recorded', <DateText value={calibration.recordedAt} />],
            ['SHA-256', <Fingerprint value={calibration.contentSha256} />],
          ]}
        />
        <div className="flex flex-wrap content-start items-start gap-2 max-columns:pt-3 md:max-columns:col-span-2 columns:justify-end">
          {first && (
            <LinkButton to={paths.chain.href(first.uid)} weight="primary">
              {lines.length === 1 ? 'Open the chain' : `Open the chain of ${first.standard.marking}`}
            </LinkButton>
          )}
          <Withdraw {...props} />
        </div>
      </div>
      <Section title="Results" note={sharedWords(lines)}>
        <LineTable lines={lines} />
      </Section>
      {revisions.length > 1 && <Revisions revisions={revisions} shown={calibration.revisionId} />}
    </Page>
  );
}

/** Why the values no longer stand, once for each reason given. */
function EndReason({ lines }: { lines: CalibrationResponse['lines'] }) {
  const reasons = new Map(lines.flatMap((line) => (line.stateReason ? [[line.stateReason, line]] : [])));
  return [...reasons].map(([reason, { state, stateSince }]) => (
    <Notice
      key={reason}
      tone={state === 'withdrawn' ? 'broken' : 'caution'}
      title={
        <>
          {state === 'withdrawn' ? 'Withdrawn' : 'Superseded'}
          {stateSince && (
            <>
              {' '}
              from <DateText value={stateSince} />
            </>
          )}
        </>
      }
    >
      {reason}
    </Notice>
  ));
}

/** Later certificates that stand beside this one, which is in force itself. */
function Newer({ lines }: { lines: CalibrationResponse['lines'] }) {
  const newer = new Map(lines.flatMap((line) => (line.newer ? [[line.newer.revisionId, line]] : [])));
  return [...newer].map(([revisionId, line]) => (
    <p key={revisionId} role="status">
      In force; newer:{' '}
      <Link
        to={paths.calibration.href(revisionId)}
        className="font-mono text-sm underline underline-offset-3"
      >
        {line.newer!.certificateNo}
      </Link>
      {lines.length > 1 && `, of ${line.standard.registryNo}`}
    </p>
  ));
}

function Withdraw({ calibration, lines, abilities }: CalibrationResponse) {
  const [isAsked, setAsked] = useState(false);
  const person = usePerson();
  if (!can({ abilities }, 'calibration:withdraw') || calibration.state === 'withdrawn') return null;
  return (
    <>
      <Button weight="destructive" onClick={() => setAsked(true)}>
        {withdrawalText(withdrawalOf(person, calibration.issuer.id), calibration.certificateNo)}
      </Button>
      {isAsked && (
        <WithdrawDialog calibration={calibration} weights={lines.length} onClose={() => setAsked(false)} />
      )}
    </>
  );
}

function Revisions({ revisions, shown }: { revisions: CalibrationResponse['revisions']; shown: string }) {
  return (
    <Section title="Revisions">
      <ul className="border-t border-rule">
        {revisions.map(({ revisionId, n, issuedOn, reason }) => (
          <li key={revisionId} className="border-b border-rule py-1">
            {revisionId === shown ? (
              <span className="font-medium">Revision {n}, this one</span>
            ) : (
              <Link to={paths.calibration.href(revisionId)} className="underline underline-offset-3">
                Revision {n}
              </Link>
            )}
            , <DateText value={issuedOn} />
            {reason && <span className="block text-ink-2">{reason}</span>}
          </li>
        ))}
      </ul>
    </Section>
  );
}

function DocumentLink({ id, name, size }: { id: string; name: string; size: number }) {
  const kilobytes = Math.max(1, Math.round(size / 1000));
  return (
    <a href={`/api/documents/${id}`} className="break-all underline underline-offset-3">
      {name} <span className="text-ink-3">{kilobytes} kB</span>
    </a>
  );
}

/** The first and last signs are enough to compare by eye; all of them can be read and copied. */
function Fingerprint({ value }: { value: string }) {
  return (
    <details>
      <summary className="font-mono text-sm">
        {value.slice(0, 8)}…{value.slice(-8)}
      </summary>
      <span className="font-mono text-xs break-all text-ink-2">{value}</span>
    </details>
  );
}
