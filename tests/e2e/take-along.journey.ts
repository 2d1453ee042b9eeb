import { readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { expect, test, type Browser } from '@playwright/test';
import { METROLOGIST, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

/** A value of the laboratory in force, with a chain above it. */
function someValue() {
  return register.row<{ uid: string; registryNo: string }>(
    `SELECT v.uid, s.registry_no AS registryNo FROM assigned_value v JOIN standard s ON s.id = v.standard_id
     JOIN laboratory l ON l.id = v.holder_id WHERE l.code = 'PA' AND v.quantity = 'conventional mass'
     AND EXISTS (SELECT 1 FROM value_link k WHERE k.child_id = v.id)
     AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = v.id) ORDER BY v.effective_from DESC, v.id LIMIT 1`,
  );
}

/** What a page says of itself where there is no connection at all. */
async function verdictOffline(browser: Browser, file: string, javaScriptEnabled = true) {
  const context = await browser.newContext({ offline: true, javaScriptEnabled });
  const page = await context.newPage();
  const asked: string[] = [];
  page.on('request', (request) => asked.push(request.url()));
  await page.goto(pathToFileURL(file).href);
  const said = await page.locator('#verdict').textContent();
  const drawn = await page.locator('svg [data-plate]').count();
  await context.close();
  return { said, drawn, asked: asked.filter((url) => !url.startsWith('file:') && !url.startsWith('data:')) };
}

test('a chain is taken along, verifies itself without a connection, and finds one digit changed', async ({
  page,
  browser,
}, testInfo) => {
  const { uid, registryNo } = await someValue();
  await signIn(page, METROLOGIST);
  await page.goto(`/chains/${uid}`);
  await page.getByText('Take along', { exact: true }).click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Page for offline, HTML' }).click(),
  ]);
  expect(download.suggestedFilename()).toMatch(new RegExp(`^${registryNo} chain .* [0-9a-f]{16}\\.html$`));
  await expect(page.getByRole('status').filter({ hasText: 'Saved as' })).toContainText(registryNo);
  const whole = testInfo.outputPath('whole.html');
  await download.saveAs(whole);
  const html = await readFile(whole, 'utf8');

  await test.step('as it was saved', async () => {
    const { said, drawn, asked } = await verdictOffline(browser, whole);
    expect(said).toBe('The content of this page matches its hash.');
    expect(drawn).toBeGreaterThan(2);
    expect(asked).toEqual([]);
  });

  const changed = async (name: string, from: RegExp, to: string) => {
    const text = html.replace(from, to);
    expect(text).not.toBe(html);
    const file = path.join(testInfo.outputDir, name);
    await writeFile(file, text);
    return (await verdictOffline(browser, file)).said;
  };

  await test.step('one digit changed in the data, one in the table', async () => {
    expect(await changed('data.html', /("deviation":"-?0\.\d*?)[1-8]/, '$19')).toContain(
      'its data were changed',
    );
    expect(await changed('table.html', /determined 20/, 'determined 21')).toContain('its words were changed');
  });

  await test.step('with scripts off', async () => {
    expect((await verdictOffline(browser, whole, false)).said).toContain('By hand it takes one command');
  });
});

test('a drawing is taken along as a picture, and the screen is printed with the drawing and without controls', async ({
  page,
}) => {
  const { uid } = await someValue();
  await signIn(page, METROLOGIST);
  await page.goto(`/chains/${uid}`);
  await page.getByText('Take along', { exact: true }).click();
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('button', { name: 'Drawing, PNG', exact: true }).click(),
  ]);
  const png = await readFile(await download.path());
  expect(png.subarray(1, 4).toString('latin1')).toBe('PNG');
  expect(png.readUInt32BE(16)).toBeGreaterThan(900);

  await page.emulateMedia({ media: 'print' });
  await page.evaluate(() => window.dispatchEvent(new Event('beforeprint')));
  await expect(page.getByRole('img', { name: 'The chain, drawn' })).toBeVisible();
  await expect(page.getByRole('table', { name: 'Links of the chain' })).toBeVisible();
  await expect(page.getByText('In force on', { exact: true }).first()).toBeHidden();
  await expect(page.getByRole('navigation', { name: 'Sections' })).toBeHidden();
});
