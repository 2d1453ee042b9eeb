import type { z } from 'zod';
import type { ClassVerdict, WhatIfFullRow, WhatIfWord } from '#shared/contracts/downstream.ts';
import { StateMark } from '#src/components/ui/state-mark.tsx';
import type { State } from '#shared/states.ts';

const STATES: Record<WhatIfWord, State> = {
  none: 'does not apply',
  material: 'caution',
  'verdict changes': 'broken',
};

/** The one word of a dry run for a weight, with its mark. */
export function WhatIfWordMark({ word }: { word: WhatIfWord }) {
  return (
    <StateMark state={STATES[word]} className="whitespace-nowrap">
      {word}
    </StateMark>
  );
}

/** What the declared decision rule gives for the class stated: once where nothing changes, before and after where it does. */
export function ClassVerdicts({ row }: { row: z.infer<typeof WhatIfFullRow> }) {
  const { classBefore: before, classAfter: after } = row;
  if (row.class === null) return <span className="text-ink-3">none stated</span>;
  const now = <span className="whitespace-nowrap">{VERDICTS[before](row.class)}</span>;
  if (before === after) return <span className="text-ink-2">{now}</span>;
  return (
    <>
      {now}, <span className="whitespace-nowrap">then {VERDICTS_THEN[after]}</span>
    </>
  );
}

const VERDICTS: Record<ClassVerdict, (weightClass: string) => string> = {
  keeps: (weightClass) => `keeps ${weightClass}`,
  'does not keep': (weightClass) => `does not keep ${weightClass}`,
  'not judged': () => 'not judged',
};

/** After the first verdict has named the class. */
const VERDICTS_THEN: Record<ClassVerdict, string> = {
  keeps: 'keeps it',
  'does not keep': 'does not',
  'not judged': 'not judged',
};
