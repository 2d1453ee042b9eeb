import { randomUUID } from 'node:crypto';
import { expect, test } from '@playwright/test';
import { openDatabase } from '#server/db/sequelize.ts';
import { makeContext } from '#server/http/context.ts';
import { issueCalibration } from '#server/modules/calibrations/index.ts';
import { toolEnvironment } from '#tests/support/tool-environment.ts';
import { fillCertificate, issueOpenDraft, waitUntilSaved } from './support/calibration.ts';
import { daysAgo } from './support/days.ts';
import { JourneyLaboratory, recognizedInstitute } from './support/laboratory.ts';
import { PASSWORD, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

/**
 * A laboratory whose weight was calibrated from a reference long after that was due, and whose reference has been
 * calibrated again since. @returns the two weights
 */
async function laboratoryWithBrokenLink(laboratory: JourneyLaboratory) {
  const density = { value: '7950', expandedU: '140', k: '2', origin: 'assumed' } as const;
  const kept = {
    marking: '1 kg',
    class: 'E2',
    serial: '4711',
    density,
    inServiceFrom: '2020-01-01',
  } as const;
  const reference = await laboratory.register({ ...kept, intervalMonths: 12 });
  const weight = await laboratory.register({ ...kept, class: 'F1', serial: '4712' });
  const institute = await recognizedInstitute();
  const { id: instituteId } = await register.row<{ id: string }>(
    'SELECT id FROM laboratory WHERE name = :name',
    { name: institute.name },
  );
  const database = openDatabase(toolEnvironment().databaseUrl, 2);
  const issue = (issuerId: string, day: string, standardId: string, leansOn: string | null) =>
    issueCalibration(makeContext({ database }), {
      issuerId,
      registeredById: laboratory.id,
      certificateNo: `J ${randomUUID().slice(0, 8)}`,
      issuedOn: day,
      performedBegin: day,
      performedEnd: day,
      method: 'Substitution weighing',
      lines: [
        {
          standardId,
          quantity: 'conventional mass',
          deviation: leansOn ? '0.00021' : '0.00012',
          reportedUnit: 'mg',
          reportedDecimals: 2,
          expandedU: leansOn ? '0.0009' : '0.0003',
          reportedUDecimals: 2,
          k: '2',
          rootKind: leansOn ? null : 'recognized certificate',
          ...(leansOn
            ? { references: [{ valueUid: leansOn, sensitivity: 1, usedBegin: day, usedEnd: day }] }
            : {}),
        },
      ],
    });
  const first = await issue(instituteId, daysAgo(1200), reference.id, null);
  await issue(laboratory.id, daysAgo(400), weight.id, first.valueUids[0]!);
  await issue(instituteId, daysAgo(60), reference.id, null);
  await database.close();
  return { reference: reference.registryNo, weight: weight.registryNo, weightId: weight.id };
}

test('from a finding to the broken link, and on to the calibration that mends it', async ({ page }) => {
  const laboratory = await JourneyLaboratory.open();
  const { reference, weight, weightId } = await laboratoryWithBrokenLink(laboratory);
  await signIn(page, laboratory.email);

  await test.step('an audit of the laboratory finds the step', async () => {
    await page.getByRole('link', { name: 'Audits', exact: true }).click();
    await page.getByRole('button', { name: 'Begin the audit' }).click();
    await expect(page.getByRole('heading', { level: 1 })).toHaveText(`Audit: ${laboratory.name}`);
    await page.getByRole('button', { name: /B-14/ }).click();
    await expect(page.getByText('Calibrate the weight again, leaning on a value').first()).toBeVisible();
  });

  await test.step('the finding leads to the link in its chain, on the audited day', async () => {
    await page
      .getByRole('link', { name: `${weight} ← ${reference}` })
      .first()
      .click();
    await expect(page).toHaveURL(/\/chains\/[0-9a-f-]+\?day=.*&known=.*&at=/);
    const sheet = page.getByRole('dialog', { name: `${reference} → ${weight}` });
    await expect(sheet.getByText(/was due on/).first()).toBeVisible();
    await sheet.getByRole('link', { name: 'Start the calibration' }).first().click();
  });

  await test.step('the draft begins with the weight and the newest value of its reference', async () => {
    await expect(page.getByLabel(`Value of ${weight}, 1 kg`)).toBeVisible();
    await page.getByRole('button', { name: `More of ${weight}, 1 kg` }).click();
    await expect(page.getByText(new RegExp(`${reference}.*${daysAgo(60)}`)).first()).toBeVisible();
    await fillCertificate(page, {
      issuer: laboratory.name,
      certificateNo: `J ${weight}`,
      day: daysAgo(3),
      method: 'Substitution weighing',
    });
    await page.getByLabel(`Value of ${weight}, 1 kg`).fill('0.22');
    await page.getByLabel(`U of ${weight}, 1 kg`).fill('0.90');
    await waitUntilSaved(page);
    await issueOpenDraft(page, PASSWORD);
  });

  await test.step('the new chain leans on it in date; what was done long ago is told as it was done', async () => {
    const { uid } = await register.row<{ uid: string }>(
      'SELECT uid FROM assigned_value WHERE standard_id = :weightId ORDER BY performed_end DESC LIMIT 1',
      { weightId },
    );
    const chain = (await (await page.request.get(`/api/chains/${uid}`)).json()) as {
      links: { role: string; conduct: string; today: string }[];
    };
    const steps = chain.links.filter((link) => link.role === 'reference');
    expect(steps).toHaveLength(1);
    expect(steps[0]).not.toMatchObject({ conduct: 'broken' });
    expect(steps[0]).not.toMatchObject({ today: 'broken' });
    await page.goto('/audits');
    await page.getByRole('button', { name: 'Begin the audit' }).click();
    await expect(page.getByRole('heading', { name: 'Found' })).toBeVisible();
    await page.getByRole('button', { name: /B-14/ }).click();
    // The old step alone: of the new one the rule finds nothing amiss.
    await expect(page.getByRole('link', { name: `${weight} ← ${reference}` })).toHaveCount(1);
    await expect(page.getByText('fails, critical').last()).toBeVisible();
  });
});
