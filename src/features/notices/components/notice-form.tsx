import { useState } from 'react';
import { FormProvider, useForm, type FieldPath } from 'react-hook-form';
import type { WhatIfChange } from '#shared/contracts/downstream.ts';
import { PublishNoticeBody, type NoticeListResponse, type ScaleVersion } from '#shared/contracts/notices.ts';
import { Stack, TwoColumns } from '#src/components/layout/columns.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { showFieldProblems } from '#src/lib/form.ts';
import { ApiProblem, problemLine } from '#src/lib/api-problem.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import { usePublishNotice } from '../api.ts';
import {
  bodyOf,
  changesOf,
  emptyNotice,
  entryField,
  type NoticeEntry,
  type ProposedNotice,
} from '../notice-form.ts';
import { NoticeFields } from './notice-fields.tsx';
import { NoticePreview } from './notice-preview.tsx';
import { NoticeSign } from './notice-sign.tsx';
import { TermFields } from './term-fields.tsx';

interface NoticeFormProps {
  /** Whose entries are kept in this browser. */
  accountId: string;
  publishesFor: NoticeListResponse['publishesFor'];
  scaleVersions: readonly ScaleVersion[];
  notices: NoticeListResponse['notices'];
  /** What a dry run supposed, to go on from. */
  from: ProposedNotice | null;
  /** Today, the first proposal for its days. */
  day: string;
  onPublished: (noticeId: string) => void;
}

/** A notice as it is typed, what it would do, and the signature under it. */
export function NoticeForm({
  accountId,
  publishesFor,
  scaleVersions,
  notices,
  from,
  day,
  onPublished,
}: NoticeFormProps) {
  const issuer = publishesFor.find(({ id }) => id === from?.issuerId) ?? publishesFor[0];
  const form = useForm<NoticeEntry>({
    defaultValues: {
      ...emptyNotice(issuer?.id ?? '', day),
      fromScaleId: from?.fromScaleId ?? scaleVersions.findLast(({ validFrom }) => validFrom <= day)?.id ?? '',
      ...(from && { terms: [from.term] }),
    },
  });
  const draft = useLocalDraft(accountId, `notice-new${from ? `:${JSON.stringify(from)}` : ''}`, form);
  const [password, setPassword] = useState('');
  const [passwordError, setPasswordError] = useState<string>();
  const [previewed, setPreviewed] = useState<WhatIfChange[] | null>(null);
  const publish = usePublishNotice();
  const check = (signature: string): PublishNoticeBody | null => {
    form.clearErrors();
    setPasswordError(undefined);
    const parsed = PublishNoticeBody.safeParse(bodyOf(form.getValues(), signature));
    if (parsed.success) return parsed.data;
    parsed.error.issues.forEach(({ path, message }, at) => {
      const name = entryField(path.join('.'));
      if (name === 'password') setPasswordError(message);
      else
        form.setError(name as FieldPath<NoticeEntry>, { type: 'entry', message }, { shouldFocus: at === 0 });
    });
    return null;
  };
  const preview = () => {
    const body = check('-');
    if (body) setPreviewed(changesOf(body));
  };
  const sign = () => {
    const body = check(password);
    if (!body) return;
    publish.mutate(body, {
      onSuccess: ({ id }) => {
        draft.clear();
        onPublished(id);
      },
      onError: (error) => {
        const wrong = error instanceof ApiProblem ? error.fields.password : undefined;
        if (wrong) setPasswordError(problemLine(wrong));
        showFieldProblems(asEntered(error), form, (path) => path !== 'password');
      },
    });
  };
  return (
    <FormProvider {...form}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          sign();
        }}
      >
        <TwoColumns
          sideWidth="narrow"
          side={
            <Stack gap="loose">
              <NoticePreview previewed={previewed} onPreview={preview} />
              <NoticeSign
                password={password}
                onPassword={setPassword}
                passwordError={passwordError}
                isBusy={publish.isPending}
                error={isBesideFields(publish.error) ? null : publish.error}
              />
            </Stack>
          }
        >
          {draft.restoredFrom !== null && <Restored onDiscard={draft.discard} />}
          <NoticeFields publishesFor={publishesFor} scaleVersions={scaleVersions} notices={notices} />
          <Section title="Which certificates, and what they get">
            <TermFields />
          </Section>
        </TwoColumns>
      </form>
    </FormProvider>
  );
}

function Restored({ onDiscard }: { onDiscard: () => void }) {
  const answers = (
    <Button weight="text" onClick={onDiscard}>
      Begin anew
    </Button>
  );
  return (
    <Notice answers={answers}>
      Filled again with what you typed here before; your password is never kept.
    </Notice>
  );
}

/** Said at its fields: nothing is left to say in general. */
function isBesideFields(error: Error | null): boolean {
  return error instanceof ApiProblem && Object.keys(error.fields).length > 0;
}

/** The server's field problems under the names of the form's fields. */
function asEntered(error: Error): Error {
  if (!(error instanceof ApiProblem)) return error;
  const fields = Object.fromEntries(
    Object.entries(error.fields).map(([path, problem]) => [entryField(path), problem]),
  );
  return new ApiProblem({ ...error.document, fields });
}
