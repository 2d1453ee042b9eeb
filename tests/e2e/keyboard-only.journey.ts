import { expect, test, type Page } from '@playwright/test';
import { METROLOGIST, PASSWORD } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

const MOST_STEPS = 80;

/** Presses Tab until the focus is where it is wanted; every stop on the way has to show it. */
async function tabTo(page: Page, isThere: (name: string, role: string) => boolean): Promise<void> {
  for (let step = 0; step < MOST_STEPS; step += 1) {
    await page.keyboard.press('Tab');
    const { name, role } = await page.evaluate(() => {
      const element = document.activeElement;
      const label =
        element?.getAttribute('aria-label') ??
        (element instanceof HTMLInputElement ? element.labels?.[0]?.textContent : element?.textContent);
      return {
        name: label?.trim() ?? '',
        role: element?.getAttribute('role') ?? element?.tagName.toLowerCase() ?? '',
      };
    });
    if (isThere(name, role)) return;
  }
  throw new Error(`Not reached by ${MOST_STEPS} steps of the Tab key.`);
}

test('by keyboard alone: sign in, find a weight, open its chain, select a link, close', async ({ page }) => {
  const { registryNo } = await register.row<{ registryNo: string }>(
    `SELECT s.registry_no AS registryNo FROM assigned_value v JOIN standard s ON s.id = v.standard_id
     JOIN laboratory l ON l.id = v.holder_id JOIN value_link k ON k.child_id = v.id
     WHERE l.code = 'PA' AND v.nominal = 1000 ORDER BY v.effective_from, v.id LIMIT 1`,
  );
  await page.goto('/sign-in');
  await tabTo(page, (name) => name.startsWith('E-mail'));
  await page.keyboard.type(METROLOGIST);
  await tabTo(page, (name) => name.startsWith('Password'));
  await page.keyboard.type(PASSWORD);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();

  await tabTo(page, (name, role) => role === 'combobox' && name === 'Find anything');
  await page.keyboard.type(registryNo);
  await expect(page.getByRole('option', { name: new RegExp(registryNo) }).first()).toBeVisible();
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { level: 1, name: new RegExp(registryNo) })).toBeVisible();

  await tabTo(page, (name, role) => role === 'a' && name === 'Open the chain');
  await page.keyboard.press('Enter');
  await expect(page.getByRole('table', { name: 'Links of the chain' })).toBeVisible();

  const rows = page.getByRole('table', { name: 'Links of the chain' }).locator('[data-row]');
  const second = rows.nth(1);
  const link = (await second.textContent()) ?? '';
  await tabTo(page, (name, role) => role === 'button' && name.includes('→'));
  await page.keyboard.press('ArrowDown');
  await expect(second).toBeFocused();
  await page.keyboard.press('Enter');
  const sheet = page.getByRole('dialog');
  await expect(sheet).toBeVisible();
  await expect(page).toHaveURL(/at=/);
  await page.keyboard.press('Escape');
  await expect(sheet).toBeHidden();
  await expect(second).toBeFocused();
  expect(link).toContain('→');
});
