import { useState } from 'react';
import { z } from 'zod';
import type { DraftResponse } from '#shared/contracts/drafts.ts';
import { type IssuedResponse } from '#shared/contracts/calibrations.ts';
import { IssueDraftBody } from '#shared/contracts/drafts.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Dialog } from '#src/components/ui/dialog.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { Cell, Head, Row, Table } from '#src/components/ui/table.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { Facts } from '#src/components/layout/facts.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useIssueDraft } from '../api.ts';
import { gatherChecks } from './gather-checks.ts';
import { runsOf } from './gather-points.ts';
import { useKnown } from './known.ts';
import { readLine } from './read-line.ts';

const Signature = z.object({ password: IssueDraftBody.shape.password });

interface IssueDialogProps {
  draft: DraftResponse;
  issuerName: string;
  onIssued: (issued: IssuedResponse) => void;
  onClose: () => void;
}

/** Shows exactly what will be fixed, and asks for the signatory's password again. */
export function IssueDialog({ draft, issuerName, onIssued, onClose }: IssueDialogProps) {
  const form = useZodForm(Signature, { defaultValues: { password: '' } });
  const issue = useIssueDraft(draft.id);
  const [isShownAtField, setShownAtField] = useState(false);
  const { content } = draft;

  const submit = form.handleSubmit(({ password }) =>
    issue.mutate(
      { version: draft.version, password },
      {
        onSuccess: onIssued,
        onError: (error) => setShownAtField(showFieldProblems(error, form, (path) => path === 'password')),
      },
    ),
  );

  return (
    <Dialog title="Issue this calibration" onClose={onClose}>
      <Facts
        facts={[
          ['Certificate', <span className="font-mono text-sm">{content.certificateNo}</span>],
          ['Issued by', `${issuerName}, ${content.issuedOn}`],
          ['Performed', daysOf(content.performedBegin, content.performedEnd)],
          ['Method', content.method],
          ['Certificate as PDF', draft.document?.name ?? 'none attached'],
        ]}
      />
      <NotHolding checks={draft.checks} />
      <FixedLines draft={draft} />
      <p className="text-ink-2">
        Once issued, nothing of this changes any more: these values enter the register under your name, and
        others lean on them. A mistake is mended by a revision or a withdrawal, which stays visible.
      </p>
      {/* However long the certificate: what is signed with, and why it was refused, stay in sight. */}
      <form
        noValidate
        onSubmit={(event) => void submit(event)}
        className="sticky bottom-0 z-4 -mx-5 -mb-5 flex flex-col gap-3 border-t border-rule bg-raised px-5 pt-3 pb-5"
      >
        {issue.error && !isShownAtField && <ErrorNotice error={issue.error} />}
        <TextField
          label="Your password again: it is your signature"
          type="password"
          autoComplete="current-password"
          className="max-w-72"
          error={errorAt(form.formState.errors, 'password')}
          {...form.register('password')}
        />
        <div className="flex flex-wrap gap-2">
          <Button weight="primary" type="submit" isBusy={issue.isPending}>
            Sign and issue
          </Button>
          <Button onClick={onClose}>Not yet</Button>
        </div>
      </form>
    </Dialog>
  );
}

/** The checks that do not hold or cannot be judged: who signs, signs knowing them. */
function NotHolding({ checks }: { checks: DraftResponse['checks'] }) {
  const open = gatherChecks(
    checks.filter(({ outcome }) => outcome === 'fails' || outcome === 'cannot be judged'),
  );
  if (open.length === 0) return null;
  return (
    <Notice
      tone="caution"
      title={
        open.length === 1
          ? '1 check does not hold or cannot be judged'
          : `${open.length} checks do not hold or cannot be judged`
      }
    >
      <ul className="max-h-24 overflow-auto">
        {open.map(({ check, lines }, index) => (
          <li key={index}>
            {lines.length > 1 ? 'Lines' : 'Line'} {runsOf(lines)}: {check.sentence} ({check.outcome};{' '}
            {check.rule})
          </li>
        ))}
      </ul>
    </Notice>
  );
}

function FixedLines({ draft }: { draft: DraftResponse }) {
  const known = useKnown();
  return (
    <div className="shrink-0 [&>div]:max-h-[30dvh]">
      <Table caption="What will be fixed" isScrolled={draft.content.lines.length > 6}>
        <thead>
          <tr>
            <Head>Weight</Head>
            <Head align="right">Deviation</Head>
            <Head align="right">U</Head>
            <Head align="right">k</Head>
            <Head>Reference</Head>
          </tr>
        </thead>
        <tbody>
          {draft.content.lines.map((line) => {
            const standard = known.standards.get(line.standardId ?? '');
            const { deviation, written, expandedU, writtenU, k } = readLine(line, standard);
            const references = line.references.map(
              ({ valueUid }) => known.references.get(valueUid)?.registryNo ?? '?',
            );
            return (
              <Row key={line.key}>
                <Cell isHeading>
                  <span className="font-mono text-sm whitespace-nowrap">{standard?.registryNo ?? '?'}</span>
                  <span className="ml-2 whitespace-nowrap">{standard?.marking}</span>
                </Cell>
                <Cell align="right">
                  {deviation ? (
                    <Quantity
                      value={deviation}
                      kind="deviation"
                      shownIn={written.unit}
                      decimals={written.decimals}
                    />
                  ) : (
                    '?'
                  )}
                </Cell>
                <Cell align="right">
                  {expandedU ? (
                    <Quantity value={expandedU} shownIn={writtenU.unit} decimals={writtenU.decimals} />
                  ) : (
                    'not stated'
                  )}
                </Cell>
                <Cell align="right">{k ?? ''}</Cell>
                <Cell isMono>{references.join(', ') || 'none'}</Cell>
              </Row>
            );
          })}
        </tbody>
      </Table>
    </div>
  );
}

function daysOf(begin: string, end: string): string {
  return begin === end ? begin : `${begin} to ${end}`;
}
