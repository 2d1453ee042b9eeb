import { describe, expect, it } from 'vitest';
import { readRow, readRows } from '#server/db/read.ts';
import {
  issueCalibration,
  reviseCalibration,
  withdrawCalibration,
} from '#server/modules/calibrations/index.ts';
import { createSource, openEpoch, registerSet } from '#server/modules/standards/index.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { freeRegistryNo, makeLaboratory } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

interface StoredValue {
  id: number;
  u: number | null;
  localU: number | null;
  localOrigin: string;
  holderId: string;
  epochN: number;
  changed: string;
  expandedU: string | null;
  deviation: string;
}

async function stored(of: TestApp, uid: string | undefined): Promise<StoredValue> {
  const row = await readRow<StoredValue>(
    of.database,
    `SELECT v.id, v.u, v.local_u AS localU, v.local_origin AS localOrigin, v.holder_id AS holderId,
            e.n AS epochN, v.changed, v.expanded_u AS expandedU, v.deviation
     FROM assigned_value v JOIN epoch e ON e.id = v.epoch_id WHERE v.uid = :uid`,
    { uid: uid ?? '' },
  );
  if (!row) throw new Error(`No value ${uid}`);
  return row;
}

/** The fields an act was refused for. */
async function refusal(act: Promise<unknown>): Promise<{ id: string; fields: Record<string, unknown> }> {
  try {
    await act;
  } catch (error) {
    const { id, fields } = error as { id: string; fields?: Record<string, unknown> };
    return { id, fields: fields ?? {} };
  }
  throw new Error('The act was not refused');
}

describe('issuing a calibration', () => {
  it('freezes the local part as what U leaves over what the reference carries', async () => {
    const laboratory = await makeLaboratory(app);
    const [above, below] = [await makeStandard(app, laboratory.id), await makeStandard(app, laboratory.id)];
    const root = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(above.id, { expandedU: '0.00016' }),
    ]);
    const child = await makeCalibration(app, laboratory.id, '2024-02-10', [
      lineOf(below.id, { references: [useOf(root.valueUids[0]!, '2024-02-10')] }),
    ]);
    const value = await stored(app, child.valueUids[0]);
    expect(value.u).toBeCloseTo(0.00025, 12);
    expect(value.localU).toBeCloseTo(Math.sqrt(0.00025 ** 2 - 0.00008 ** 2), 12);
    expect(value.localOrigin).toBe('inferred');
    expect(value.deviation).toBe('0.000123000000');
    expect(value.holderId).toBe(laboratory.id);
    const act = await readRow<{ content: string }>(
      app.database,
      "SELECT content FROM act WHERE kind = 'calibration.issue' AND subject_id = :id",
      { id: child.calibrationId },
    );
    expect(JSON.parse(act!.content)).toMatchObject({ after: { valueUids: child.valueUids } });
  });

  it('counts what two references share once with its sign, through their ancestors', async () => {
    const laboratory = await makeLaboratory(app);
    const [top, left, right, focus] = await Promise.all(
      [1, 2, 3, 4].map(() => makeStandard(app, laboratory.id)),
    );
    const root = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(top!.id, { expandedU: '0.00016' }),
    ]);
    const references = [useOf(root.valueUids[0]!, '2024-02-10')];
    const middle = await makeCalibration(app, laboratory.id, '2024-02-10', [
      lineOf(left!.id, { expandedU: '0.00020', references }),
      lineOf(right!.id, { expandedU: '0.00020', references }),
    ]);
    const mean = await makeCalibration(app, laboratory.id, '2024-03-10', [
      lineOf(focus!.id, {
        references: middle.valueUids.map((uid) => useOf(uid, '2024-03-10', 0.5)),
      }),
    ]);
    const carried = 0.25 * 2 * 0.0001 ** 2 + 2 * 0.25 * 0.00008 ** 2;
    const value = await stored(app, mean.valueUids[0]);
    expect(value.localU).toBeCloseTo(Math.sqrt(0.00025 ** 2 - carried), 12);
  });

  it('invents no U: a value without U is unknown, and so is what leans on it', async () => {
    const laboratory = await makeLaboratory(app);
    const [above, below] = [await makeStandard(app, laboratory.id), await makeStandard(app, laboratory.id)];
    const root = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(above.id, { expandedU: null, k: null, reportedUDecimals: null }),
    ]);
    const child = await makeCalibration(app, laboratory.id, '2024-02-10', [
      lineOf(below.id, { references: [useOf(root.valueUids[0]!, '2024-02-10')] }),
    ]);
    expect(await stored(app, root.valueUids[0])).toMatchObject({
      u: null,
      localU: null,
      localOrigin: 'unknown',
      expandedU: null,
    });
    expect(await stored(app, child.valueUids[0])).toMatchObject({ localU: null, localOrigin: 'unknown' });
  });

  it('keeps a budget, a group and a consensus value as what they are', async () => {
    const laboratory = await makeLaboratory(app);
    const [a, b, c, d] = await Promise.all([1, 2, 3, 4].map(() => makeStandard(app, laboratory.id)));
    const component = { evaluation: 'A', distribution: 'normal', sensitivity: 1 } as const;
    const budget = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(a!.id, {
        components: [
          {
            ...component,
            name: 'repeatability',
            standardUncertainty: 3e-5,
            degreesOfFreedom: 9,
            estimate: 's',
          },
          { ...component, name: 'balance', standardUncertainty: 4e-5 },
        ],
      }),
    ]);
    expect(await stored(app, budget.valueUids[0])).toMatchObject({ localU: 5e-5, localOrigin: 'components' });
    const group = await makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(b!.id), lineOf(c!.id)], {
      group: {
        covariance: [
          [4e-10, 1e-10],
          [1e-10, 9e-10],
        ],
      },
    });
    expect(await stored(app, group.valueUids[1])).toMatchObject({ localU: 3e-5, localOrigin: 'group' });
    const consensus = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(d!.id, { rootKind: 'consensus value', quantity: 'mass', expandedU: '0.00004' }),
    ]);
    const value = await stored(app, consensus.valueUids[0]);
    expect(value.localOrigin).toBe('agreed');
    expect(value.localU).toBeCloseTo(2e-5, 12);
  });

  it('adds the shared volume effect where one certificate gives both kinds of mass', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    const both = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(weight.id),
      lineOf(weight.id, { quantity: 'mass', deviation: '0.0010', expandedU: '0.0030' }),
    ]);
    const links = await readRows<{ uid: string; source: string; sensitivity: number }>(
      app.database,
      `SELECT v.uid, o.uid AS source, l.sensitivity FROM source_link l
       JOIN assigned_value v ON v.id = l.child_id JOIN source o ON o.id = l.source_id
       WHERE v.uid IN (:uids)`,
      { uids: both.valueUids },
    );
    expect(links).toEqual([{ uid: both.valueUids[1], source: weight.volumeSourceUid, sensitivity: 0.0012 }]);
  });

  it('puts a result "as found" before the adjustment made meanwhile and "as left" after it', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    await openEpoch(app.context(), weight.id, {
      reason: 'adjusted',
      beginsOn: '2024-01-11',
      lastGoodOn: null,
      note: null,
    });
    const issued = await makeCalibration(
      app,
      laboratory.id,
      '2024-01-12',
      [lineOf(weight.id, { stage: 'as found' }), lineOf(weight.id, { stage: 'as left' })],
      { performedBegin: '2024-01-10' },
    );
    const epochs = await Promise.all(issued.valueUids.map((uid) => stored(app, uid)));
    expect(epochs.map((value) => value.epochN)).toEqual([1, 2]);
  });

  it('issues a set of 25 with group, sources and references in one act', async () => {
    const laboratory = await makeLaboratory(app);
    const top = await makeStandard(app, laboratory.id);
    const root = await makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(top.id)]);
    const set = await registerSet(app.context(), {
      laboratoryId: laboratory.id,
      registryNo: freeRegistryNo(),
      name: 'Set of 25',
      manufacturer: null,
      inServiceFrom: '2022-01-01',
      intervalMonths: 24,
      members: Array.from({ length: 25 }, (_, at) => ({
        nominal: '100',
        marking: `100 g ${at}`,
        serial: null,
        shape: 'knob' as const,
        material: 'stainless steel',
        class: 'E2' as const,
        density: { value: '7950', expandedU: '140', k: '2', origin: 'assumed' as const },
      })),
    });
    const air = await createSource(app.context(), { kind: 'air', name: 'Air', u: 0.0004, unit: 'kg/m3' });
    const issued = await makeCalibration(
      app,
      laboratory.id,
      '2024-02-10',
      set.members.map((member) =>
        lineOf(member.id, {
          references: [useOf(root.valueUids[0]!, '2024-02-10', 0.1)],
          sources: [
            { sourceUid: member.volumeSourceUid!, sensitivity: 1e-6 },
            { sourceUid: air.uid, sensitivity: 1e-4 },
          ],
        }),
      ),
    );
    expect(new Set(issued.valueUids).size).toBe(25);
  });
});

describe('issuing is refused, field by field', () => {
  it('for dates out of order, in the future, and a repeated line', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    const backwards = await refusal(
      makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(weight.id), lineOf(weight.id)], {
        performedBegin: '2024-01-11',
        issuedOn: '2024-01-09',
      }),
    );
    expect(backwards.id).toBe('unprocessable');
    expect(Object.keys(backwards.fields).sort()).toEqual(['issuedOn', 'lines.1.standardId', 'performedEnd']);
    const future = await refusal(
      makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(weight.id)], { issuedOn: '2999-01-01' }),
    );
    expect(future.fields).toHaveProperty('issuedOn.expected');
  });

  it('for U without k, an unknown reference, no reference, and a foreign weight', async () => {
    const [laboratory, other] = [await makeLaboratory(app), await makeLaboratory(app)];
    const [weight, foreign] = [await makeStandard(app, laboratory.id), await makeStandard(app, other.id)];
    const unknown = '01890000-0000-7000-8000-000000000000';
    const refused = await refusal(
      makeCalibration(app, laboratory.id, '2024-01-10', [
        lineOf(weight.id, { k: null, references: [useOf(unknown, '2024-01-10')] }),
        lineOf(weight.id, { stage: 'as left', rootKind: null }),
        lineOf(foreign.id),
      ]),
    );
    expect(Object.keys(refused.fields).sort()).toEqual([
      'lines.0.k',
      'lines.0.references.0.valueUid',
      'lines.1.references',
      'lines.2.standardId',
    ]);
  });

  it('for a value off by a unit, until a person confirms it', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    const slip = { deviation: '0.123', expandedU: '0.5' };
    const refused = await refusal(
      makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(weight.id, slip)]),
    );
    expect(Object.keys(refused.fields)).toEqual(['lines.0.deviation']);
    const confirmed = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(weight.id, { ...slip, unitConfirmed: true }),
    ]);
    expect(confirmed.valueUids).toHaveLength(1);
  });

  it('for a change of kind without a density, and for a covariance of nothing', async () => {
    const laboratory = await makeLaboratory(app);
    const [above, below] = await Promise.all(
      [1, 2].map(() => makeStandard(app, laboratory.id, { density: null })),
    );
    const root = await makeCalibration(app, laboratory.id, '2024-01-10', [
      lineOf(above!.id, { quantity: 'mass' }),
    ]);
    const kind = await refusal(
      makeCalibration(app, laboratory.id, '2024-02-10', [
        lineOf(below!.id, { references: [useOf(root.valueUids[0]!, '2024-02-10')] }),
      ]),
    );
    expect(Object.keys(kind.fields)).toEqual(['lines.0.references.0.valueUid']);
    const group = await refusal(
      makeCalibration(app, laboratory.id, '2024-02-10', [lineOf(above!.id), lineOf(below!.id)], {
        group: {
          covariance: [
            [1e-10, 2e-10],
            [2e-10, 1e-10],
          ],
        },
      }),
    );
    expect(Object.keys(group.fields)).toEqual(['group.covariance']);
  });

  it('for a certificate that is in the register already, even when two are issued at once', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    const input = inputOf(laboratory.id, '2024-01-10', [lineOf(weight.id)]);
    const outcomes = await Promise.allSettled([
      issueCalibration(app.context(), input),
      issueCalibration(app.context(), input),
    ]);
    const refused = outcomes.filter((outcome) => outcome.status === 'rejected');
    expect(refused).toHaveLength(1);
    expect(refused[0]!.reason).toMatchObject({ id: 'duplicate', fields: { certificateNo: {} } });
  });
});

describe('revising and withdrawing', () => {
  it('re-issues every line and says of each whether it changed', async () => {
    const laboratory = await makeLaboratory(app);
    const [a, b] = [await makeStandard(app, laboratory.id), await makeStandard(app, laboratory.id)];
    const input = inputOf(laboratory.id, '2024-01-10', [lineOf(a.id), lineOf(b.id)]);
    const first = await issueCalibration(app.context(), input);
    const second = await reviseCalibration(app.context(), {
      ...input,
      calibrationId: first.calibrationId,
      issuedOn: '2024-03-01',
      effectiveOn: '2024-03-01',
      reason: 'Value of the second weight mistyped',
      lines: [lineOf(a.id), lineOf(b.id, { deviation: '0.000125' })],
    });
    const states = await Promise.all(second.valueUids.map((uid) => stored(app, uid)));
    expect(states.map((value) => value.changed)).toEqual(['text', 'value']);
    const ends = await readRows<{ kind: string; changed: string; replacedBy: number; effectiveOn: string }>(
      app.database,
      `SELECT e.kind, e.changed, e.replaced_by AS replacedBy, e.effective_on AS effectiveOn FROM value_end e
       JOIN assigned_value v ON v.id = e.value_id WHERE v.uid IN (:uids) ORDER BY v.line`,
      { uids: first.valueUids },
    );
    expect(ends).toEqual(
      states.map((value) => ({
        kind: 'superseded',
        changed: value.changed,
        replacedBy: value.id,
        effectiveOn: '2024-03-01',
      })),
    );
  });

  it('refuses a revision that leaves a line out, and one that closes a circle', async () => {
    const laboratory = await makeLaboratory(app);
    const [a, b] = [await makeStandard(app, laboratory.id), await makeStandard(app, laboratory.id)];
    const input = inputOf(laboratory.id, '2024-01-10', [lineOf(a.id), lineOf(b.id)]);
    const first = await issueCalibration(app.context(), input);
    const below = await makeCalibration(app, laboratory.id, '2024-02-10', [
      lineOf(b.id, { references: [useOf(first.valueUids[0]!, '2024-02-10')] }),
    ]);
    const revision = {
      ...input,
      calibrationId: first.calibrationId,
      issuedOn: '2024-03-01',
      effectiveOn: '2024-03-01',
      reason: 'Tried by a test',
    };
    const short = await refusal(reviseCalibration(app.context(), { ...revision, lines: [lineOf(a.id)] }));
    expect(Object.keys(short.fields)).toEqual(['lines']);
    const circle = await refusal(
      reviseCalibration(app.context(), {
        ...revision,
        lines: [lineOf(a.id, { references: [useOf(below.valueUids[0]!, '2024-01-10')] }), lineOf(b.id)],
      }),
    );
    expect(circle.fields['lines.0.references.0.valueUid']).toMatchObject({
      message: expect.stringMatching(/^A circle: .* leans on .*, which this revision replaces/) as string,
    });
  });

  it('withdraws once, only the revision that stands', async () => {
    const laboratory = await makeLaboratory(app);
    const weight = await makeStandard(app, laboratory.id);
    const issued = await makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(weight.id)]);
    const body = { reason: 'Balance found faulty', effectiveOn: '2024-02-01' };
    const early = await refusal(
      withdrawCalibration(app.context(), issued.revisionId, { ...body, effectiveOn: '2023-01-01' }),
    );
    expect(Object.keys(early.fields)).toEqual(['effectiveOn']);
    await withdrawCalibration(app.context(), issued.revisionId, body);
    const again = await refusal(withdrawCalibration(app.context(), issued.revisionId, body));
    expect(again.id).toBe('duplicate');
  });
});
