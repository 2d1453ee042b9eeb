import { describe, expect, it } from 'vitest';
import { readRow, readRows } from '#server/db/read.ts';
import { adoptPolicy, assertScopeLine, createScaleVersion } from '#server/modules/network/index.ts';
import { RECORDED_TABLES, verifyRecord } from '#server/modules/record/index.ts';
import { withdrawCalibration } from '#server/modules/calibrations/index.ts';
import { lineOf, makeCalibration, makeStandard } from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';
import { looseCalibration, makeScene } from './walk/scene.ts';

const app = await testApp();

/** Other test files share this database and may tamper too, so each test looks at its own act. */
async function problemsOf(actSeq: number) {
  const report = await verifyRecord(app.database);
  return report.problems.filter((problem) => problem.actSeq === actSeq);
}

async function lastActSeq(): Promise<number> {
  const row = await readRow<{ seq: number }>(app.database, 'SELECT MAX(seq) AS seq FROM act');
  return row?.seq ?? 0;
}

async function makeScopeLine(): Promise<{ id: string; actSeq: number }> {
  const laboratory = await makeLaboratory(app);
  const { id } = await assertScopeLine(app.context(), {
    laboratoryId: laboratory.id,
    line: 1,
    quantity: 'conventional mass',
    nominalFrom: '1',
    nominalTo: '20000.5',
    method: 'direct comparison',
    bestUConstant: '0.0000031',
    bestURelative: 1.6e-7,
    k: '2',
    coverage: '0.95450',
    state: 'granted',
    validFrom: '2020-01-01',
    validTo: null,
  });
  return { id, actSeq: await lastActSeq() };
}

describe('the record of acts', () => {
  it('holds for every act and row that the product wrote', async () => {
    const before = await lastActSeq();
    const laboratory = await makeLaboratory(app);
    await makePerson(app, 'signatory', laboratory.id);
    await makeScopeLine();
    await createScaleVersion(app.context(), {
      name: `scale ${laboratory.code}`,
      basis: 'a consensus value',
      validFrom: '2021-02-01',
      validTo: null,
    });
    await adoptPolicy(app.context(), {
      name: `policy ${laboratory.code}`,
      edition: '1',
      content: { z: '0.10', a: { list: [1, 1e-7, null, true], text: 'ü' } },
      validFrom: '2021-02-01',
      validTo: null,
    });
    const report = await verifyRecord(app.database);
    expect(report.acts).toBeGreaterThan(before + 5);
    expect(report.problems.filter((problem) => problem.actSeq > before)).toEqual([]);
  });

  it('holds for weights, calibrations with their links and sources, a revision and a withdrawal', async () => {
    const before = await lastActSeq();
    const scene = await makeScene(app);
    const sheet = await looseCalibration(scene);
    await withdrawCalibration(app.context(), sheet.revisionId, {
      reason: 'The balance was not level',
      effectiveOn: '2024-09-01',
    });
    const [first, second] = [await makeStandard(app, scene.home.id), await makeStandard(app, scene.home.id)];
    await makeCalibration(
      app,
      scene.home.id,
      '2024-10-01',
      [
        lineOf(first.id, {
          sources: [{ sourceUid: first.volumeSourceUid!, sensitivity: 1e-6 }],
          components: [
            {
              name: 'Repeatability',
              evaluation: 'A',
              distribution: 'normal',
              standardUncertainty: 0.0001,
              sensitivity: 1,
              degreesOfFreedom: 9,
            },
          ],
        }),
        lineOf(second.id),
      ],
      {
        group: {
          covariance: [
            [1e-8, 2e-9],
            [2e-9, 1e-8],
          ],
          degreesOfFreedom: 9,
        },
      },
    );
    const report = await verifyRecord(app.database);
    expect(report.problems.filter((problem) => problem.actSeq > before)).toEqual([]);
    const links = await readRows(app.database, 'SELECT child_id FROM value_link LIMIT 1');
    const sources = await readRows(app.database, 'SELECT child_id FROM source_link LIMIT 1');
    const covariances = await readRows(app.database, 'SELECT group_id FROM group_covariance LIMIT 1');
    const components = await readRows(app.database, 'SELECT value_id FROM component LIMIT 1');
    expect([links, sources, covariances, components].map((rows) => rows.length)).toEqual([1, 1, 1, 1]);
  });

  it('finds a link whose sensitivity was changed, a value that was shifted and an end that was taken back', async () => {
    const scene = await makeScene(app);
    const sheet = await looseCalibration(scene);
    await withdrawCalibration(app.context(), sheet.revisionId, {
      reason: 'Mistaken',
      effectiveOn: '2024-09-01',
    });
    const before = await verifyRecord(app.database);
    await app.owner.query(
      `UPDATE value_link SET sensitivity = 0.999 WHERE child_id = (SELECT id FROM assigned_value WHERE uid = '${scene.valueUid}')`,
    );
    await app.owner.query(
      `UPDATE assigned_value SET deviation = deviation + 0.000000000001 WHERE uid = '${scene.referenceUid}'`,
    );
    await app.owner.query(
      `DELETE FROM value_end WHERE value_id IN (SELECT id FROM assigned_value WHERE revision_id = '${sheet.revisionId}')`,
    );
    const after = await verifyRecord(app.database);
    const known = new Set(before.problems.map((problem) => problem.sentence));
    const found = after.problems
      .filter((problem) => !known.has(problem.sentence))
      .map((problem) => problem.where);
    expect(found.sort()).toEqual(['assigned_value', 'value_end', 'value_link']);
  });

  it('numbers acts without gaps when many run at once', async () => {
    const before = await lastActSeq();
    await Promise.all(Array.from({ length: 8 }, () => makeLaboratory(app)));
    const rows = await readRows<{ seq: number }>(
      app.database,
      'SELECT seq FROM act WHERE seq > :before ORDER BY seq',
      {
        before,
      },
    );
    expect(rows.map((row) => row.seq)).toEqual(rows.map((_, index) => before + 1 + index));
    expect(rows.length).toBeGreaterThanOrEqual(16);
  });

  it('names the act and the table of a row changed as the owner', async () => {
    const line = await makeScopeLine();
    expect(await problemsOf(line.actSeq)).toEqual([]);
    await app.owner.query(`UPDATE scope_line SET best_u_constant = 0.0000011 WHERE id = '${line.id}'`);
    expect(await problemsOf(line.actSeq)).toEqual([
      {
        actSeq: line.actSeq,
        where: 'scope_line',
        sentence: `Act ${line.actSeq} (scope.assert of scope_line ${line.id}): a row of scope_line is not what the act wrote.`,
      },
    ]);
    await app.owner.query(`UPDATE scope_line SET best_u_constant = 0.0000031 WHERE id = '${line.id}'`);
    expect(await problemsOf(line.actSeq)).toEqual([]);
  });

  it('names a row that was removed, and one that was slipped in', async () => {
    const line = await makeScopeLine();
    await app.owner.query(`DELETE FROM scope_line WHERE id = '${line.id}'`);
    const [removed] = await problemsOf(line.actSeq);
    expect(removed?.sentence).toMatch(/wrote 1 rows of scope_line; there are 0/);
    const columns = `id, laboratory_id, line, quantity, nominal_from, nominal_to, method, best_u_constant,
      best_u_relative, k, coverage, state, valid_from, valid_to, recorded_at, act_seq`;
    const laboratory = await makeLaboratory(app);
    const other = await lastActSeq();
    await app.owner.query(
      `INSERT INTO scope_line (${columns}) VALUES ('${line.id}', '${laboratory.id}', 1, 'mass', 1, 2, 'm', 1, 0, 2,
       0.95, 'granted', '2020-01-01', NULL, NOW(6), ${other})`,
    );
    const [slipped] = await problemsOf(other);
    expect(slipped?.sentence).toMatch(/wrote 0 rows of scope_line; there are 1/);
    await app.owner.query(`DELETE FROM scope_line WHERE id = '${line.id}'`);
  });

  it('names an act whose content was rewritten, and the break in the chain after it', async () => {
    await makeLaboratory(app);
    const actSeq = await lastActSeq();
    const kept = await readRow<{ content: string; sha256: string }>(
      app.database,
      'SELECT content, content_sha256 AS sha256 FROM act WHERE seq = :actSeq',
      { actSeq },
    );
    const forged = (kept?.content ?? '').replace('"granted"', '"withdrawn"');
    expect(forged).not.toBe(kept?.content);
    await app.owner.query('UPDATE act SET content = :forged WHERE seq = :actSeq', {
      replacements: { forged, actSeq },
    });
    expect((await problemsOf(actSeq))[0]?.sentence).toMatch(/its content is not what was recorded/);
    await app.owner.query('UPDATE act SET content_sha256 = SHA2(content, 256) WHERE seq = :actSeq', {
      replacements: { actSeq },
    });
    expect((await problemsOf(actSeq))[0]?.sentence).toMatch(/does not follow from the act before it/);
    await app.owner.query('UPDATE act SET content = :content, content_sha256 = :sha256 WHERE seq = :actSeq', {
      replacements: { content: kept?.content, sha256: kept?.sha256, actSeq },
    });
    expect(await problemsOf(actSeq)).toEqual([]);
  });

  it('covers every table that is insert-only', async () => {
    const rows = await readRows<{ name: string }>(
      app.database,
      `SELECT TABLE_NAME AS name FROM information_schema.COLUMNS
       WHERE TABLE_SCHEMA = DATABASE() AND COLUMN_NAME = 'act_seq'`,
    );
    for (const { name } of rows) expect(RECORDED_TABLES).toContain(name);
  });
});
