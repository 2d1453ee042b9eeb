import { beforeAll, describe, expect, it } from 'vitest';
import { IN_FORCE, knownAt } from '#server/db/in-force.ts';
import { readRow, readRows } from '#server/db/read.ts';
import { STATE_ON_DAY, STATE_SINCE } from '#server/db/value-state.ts';
import { reviseCalibration, withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { stateAt, type ValueEnd } from '#shared/state-at.ts';
import { inputOf, lineOf, makeCalibration, makeStandard } from '#tests/support/calibration-factories.ts';
import { makeLaboratory } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

let now = new Date('2025-01-15T12:00:00.000Z');
const app = await testApp({ now: () => now });

/** Every combination of what can happen to a value: nothing, superseded, withdrawn, both; before or after. */
const LIVES = [
  { name: 'stands', revised: null, withdrawn: null },
  { name: 'superseded on the day it was made known', revised: '2025-03-10', withdrawn: null },
  { name: 'withdrawn back-dated', revised: null, withdrawn: '2025-02-01' },
  { name: 'withdrawn on the day', revised: null, withdrawn: '2025-03-15' },
  { name: 'withdrawn, then revised', revised: '2025-03-12', withdrawn: '2025-02-01' },
] as const;

const DAYS = [
  '2025-01-14',
  '2025-01-15',
  '2025-01-31',
  '2025-02-01',
  '2025-03-09',
  '2025-03-10',
  '2025-03-16',
];
const values: { life: string; id: number; ends: ValueEnd[]; recordedAt: string }[] = [];

beforeAll(async () => {
  const laboratory = await makeLaboratory(app);
  for (const life of LIVES) {
    now = new Date('2025-01-15T12:00:00.000Z');
    const weight = await makeStandard(app, laboratory.id);
    const input = inputOf(laboratory.id, '2025-01-15', [lineOf(weight.id)]);
    const { certificateNo } = input;
    const issued = await makeCalibration(app, laboratory.id, '2025-01-15', input.lines, { certificateNo });
    now = new Date('2025-03-15T08:00:00.000Z');
    if (life.withdrawn) {
      const end = { reason: 'Tried by a test', effectiveOn: life.withdrawn };
      await withdrawCalibration(app.context(), issued.revisionId, end);
    }
    if (life.revised) {
      await reviseCalibration(app.context(), {
        ...input,
        calibrationId: issued.calibrationId,
        issuedOn: life.revised,
        effectiveOn: life.revised,
        reason: 'Tried by a test',
      });
    }
    values.push({ life: life.name, ...(await storedLife(issued.valueUids[0]!)) });
  }
});

const INSTANT = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%dT%H:%i:%s.%fZ')`;

async function storedLife(uid: string) {
  const value = await readRow<{ id: number; recordedAt: string }>(
    app.database,
    `SELECT id, ${INSTANT('recorded_at')} AS recordedAt FROM assigned_value WHERE uid = :uid`,
    { uid },
  );
  const ends = await readRows<ValueEnd>(
    app.database,
    `SELECT kind, effective_on AS effectiveOn, ${INSTANT('recorded_at')} AS recordedAt FROM value_end WHERE value_id = :id`,
    { id: value!.id },
  );
  return { ...value!, ends };
}

describe('the two forms of "in force on a day, as known on another"', () => {
  it.each(LIVES.map((life) => life.name))('agree on a value that %s', async (name) => {
    const value = values.find((one) => one.life === name)!;
    const states = new Set<string>();
    for (const day of DAYS) {
      for (const known of DAYS) {
        const expected = stateAt(
          { effectiveFrom: '2025-01-15', recordedAt: value.recordedAt },
          value.ends,
          day,
          known,
        );
        const sql = await readRow<{
          isInForce: number;
          isKnown: number;
          state: string;
          since: string | null;
        }>(
          app.database,
          `SELECT (${IN_FORCE}) AS isInForce, v.recorded_at <= :knownAt AS isKnown, ${STATE_ON_DAY} AS state,
                  ${STATE_SINCE} AS since
           FROM assigned_value v WHERE v.id = :id`,
          { id: value.id, day, knownAt: knownAt(known) },
        );
        const state = sql!.isKnown ? sql!.state : 'unknown';
        expect({ day, known, state, since: sql!.isKnown ? sql!.since : null }).toEqual({
          day,
          known,
          ...expected,
        });
        expect(Boolean(sql!.isInForce)).toBe(expected.state === 'in force');
        states.add(state);
      }
    }
    // The table is no truth table where it never leaves one state.
    expect(states.size).toBeGreaterThanOrEqual(3);
  });
});
