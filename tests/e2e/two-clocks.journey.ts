import { expect, test, type Page } from '@playwright/test';
import { signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const REGISTRAR = 'registrar@network.example';

const register = new Register();
test.afterAll(() => register.close());

interface Withdrawal {
  uid: string;
  certificateNo: string;
  effectiveOn: string;
  madeKnownOn: string;
  colleague: string;
}

/** A reference withdrawn with effect from before it was made known, and a weight that had leaned on it meanwhile. */
async function backDatedWithdrawal(): Promise<Withdrawal> {
  return register.row<Withdrawal>(
    `SELECT c.uid, k.certificate_no AS certificateNo, x.effective_on AS effectiveOn,
       x.made_known_on AS madeKnownOn, a.email AS colleague
     FROM value_end x JOIN assigned_value v ON v.id = x.value_id
     JOIN revision r ON r.id = v.revision_id JOIN calibration k ON k.id = r.calibration_id
     JOIN value_link l ON l.parent_id = v.id JOIN assigned_value c ON c.id = l.child_id
     JOIN membership m ON m.laboratory_id = c.holder_id AND m.role = 'metrologist'
     JOIN account a ON a.id = m.account_id
     WHERE x.kind = 'withdrawn' AND x.effective_on < x.made_known_on
       AND l.used_end BETWEEN x.effective_on AND x.made_known_on
       AND NOT EXISTS (SELECT 1 FROM value_end e WHERE e.value_id = c.id)
     ORDER BY x.value_id LIMIT 1`,
  );
}

test('back before a withdrawal, forward again, what changed, and the same for a colleague', async ({
  page,
  browser,
}) => {
  const withdrawal = await backDatedWithdrawal();
  await signIn(page, REGISTRAR);
  await page.goto(`/chains/${withdrawal.uid}`);
  const broken = page.getByRole('heading', { level: 2, name: /^1 of \d+ links fails a check$/ });
  await expect(broken).toBeVisible();
  await expect(page.getByText('The work was sound when it was done', { exact: false })).toBeVisible();

  const known = page.getByRole('slider', { name: 'As known on' });
  await stepBackTo(page, known, withdrawal.madeKnownOn);
  await expect(page).toHaveURL(/known=/);
  await expect(
    page.getByRole('heading', { level: 2, name: /^All \d+ links hold their checks$/ }),
  ).toBeVisible();

  await known.press('End');
  await expect(page).not.toHaveURL(/known=/);
  await expect(broken).toBeVisible();

  await page.getByRole('button', { name: 'when it was certified' }).click();
  const changed = page.getByRole('button', {
    name: new RegExp(`${withdrawal.certificateNo}: withdrawn since ${withdrawal.effectiveOn}, was in force`),
  });
  await expect(changed).toBeVisible();
  const link = page.getByRole('button', { name: /by what is known now: broken, was sound \(B-15\)/ });
  await link.click();
  await expect(page.getByRole('dialog')).toContainText('B-15');
  await page.keyboard.press('Escape');
  await expect(page.getByRole('dialog')).toBeHidden();

  const colleague = await (await browser.newContext()).newPage();
  await signIn(colleague, withdrawal.colleague);
  const reply = colleague.waitForResponse((response) => isChain(response.url(), withdrawal.uid));
  await colleague.goto(page.url());
  await expect(colleague.getByRole('button', { name: /broken, was sound \(B-15\)/ })).toBeVisible();
  await expect(
    colleague.getByRole('heading', { level: 2, name: /^1 of \d+ links fails a check$/ }),
  ).toBeVisible();
  const { nodes } = (await (await reply).json()) as { nodes: { view?: string; holder?: unknown }[] };
  const stated = nodes.filter((node) => node.view === 'statement');
  expect(stated.length).toBeGreaterThan(0);
  expect(stated.map((node) => node.holder)).toEqual(stated.map(() => null));
  await colleague.context().close();
});

test('a link made under other rules says so', async ({ page }) => {
  const { uid } = await backDatedWithdrawal();
  await signIn(page, REGISTRAR);
  await page.goto(`/chains/${uid}?rules=2001-01-01.1`);
  await expect(page.getByText('The link was made under rule set 2001-01-01.1.')).toBeVisible();
  await page.getByRole('button', { name: 'Ask by the present rules' }).click();
  await expect(page).not.toHaveURL(/rules=/);
});

/** Event by event with the left arrow, until the handle stands before a day. */
async function stepBackTo(page: Page, slider: ReturnType<Page['getByRole']>, day: string): Promise<void> {
  await slider.focus();
  const dayOf = async () => (await slider.getAttribute('aria-valuetext'))!.slice(0, 10);
  while ((await dayOf()) >= day) {
    const before = await dayOf();
    await page.keyboard.press('ArrowLeft');
    await expect.poll(dayOf).not.toBe(before);
  }
}

function isChain(url: string, uid: string): boolean {
  return new URL(url).pathname === `/api/chains/${uid}`;
}
