import { expect, test } from '@playwright/test';
import { choose, fillCertificate, waitUntilSaved } from './support/calibration.ts';
import { daysAgo } from './support/days.ts';
import { JourneyLaboratory, recognizedInstitute } from './support/laboratory.ts';
import { PASSWORD, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

test('a double click issues once', async ({ page }) => {
  const institute = await recognizedInstitute();
  const laboratory = await JourneyLaboratory.open();
  const { id, registryNo } = await laboratory.register({ marking: '1 kg', class: 'E2' });
  await signIn(page, laboratory.email);
  await page.goto('/calibrations');
  await page.getByRole('link', { name: 'New, from a certificate' }).first().click();
  await fillCertificate(page, {
    issuer: institute.name,
    certificateNo: `J ${registryNo}`,
    day: daysAgo(50),
    method: 'Comparison',
  });
  await choose(page, 'Add a weight or a set', registryNo, new RegExp(registryNo));
  await page.getByLabel(`Value of ${registryNo}, 1 kg`).fill('0.31');
  await page.getByLabel(`U of ${registryNo}, 1 kg`).fill('0.24');
  await waitUntilSaved(page);
  await page.getByRole('button', { name: 'Issue', exact: true }).click();
  const dialog = page.getByRole('dialog', { name: 'Issue this calibration' });
  await dialog.getByLabel(/Your password again/).fill(PASSWORD);
  await dialog.getByRole('button', { name: 'Sign and issue' }).dblclick();
  await expect(page).toHaveURL(/\/calibrations\/(?!drafts)[0-9a-f-]+$/);
  const { values } = await register.row<{ values: number }>(
    'SELECT COUNT(*) AS `values` FROM assigned_value WHERE standard_id = :id',
    { id },
  );
  expect(values).toBe(1);
});
