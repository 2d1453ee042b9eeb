import { expect, test } from '@playwright/test';
import { waitUntilSaved } from './support/calibration.ts';
import { JourneyLaboratory } from './support/laboratory.ts';
import { signIn } from './support/people.ts';

test('a stale save is answered with both versions, and a person chooses', async ({ browser }) => {
  const laboratory = await JourneyLaboratory.open();
  const mine = await (await browser.newContext()).newPage();
  await signIn(mine, laboratory.email);
  await mine.goto('/calibrations');
  await mine.getByRole('link', { name: 'New, from a certificate' }).first().click();
  await mine.getByLabel('Certificate number').fill('J two tabs');
  await waitUntilSaved(mine);
  await expect(mine).toHaveURL(/\/calibrations\/drafts\/[0-9a-f-]{36}$/);

  // Another browser: it shares nothing with the first but the server.
  const theirs = await (await browser.newContext()).newPage();
  await signIn(theirs, laboratory.email);
  await theirs.goto(mine.url());
  await theirs.getByLabel('Method').fill('as the other tab has it');
  await waitUntilSaved(theirs);

  const stale = mine.waitForResponse((reply) => reply.request().method() === 'PUT');
  await mine.getByLabel('Method').fill('as this tab has it');
  const reply = await stale;
  expect(reply.status()).toBe(409);
  const problem = (await reply.json()) as { type: string; current: { content: { method: string } } };
  expect(problem.type).toBe('/problems/stale');
  expect(problem.current.content.method).toBe('as the other tab has it');

  const dialog = mine.getByRole('dialog', { name: 'Two versions of this draft' });
  await expect(dialog.getByText('as this tab has it')).toBeVisible();
  await expect(dialog.getByText('as the other tab has it')).toBeVisible();
  await dialog.getByRole('button', { name: 'All of mine' }).click();
  await waitUntilSaved(mine);
  await theirs.reload();
  await expect(theirs.getByLabel('Method')).toHaveValue('as this tab has it');
  await expect(theirs.getByLabel('Certificate number')).toHaveValue('J two tabs');
});
