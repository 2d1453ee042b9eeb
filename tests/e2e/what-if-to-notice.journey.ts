import { expect, test } from '@playwright/test';
import { PASSWORD, SIGNATORY, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const INSTITUTE_SIGNATORY = 'signatory@orrin.example';
const register = new Register();
test.afterAll(() => register.close());

test('a supposed notice, its groups, kept and opened by its address, and on to publishing it', async ({
  page,
}) => {
  await signIn(page, INSTITUTE_SIGNATORY);
  await page.goto('/chains');
  await page.getByRole('link', { name: 'What if', exact: true }).click();
  await page.getByLabel('Suppose', { exact: true }).selectOption({ label: 'A notice is published' });
  await page.getByLabel('Day 1', { exact: true }).fill('2015-01-01');
  await page.getByRole('button', { name: 'Add this change' }).click();
  await expect(page.getByText('Write a shift with its unit, or 0.')).toBeVisible();
  await page.getByLabel('Shift on day 1').fill('-300 ug');
  await page.getByRole('button', { name: 'Add this change' }).click();

  const answer = page.getByRole('heading', { level: 2, name: /nothing was changed/ });
  await expect(answer).toContainText('The verdict would change');
  const told = await answer.textContent();
  const table = page.getByRole('table', { name: 'What it would do' });
  await expect(table.getByRole('button', { name: 'Port Alder Calibration' })).toBeVisible();

  await page.getByLabel('Name', { exact: true }).fill('A notice of 300 µg');
  await page.getByRole('button', { name: 'Keep it' }).click();
  const kept = page.getByRole('link', { name: 'A notice of 300 µg' });
  await expect(kept).toBeVisible();
  const address = await kept.getAttribute('href');

  await expect(page.getByText(/^What this will touch: \d+ in all/)).toBeVisible();
  await page.getByRole('link', { name: 'Publish as a notice' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'New notice' })).toBeVisible();
  expect(decodeURIComponent(page.url())).toContain('"shift":"-0.0003"');

  await page.goto(address!);
  await expect(page.getByRole('heading', { level: 1, name: 'A notice of 300 µg' })).toBeVisible();
  await expect(answer).toHaveText(told!);
});

test('a supposed withdrawal becomes the act, under the password, and the register shows it', async ({
  page,
}) => {
  // One that nothing leans on: what other journeys walk stays as it is.
  const { uid, certificateNo } = await register.row<{ uid: string; certificateNo: string }>(
    `SELECT v.uid, c.certificate_no AS certificateNo FROM assigned_value v
     JOIN revision r ON r.id = v.revision_id JOIN calibration c ON c.id = r.calibration_id
     JOIN laboratory l ON l.id = c.registered_by_id AND l.id = v.holder_id
     WHERE l.code = 'PA' AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = v.id)
       AND NOT EXISTS (SELECT 1 FROM assigned_value o JOIN value_link k ON k.parent_id = o.id
                       WHERE o.revision_id = r.id)
     ORDER BY v.effective_from, v.id LIMIT 1`,
  );
  await signIn(page, SIGNATORY);
  await page.goto(`/chains/${uid}/downstream`);
  await page.getByLabel('Suppose', { exact: true }).selectOption({ label: 'Its certificate is withdrawn' });
  await page.getByRole('button', { name: 'Work it out' }).click();
  await page.getByRole('button', { name: `Withdraw certificate ${certificateNo}` }).click();

  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Reason').fill('The balance was found faulty');
  await dialog.getByLabel('Your password again').fill('not my password');
  await dialog.getByRole('button', { name: /^Withdraw/ }).click();
  await expect(dialog.getByText(/This is not your password/)).toBeVisible();
  await expect(dialog.getByLabel('Reason')).toHaveValue('The balance was found faulty');
  await dialog.getByLabel('Your password again').fill(PASSWORD);
  await dialog.getByRole('button', { name: /^Withdraw/ }).click();

  const recorded = page.getByText(/^Recorded as act \d+$/);
  await expect(recorded).toBeVisible();
  const seq = Number((await recorded.textContent())!.replace(/\D/g, ''));
  const act = await register.row<{ kind: string }>('SELECT kind FROM act WHERE seq = :seq', { seq });
  expect(act.kind).toBe('calibration.withdraw');
});
