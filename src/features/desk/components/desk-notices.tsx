import { Link } from 'react-router';
import type { DeskResponse } from '#shared/contracts/desk.ts';
import { paths } from '#src/app/paths.ts';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';

/** Notices that move values of ours, each with how many and the way to them. */
export function DeskNotices({ notices, day }: { notices: DeskResponse['notices']; day: string }) {
  return (
    <ul className="flex flex-col gap-2">
      {notices.map((notice) => (
        <li key={notice.id}>
          <StateMark state={notice.verdictChanges > 0 ? 'broken' : 'caution'}>
            <Link to={paths.notice.href(notice.id)} className="text-ink underline underline-offset-3">
              Notice {notice.number}
            </Link>{' '}
            <span className="text-ink">
              {notice.effectiveOn > day ? 'takes' : 'took'} effect on <DateText value={notice.effectiveOn} />:{' '}
              {movedText(notice)}
            </span>
          </StateMark>
        </li>
      ))}
    </ul>
  );
}

function movedText({ material, verdictChanges }: DeskResponse['notices'][number]): string {
  const parts = [
    material > 0 ? `${valuesText(material)} materially` : '',
    verdictChanges > 0
      ? `${verdictChanges} of your values change${verdictChanges === 1 ? 's' : ''} a verdict`
      : '',
  ];
  return parts.filter(Boolean).join(', ');
}

function valuesText(count: number): string {
  return count === 1 ? '1 of your values moves' : `${count} of your values move`;
}
