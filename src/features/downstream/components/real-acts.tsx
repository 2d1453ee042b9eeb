import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { WhatIfChange, WhatIfResponse } from '#shared/contracts/downstream.ts';
import type { NamedSubject } from '#shared/contracts/dry-runs.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { usePerson } from '#src/lib/session.ts';
import { namedQuery, whatIfQuery, type Supposition } from '../api.ts';
import { supposedCorrection, type SupposedCorrection } from '../supposed-correction.ts';

type NamedValue = Extract<NamedSubject, { about: 'value' }>;

/** What every dialog of a real act is given. */
interface ActProps {
  revisionId: string;
  certificateNo: string;
  /** The counts of the dry run, in a sentence. */
  touches: ReactNode;
  onDone: (actSeq: number) => void;
  onClose: () => void;
}

/** The dialogs in which a dry run becomes an act; they belong to the calibrations and come through the route. */
export interface ActDialogs {
  withdraw: (props: ActProps & { values: number }) => ReactNode;
  correct: (props: ActProps & { value: NamedValue; supposed: SupposedCorrection }) => ReactNode;
}

interface RealActsProps {
  asked: Supposition;
  dialogs: ActDialogs;
  onDone: (actSeq: number) => void;
}

/** The real acts behind a dry run, each named by what it does, for those who may. */
export function RealActs({ asked, dialogs, onDone }: RealActsProps) {
  const named = useQuery(namedQuery(asked.changes));
  const answer = useQuery(whatIfQuery(asked));
  const person = usePerson();
  if (!named.data || !answer.data) return null;
  const signsFor = new Set(
    person.roles.flatMap(({ role, laboratory }) =>
      role === 'signatory' && laboratory ? [laboratory.id] : [],
    ),
  );
  const acts = asked.changes.flatMap((change, at) => {
    const subject = named.data.subjects[at]!;
    return isOpen(change, subject, signsFor) ? [{ change, subject, at }] : [];
  });
  const touches = <Touched total={answer.data.total} />;
  return (
    <Section title="The act itself">
      {acts.length === 0 ? (
        <p className="text-ink-2">
          Only who signs for the laboratory that entered a certificate can correct or withdraw it, and only
          who signs for an institute can publish a notice on its values.
        </p>
      ) : (
        <>
          <p className="text-ink-2">
            What this will touch: {touches}
            {asked.changes.length > 1 && ' The counts are of all changes together.'}
          </p>
          <ul className="flex flex-col gap-2 pt-1">
            {acts.map(({ change, subject, at }) => (
              <li key={at}>
                <OneAct {...{ change, subject, dialogs, touches, onDone }} />
              </li>
            ))}
          </ul>
        </>
      )}
    </Section>
  );
}

function isOpen(change: WhatIfChange, subject: NamedSubject, signsFor: ReadonlySet<string>): boolean {
  if (change.kind === 'notice') return signsFor.has(change.issuerId);
  return (
    subject.abilities[change.kind === 'withdraw' ? 'calibration:withdraw' : 'calibration:correct'] === true
  );
}

function Touched({ total: { count, words } }: { total: WhatIfResponse['total'] }) {
  if (count === 0) return <>nothing leans on it.</>;
  return (
    <>
      {count} in all; verdict changes {words.verdictChanges}, material {words.material}, none {words.none}.
    </>
  );
}

interface OneActProps extends Omit<RealActsProps, 'asked'> {
  change: WhatIfChange;
  subject: NamedSubject;
  touches: ReactNode;
}

function OneAct({ change, subject, dialogs, touches, onDone }: OneActProps) {
  const [isAsked, setAsked] = useState(false);
  if (change.kind === 'notice') {
    return <LinkButton to={paths.newNotice.href(change)}>Publish as a notice</LinkButton>;
  }
  const close = () => setAsked(false);
  const shared = {
    touches,
    onClose: close,
    onDone: (actSeq: number) => {
      close();
      onDone(actSeq);
    },
  };
  const certificateNo = subject.about === 'issuer' ? '' : subject.certificateNo;
  if (subject.about === 'certificate') {
    const { revisionId, values } = subject;
    return (
      <>
        <Button weight="destructive" onClick={() => setAsked(true)}>
          Withdraw certificate {certificateNo}
        </Button>
        {isAsked && dialogs.withdraw({ ...shared, revisionId, certificateNo, values })}
      </>
    );
  }
  if (subject.about !== 'value' || subject.revisionId === null) return null;
  const { revisionId } = subject;
  const supposed = supposedCorrection(change, subject);
  return (
    <>
      <Button onClick={() => setAsked(true)}>Correct certificate {certificateNo}</Button>
      {isAsked && dialogs.correct({ ...shared, revisionId, certificateNo, value: subject, supposed })}
    </>
  );
}
