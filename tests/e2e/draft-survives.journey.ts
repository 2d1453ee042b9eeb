import { expect, test } from '@playwright/test';
import { restartServer } from '#tests/support/restart-server.ts';
import { waitUntilSaved } from './support/calibration.ts';
import { JourneyLaboratory } from './support/laboratory.ts';
import { signIn } from './support/people.ts';

const TYPED = 'typed just before the tab was killed';

test('a draft survives a killed tab and a killed server', async ({ context, baseURL }) => {
  const laboratory = await JourneyLaboratory.open();
  // Opened before the first is killed: a browser that has just lost a tab is slow to give another.
  const second = await context.newPage();
  const first = await context.newPage();
  await signIn(first, laboratory.email);
  await first.goto('/calibrations');
  await first.getByRole('link', { name: 'New, from a certificate' }).first().click();
  await first.getByLabel('Certificate number').fill('J killed');
  await waitUntilSaved(first);
  await expect(first).toHaveURL(/\/calibrations\/drafts\/[0-9a-f-]{36}$/);
  const address = first.url();

  await test.step('the tab is killed with words that never reached the server', async () => {
    await first.route('**/api/drafts/**', (route) => route.abort());
    await first.getByLabel('Method').fill(TYPED);
    await first.waitForFunction((text) => JSON.stringify({ ...localStorage }).includes(text), TYPED);
    const session = await context.newCDPSession(first);
    const gone = first.waitForEvent('crash');
    void session.send('Page.crash').catch(() => undefined);
    await gone;
  });

  await test.step('all of it stands in the next tab, and reaches the server', async () => {
    await second.goto(address);
    await expect(second.getByLabel('Certificate number')).toHaveValue('J killed');
    await expect(second.getByLabel('Method')).toHaveValue(TYPED);
    await waitUntilSaved(second);
  });

  await test.step('the server is killed while somebody types', async () => {
    const pidFile = process.env.SERVER_PID_FILE;
    if (!pidFile || !baseURL) throw new Error('SERVER_PID_FILE is not set: run "npm test -- journeys".');
    const restarted = restartServer(pidFile, baseURL);
    await second.getByLabel('Issued on').fill('2026-11-20');
    await restarted;
    await second.getByLabel('Ended on').fill('2026-11-19');
    await waitUntilSaved(second);
  });

  await test.step('the server has every entry', async () => {
    await second.evaluate(() => localStorage.clear());
    await second.reload();
    await expect(second.getByLabel('Certificate number')).toHaveValue('J killed');
    await expect(second.getByLabel('Method')).toHaveValue(TYPED);
    await expect(second.getByLabel('Issued on')).toHaveValue('2026-11-20');
    await expect(second.getByLabel('Ended on')).toHaveValue('2026-11-19');
  });
});
