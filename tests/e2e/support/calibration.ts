import { expect, type Page } from '@playwright/test';

/** Types into a box that searches, and takes the option that is offered by this name. */
export async function choose(page: Page, label: string, typed: string, option: RegExp): Promise<void> {
  const box = page.getByRole('combobox', { name: label, exact: true });
  await box.fill(typed);
  await page.getByRole('option', { name: option }).first().click();
}

/** The head of a certificate, typed. */
export async function fillCertificate(
  page: Page,
  head: { issuer: string; certificateNo: string; day: string; begunOn?: string; method: string },
): Promise<void> {
  const issuedBy = page.getByRole('combobox', { name: 'Issued by', exact: true });
  if (!(await issuedBy.inputValue()).includes(head.issuer))
    await choose(page, 'Issued by', head.issuer, new RegExp(head.issuer));
  await page.getByLabel('Certificate number').fill(head.certificateNo);
  await page.getByLabel('Issued on').fill(head.day);
  await page.getByLabel('Begun on').fill(head.begunOn ?? head.day);
  await page.getByLabel('Ended on').fill(head.day);
  await page.getByLabel('Method').fill(head.method);
}

/** Waits until the server has every entry of the draft. */
export async function waitUntilSaved(page: Page): Promise<void> {
  await expect(page.getByRole('status').filter({ hasText: /saved \d\d:\d\d:\d\d/ })).toBeVisible();
}

/** Signs the draft that is open; the sheet it became stands afterwards. */
export async function issueOpenDraft(page: Page, password: string): Promise<void> {
  await page.getByRole('button', { name: 'Issue', exact: true }).click();
  const dialog = page.getByRole('dialog', { name: 'Issue this calibration' });
  await dialog.getByLabel(/Your password again/).fill(password);
  await dialog.getByRole('button', { name: 'Sign and issue' }).click();
  await expect(page).toHaveURL(/\/calibrations\/(?!drafts)[0-9a-f-]+$/);
}
