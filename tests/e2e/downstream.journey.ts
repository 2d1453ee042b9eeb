import { expect, test } from '@playwright/test';
import { METROLOGIST, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

test('from a chain to who leans on it, and what if it were otherwise; the link shows the same', async ({
  page,
}) => {
  const { uid, registryNo } = await register.row<{ uid: string; registryNo: string }>(
    `SELECT v.uid, s.registry_no AS registryNo FROM assigned_value v JOIN standard s ON s.id = v.standard_id
     JOIN laboratory l ON l.id = v.holder_id JOIN value_link k ON k.parent_id = v.id
     JOIN assigned_value c ON c.id = k.child_id
     WHERE l.code = 'PA' AND c.holder_id = v.holder_id
       AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id IN (v.id, c.id))
     GROUP BY v.id, v.uid, s.registry_no ORDER BY COUNT(*) DESC, v.id LIMIT 1`,
  );
  await signIn(page, METROLOGIST);
  await page.goto(`/chains/${uid}`);
  await page.getByRole('link', { name: 'Who leans on this' }).click();
  await expect(page.getByRole('heading', { level: 1 })).toHaveText(`Who leans on ${registryNo}`);

  await page.getByRole('button', { name: 'Port Alder Calibration' }).click();
  await expect(page.getByText(/ shown$/)).toBeVisible();

  await page.getByLabel('Shift, with its unit').fill('-5 g');
  await expect(page.getByText('lighter', { exact: false })).toContainText('5');
  await page.getByRole('button', { name: 'Work it out' }).click();
  const answer = page.getByRole('heading', { level: 2, name: /nothing was changed/ });
  await expect(answer).toContainText('The verdict would change');
  const told = await answer.textContent();

  await page.getByRole('button', { name: 'Largest shift' }).click();
  await expect(page).toHaveURL(/sort=shift/);
  await page.reload();
  await expect(answer).toHaveText(told!);
  await expect(page.getByLabel('Shift, with its unit')).toHaveValue(/5/);

  await page.getByRole('button', { name: 'Back to who leans on it' }).click();
  await expect(page.getByRole('table', { name: 'Who leans on it' })).toBeVisible();
});
