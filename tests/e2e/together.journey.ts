import { expect, test } from '@playwright/test';
import { METROLOGIST, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

test('two weights of one set: more certain in their difference than in their sum, and why', async ({
  page,
}) => {
  const [one, other] = await register.rows<{ uid: string; registryNo: string }>(
    `SELECT v.uid, s.registry_no AS registryNo FROM assigned_value v JOIN standard s ON s.id = v.standard_id
     JOIN laboratory l ON l.id = v.holder_id
     WHERE l.code = 'PA' AND s.registry_no IN ('PA 0300-01', 'PA 0300-02') AND v.quantity = 'conventional mass'
       AND v.id = (SELECT MAX(w.id) FROM assigned_value w WHERE w.standard_id = v.standard_id
                   AND w.quantity = v.quantity)
     ORDER BY s.registry_no`,
  );
  await signIn(page, METROLOGIST);
  await page.goto(`/chains/${one!.uid}`);
  await page.getByRole('link', { name: /^Weigh together with/ }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Weights together' })).toBeVisible();

  await page.getByLabel('A further weight').fill(other!.registryNo);
  await page.getByRole('option', { name: other!.registryNo }).first().click();
  const sums = page.getByRole('table', { name: 'Sum and difference' });
  await expect(sums.getByRole('rowheader', { name: 'On one pan: sum' })).toBeVisible();
  await page
    .getByRole('group', { name: `Pan of ${other!.registryNo}` })
    .getByText('the other')
    .click();
  await expect(page).toHaveURL(/signs=/);
  await expect(sums.getByRole('rowheader', { name: 'As they lie: difference' })).toBeVisible();

  const uncertainty = async (name: string): Promise<number> => {
    const text = await sums.getByRole('row', { name }).getByRole('cell').nth(1).textContent();
    const [, value, unit] = /([\d.]+)\s*(µg|mg)/.exec(text!)!;
    return Number(value) * (unit === 'mg' ? 1000 : 1);
  };
  expect(await uncertainty('difference')).toBeLessThan(await uncertainty('sum'));
  await expect(page.getByRole('table', { name: 'Correlation' })).toContainText('1.000');

  const shared = page.getByRole('table', { name: 'What they share' });
  await expect(shared.getByRole('link').first()).toBeVisible();
  await page.reload();
  await expect(sums.getByRole('rowheader', { name: 'As they lie: difference' })).toBeVisible();
  await shared.getByRole('link').first().click();
  await expect(page).toHaveURL(/\/chains\/[0-9a-f-]{36}$/);
});
