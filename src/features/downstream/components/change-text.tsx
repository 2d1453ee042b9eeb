import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import type { NamedSubject } from '#shared/contracts/dry-runs.ts';
import { decimalText } from '#shared/decimal.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { usePreferences } from '#src/lib/preferences.ts';
import { plainText } from '../rounded.ts';

interface ChangeTextProps {
  change: WhatIfChange;
  /** What it is about; left out while that is not known yet. */
  subject?: NamedSubject | undefined;
}

/** One supposed change in a sentence: what it is about, and what is supposed of it. */
export function ChangeText({ change, subject }: ChangeTextProps) {
  if (change.kind === 'notice') {
    return <NoticeText notice={change} issuer={subject?.issuer.name} />;
  }
  if (change.kind === 'withdraw') {
    const certificate = subject?.about === 'certificate' ? subject : undefined;
    return (
      <>
        Certificate <span className="font-mono text-sm">{certificate?.certificateNo ?? '…'}</span>
        {certificate && ` of ${certificate.issuer.name}`} is withdrawn
        {certificate &&
          `: ${certificate.values === 1 ? '1 value falls' : `${certificate.values} values fall`}`}
      </>
    );
  }
  const value = subject?.about === 'value' ? subject : undefined;
  return (
    <>
      <span className="font-mono text-sm">{value?.registryNo ?? '…'}</span>
      {value && (
        <>
          {', certificate '}
          <span className="font-mono text-sm">{value.certificateNo}</span>
        </>
      )}
      {change.kind === 'shift' ? (
        <>
          : its value shifts by <Quantity value={change.shift} kind="deviation" shownIn="auto" />
        </>
      ) : (
        <>
          : its u is larger, by <Quantity value={plainText(change.addedU)} shownIn="auto" /> in quadrature
        </>
      )}
    </>
  );
}

type Notice = Extract<WhatIfChange, { kind: 'notice' }>;

function NoticeText({ notice, issuer }: { notice: Notice; issuer: string | undefined }) {
  const { decimalMark } = usePreferences();
  const { performedFrom, performedTo, nominalFrom, nominalTo } = notice;
  const span = (from: string | undefined, to: string | undefined) =>
    [from && `from ${from}`, to && `to ${to}`].filter(Boolean).join(' ');
  const nominal = (grams: string | undefined) => grams && nominalText(decimalText(grams), decimalMark);
  const covered = [
    notice.quantity ?? 'all values',
    (performedFrom ?? performedTo) && `calibrated ${span(performedFrom, performedTo)}`,
    (nominalFrom ?? nominalTo) && span(nominal(nominalFrom), nominal(nominalTo)),
  ].filter(Boolean);
  return (
    <>
      A notice of {issuer ?? '…'}, {covered.join(', ')}:{' '}
      {notice.shiftPerKilogram.map(({ on, shift }, at) => (
        <span key={on}>
          {at > 0 && ', '}
          <Quantity value={shift} kind="deviation" shownIn={Number(shift) === 0 ? 'ug' : 'auto'} /> per kg
          {notice.shiftPerKilogram.length > 1 && ` on ${on}`}
        </span>
      ))}
      {notice.addedUPerKilogram > 0 && (
        <>
          {'; u grows by '}
          <Quantity value={plainText(notice.addedUPerKilogram)} shownIn="auto" /> per kg in quadrature
        </>
      )}
    </>
  );
}
