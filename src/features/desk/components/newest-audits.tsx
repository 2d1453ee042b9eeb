import { Link } from 'react-router';
import type { DeskResponse } from '#shared/contracts/desk.ts';
import { severityWord, SEVERITIES } from '#shared/severity-words.ts';
import { stateOfOutcome } from '#shared/states.ts';
import { paths } from '#src/app/paths.ts';
import { Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { StateMark } from '#src/components/ui/state-mark.tsx';

type Audit = DeskResponse['audits'][number];

/** What the newest audits found, in numbers; each leads to its findings. */
export function NewestAudits({ audits }: { audits: readonly Audit[] }) {
  return (
    <Section title="Newest audits">
      <ul className="flex flex-col gap-2">
        {audits.map((audit) => (
          <li key={audit.id}>
            <Link to={paths.audit.href(audit.id)} className="underline underline-offset-3">
              {audit.laboratory?.name ?? 'The whole network'}
            </Link>{' '}
            <span className="text-sm text-ink-3">
              <DateText value={audit.endedAt} />
            </span>
            <Found figures={audit.figures} />
          </li>
        ))}
      </ul>
    </Section>
  );
}

function Found({ figures }: Pick<Audit, 'figures'>) {
  const failing = SEVERITIES.filter((severity) => figures[severity] > 0);
  return (
    <p className="flex flex-wrap gap-x-3">
      {failing.length === 0 && <StateMark state="sound">nothing fails</StateMark>}
      {failing.map((severity) => (
        <StateMark key={severity} state={stateOfOutcome('fails', severity)}>
          {`${figures[severity]} ${severityWord(severity)}`}
        </StateMark>
      ))}
      {figures.notJudged > 0 && <StateMark state="not judged">{`${figures.notJudged} not judged`}</StateMark>}
    </p>
  );
}
