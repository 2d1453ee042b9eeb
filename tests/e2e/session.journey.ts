import { expect, test, type Page } from '@playwright/test';
import { METROLOGIST, signIn } from './support/people.ts';

const ground = (page: Page) =>
  page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor.replaceAll(' ', ''));

test('sign-in survives a refresh, the theme survives a visit, sign-out ends both ways in', async ({
  page,
}) => {
  await page.goto('/standards');
  await expect(page).toHaveURL(/\/sign-in\?from=%2Fstandards/);
  await signIn(page, METROLOGIST);
  await page.reload();
  await expect(page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();

  await page.getByRole('button', { name: 'Preferences' }).click();
  const paper = await ground(page);
  await page.getByRole('radio', { name: 'Lamp' }).check({ force: true });
  const lamp = await ground(page);
  expect(lamp).not.toBe(paper);
  await page.getByRole('button', { name: 'Done' }).click();
  await page.reload();
  await expect(page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();
  expect(await ground(page)).toBe(lamp);

  await page.getByRole('button', { name: 'Sign out' }).click();
  await expect(page).toHaveURL(/\/sign-in/);
  expect((await page.request.get('/api/desk')).status()).toBe(401);
  await page.goto('/desk');
  await expect(page).toHaveURL(/\/sign-in/);
});
