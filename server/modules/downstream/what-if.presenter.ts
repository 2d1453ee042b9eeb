import type { z } from 'zod';
import type { WhatIfFullRow, WhatIfResponse, WhatIfWarningRow } from '#shared/contracts/downstream.ts';
import { Decimal, decimalText } from '#shared/decimal.ts';
import { fullRow, warningRow } from './downstream.presenter.ts';
import { groupOrder } from './group-order.ts';
import type { NamedLaboratory } from './row-details.queries.ts';
import { SIGHT } from './sight.ts';
import { WORDS } from './what-if-word.ts';
import type { WhatIf, WhatIfFound } from './what-if.service.ts';

type Laboratories = Map<string, NamedLaboratory>;

/** A dry run as this person may see it. */
export function presentWhatIf(answer: WhatIf): z.input<typeof WhatIfResponse> {
  const { question, groups, page, laboratories } = answer;
  const words = (word: 0 | 1 | 2) => groups.reduce((total, group) => total + group.words[word], 0);
  return {
    question,
    total: {
      count: groups.reduce((total, group) => total + group.count, 0),
      warned: groups.reduce((total, group) => total + group.warned, 0),
      words: { none: words(0), material: words(1), verdictChanges: words(2) },
    },
    groups: groups.sort(groupOrder(question.by)).map((group) => ({
      key: group.key,
      laboratory: laboratories.get(group.key) ?? null,
      count: group.count,
      warned: group.warned,
      words: { none: group.words[0], material: group.words[1], verdictChanges: group.words[2] },
      largestShift: group.largestShift,
      largestRatio: group.largestRatio,
    })),
    page: page && {
      group: page.group,
      nextCursor: page.nextCursor,
      rows: page.rows.map((row) => presentRow(row, laboratories)),
    },
    beyondLimit: answer.beyondLimit.map(({ uid, registryNo }) => ({ uid, registryNo })),
  };
}

function presentRow(
  row: WhatIfFound,
  laboratories: Laboratories,
): z.input<typeof WhatIfFullRow> | z.input<typeof WhatIfWarningRow> {
  const { details, sight } = row;
  const shift = Number.isNaN(row.shift) ? null : row.shift;
  const word = WORDS[row.word]!;
  if (sight !== SIGHT.full) {
    const named = sight === SIGHT.issued ? details.holderId : details.issuerId;
    return { ...warningRow(details, laboratories.get(named)!), shift, word };
  }
  const isUKnown = details.expandedU !== null;
  return {
    ...fullRow(details, laboratories),
    shift,
    deviationAfter: shift === null ? null : movedText(details.deviation, shift),
    ratio: shift === null || !isUKnown ? null : shift / row.expandedU,
    expandedUAfter: isUKnown ? row.expandedUAfter : null,
    classBefore: row.classBefore,
    classAfter: row.classAfter,
    isBeyondLimit: row.isBeyondLimit,
    word,
  };
}

/** Deviation plus shift, to the register's picogram. */
function movedText(deviation: string, shift: number): string {
  return decimalText(new Decimal(deviation).plus(shift).toDecimalPlaces(12));
}
