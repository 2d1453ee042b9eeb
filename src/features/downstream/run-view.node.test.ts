import { describe, expect, it } from 'vitest';
import { DryRunQuestion } from '#shared/contracts/dry-runs.ts';
import { askedOfRun, readRunView, runViewParameters } from './run-view.ts';

const change = { kind: 'withdraw', revisionId: '01a01e2f-2000-7738-adb1-8fcf65fde7c6' } as const;
const at = (text: string) => readRunView(new URLSearchParams(text));

describe('the view of a kept dry run', () => {
  it('is the same after it was written and read again', () => {
    for (const text of ['', 'as=then&by=class&group=E2&sort=shift', 'by=laboratory']) {
      expect(at(new URLSearchParams(runViewParameters(at(text))).toString())).toEqual(at(text));
    }
  });

  it('asks as known on the day it was kept, and leaves days that the question names', () => {
    const open = DryRunQuestion.parse({ changes: [change], by: 'class', threshold: 0.07 });
    expect(askedOfRun('2026-05-01', open, at(''))).toMatchObject({
      day: undefined,
      known: undefined,
      beyond: 7,
    });
    expect(askedOfRun('2026-05-01', open, at('as=then'))).toMatchObject({
      day: '2026-05-01',
      known: '2026-05-01',
      by: 'class',
    });
    const dated = DryRunQuestion.parse({ changes: [change], day: '2020-01-01' });
    expect(askedOfRun('2026-05-01', dated, at('as=then&by=year'))).toMatchObject({
      day: '2020-01-01',
      known: '2026-05-01',
      by: 'year',
    });
  });
});
