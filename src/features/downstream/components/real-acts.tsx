import { useQuery } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import type { WhatIfChange, WhatIfResponse } from '#shared/contracts/downstream.ts';
import type { NamedSubject } from '#shared/contracts/dry-runs.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { Button, LinkButton } from '#src/components/ui/button.tsx';
import { usePerson } from '#src/lib/session.ts';
import { withdrawalOf, withdrawalText } from '#src/lib/withdrawal.ts';
import { namedQuery, whatIfQuery, type Supposition } from '../api.ts';
import { supposedTogether, type SupposedCorrection } from '../supposed-correction.ts';

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
  withdraw: (props: ActProps & { values: number; issuer: NamedSubject['issuer'] }) => ReactNode;
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
  const acts = actsOf(asked.changes, named.data.subjects, signsFor);
  const touches = <Touched total={answer.data.total} />;
  return (
    <Section title="The act itself">
      {acts.length === 0 ? (
        <p className="text-ink-2">
          Only who signs for the laboratory that entered a certificate can correct it, or withdraw its entry;
          only who signs for its issuer can withdraw the certificate; and only who signs for an institute can
          publish a notice on its values.
        </p>
      ) : (
        <>
          <p className="text-ink-2">
            What this will touch: {touches}
            {asked.changes.length > 1 && ' The counts are of all changes together.'}
          </p>
          <ul className="flex flex-col gap-2 pt-1">
            {acts.map(({ key, changes, subject }) => (
              <li key={key}>
                <OneAct
                  {...{ changes, subject, dialogs, touches, onDone }}
                  isOneOfSeveral={
                    acts.filter((act) => certificateOf(act) === certificateOf({ subject })).length > 1
                  }
                />
              </li>
            ))}
          </ul>
        </>
      )}
    </Section>
  );
}

interface Act {
  key: string;
  changes: WhatIfChange[];
  subject: NamedSubject;
}

/** One act for each value, certificate or notice, however many changes suppose something of it. */
function actsOf(
  changes: readonly WhatIfChange[],
  subjects: readonly NamedSubject[],
  signsFor: ReadonlySet<string>,
): Act[] {
  const acts = new Map<string, Act>();
  for (const [at, change] of changes.entries()) {
    const subject = subjects[at]!;
    if (!isOpen(change, subject, signsFor)) continue;
    const key = keyOf(change, at);
    const act = acts.get(key) ?? { key, changes: [], subject };
    acts.set(key, act);
    act.changes.push(change);
  }
  return [...acts.values()];
}

function keyOf(change: WhatIfChange, at: number): string {
  if (change.kind === 'notice') return `notice ${at}`;
  return change.kind === 'withdraw' ? `withdraw ${change.revisionId}` : `correct ${change.valueUid}`;
}

/** The certificate that a correction is of: corrections of two values on it are told apart by their weights. */
function certificateOf({ subject }: Pick<Act, 'subject'>): string | null {
  return subject.about === 'value' ? subject.certificateNo : null;
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
  changes: readonly WhatIfChange[];
  subject: NamedSubject;
  touches: ReactNode;
  isOneOfSeveral: boolean;
}

function OneAct({ changes, subject, isOneOfSeveral, dialogs, touches, onDone }: OneActProps) {
  const [isAsked, setAsked] = useState(false);
  const person = usePerson();
  const change = changes[0]!;
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
          {withdrawalText(withdrawalOf(person, subject.issuer.id), certificateNo)}
        </Button>
        {isAsked &&
          dialogs.withdraw({ ...shared, revisionId, certificateNo, values, issuer: subject.issuer })}
      </>
    );
  }
  if (subject.about !== 'value' || subject.revisionId === null) return null;
  const { revisionId } = subject;
  const supposed = supposedTogether(changes, subject);
  return (
    <>
      <Button onClick={() => setAsked(true)}>
        Correct certificate {certificateNo}
        {isOneOfSeveral && ` for ${subject.registryNo}`}
      </Button>
      {isAsked && dialogs.correct({ ...shared, revisionId, certificateNo, value: subject, supposed })}
    </>
  );
}
