import { useQuery } from '@tanstack/react-query';
import type { WhatIfChange, WhatIfResponse } from '#shared/contracts/downstream.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { Waiting } from '#src/components/ui/progress.tsx';
import { noticePreviewQuery } from '../api.ts';

interface NoticePreviewProps {
  /** The changes last looked at; null before. */
  previewed: WhatIfChange[] | null;
  onPreview: () => void;
}

/** What the notice would do, as a dry run: it changes nothing. */
export function NoticePreview({ previewed, onPreview }: NoticePreviewProps) {
  return (
    <Section title="What it would do">
      <p className="text-ink-2">
        A dry run over all that leans on the certificates covered. It changes nothing.
      </p>
      {previewed && <Answer changes={previewed} />}
      <p>
        <Button onClick={onPreview}>{previewed ? 'Preview again' : 'Preview'}</Button>
      </p>
    </Section>
  );
}

function Answer({ changes }: { changes: WhatIfChange[] }) {
  const { data, error } = useQuery({ ...noticePreviewQuery(changes), retry: false });
  if (error) return <ErrorNotice error={error} hidesFields />;
  if (!data) return <Waiting>Working it out</Waiting>;
  return (
    <div role="status">
      <Facts facts={factsOf(data.total)} />
    </div>
  );
}

function factsOf({ count, warned, words }: WhatIfResponse['total']): [string, string][] {
  return [
    ['Reaches', count === 1 ? '1 value or weight' : `${count} values and weights`],
    ['Of others', `${warned} weights, told by one word`],
    ['No action needed', String(words.none)],
    ['Material', String(words.material)],
    ['Change a verdict', String(words.verdictChanges)],
  ];
}
