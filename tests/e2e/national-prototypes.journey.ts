import { expect, test, type Page } from '@playwright/test';
import { unpackChecks, type PackedChainResponse } from '#shared/contracts/packed-checks.ts';
import { choose, issueOpenDraft } from './support/calibration.ts';
import { JourneyLaboratory, recognizedInstitute } from './support/laboratory.ts';
import { PASSWORD, signIn } from './support/people.ts';
import { Register } from './support/register.ts';

const register = new Register();
test.afterAll(() => register.close());

/*
 * Masses of two national prototypes of the kilogram, numbered as in the source, as deviation from 1 kg in mg:
 * R. S. Davis, J. Res. Natl. Bur. Stand. 90 (1985) 263-283, abstract (read in a reproduction). The abstract states
 * no uncertainty; 1984 is the year of the recalibration it reports.
 */
const HISTORY = [
  { year: 1889, results: { K20: '-0.039', K4: '-0.075' } },
  { year: 1948, results: { K20: '-0.019' } },
  { year: 1984, results: { K20: '-0.022', K4: '-0.106' } },
] as const;

test('a published history without uncertainties stays without uncertainties', async ({ page }) => {
  const institute = await recognizedInstitute();
  const laboratory = await JourneyLaboratory.open();
  const prototype = (marking: string) =>
    laboratory.register({ marking, kind: 'prototype', material: 'platinum-iridium' });
  const prototypes = { K20: await prototype('K20'), K4: await prototype('K4') };
  const weight = await laboratory.register({ marking: '1 kg' });
  await signIn(page, laboratory.email);

  for (const { year, results } of HISTORY) {
    await test.step(`the certificate of ${year} is entered and issued`, async () => {
      await page.goto('/calibrations');
      await page.getByRole('link', { name: 'New, from a certificate' }).first().click();
      await fillYear(page, institute.name, String(year));
      for (const [name, deviation] of Object.entries(results)) {
        const { registryNo } = prototypes[name as keyof typeof prototypes];
        await choose(page, 'Add a weight or a set', registryNo, new RegExp(registryNo));
        await page.getByLabel(`Value of ${registryNo}, ${name}`).fill(deviation);
        await page.getByRole('button', { name: `More of ${registryNo}, ${name}` }).click();
        await page.getByLabel('The certificate states no U').check();
        await page.getByRole('button', { name: `Less of ${registryNo}, ${name}` }).click();
      }
      await page.getByLabel('Quantity').first().selectOption('mass');
      await issueOpenDraft(page, PASSWORD);
    });
  }

  await test.step('the plot has three points and no bar', async () => {
    await openStandard(page, prototypes.K20.registryNo);
    const plot = page.getByRole('img', { name: /3 values from 1889 to 1984/ });
    await expect(plot).toBeVisible();
    await expect(plot.locator('circle')).toHaveCount(3);
    const paths = await plot
      .locator('path')
      .evaluateAll((all) => all.map((one) => one.getAttribute('d') ?? ''));
    // A bar begins with a stroke upwards; what spans a year lies flat.
    expect(paths.filter((d) => /^M[\d.]+ [\d.]+V/.test(d))).toEqual([]);
    await expect(page.getByText(/no bar: U not stated on the certificate/i)).toBeVisible();
    await expect(page.getByText(/Bars: U at k/)).toHaveCount(0);
  });

  await test.step('a weight that leans on it inherits what is not known', async () => {
    await page.goto('/calibrations');
    await page.getByRole('link', { name: 'New, from a certificate' }).first().click();
    await choose(page, 'Issued by', laboratory.name, new RegExp(laboratory.name));
    await page.getByLabel('Certificate number').fill(`J ${weight.registryNo}`);
    for (const label of ['Issued on', 'Begun on', 'Ended on'])
      await page.getByLabel(label).fill('1985-06-03');
    await page.getByLabel('Method').fill('Comparison with a prototype');
    await choose(page, 'Add a weight or a set', weight.registryNo, new RegExp(weight.registryNo));
    const name = `${weight.registryNo}, 1 kg`;
    await page.getByLabel(`Value of ${name}`).fill('0.431');
    await page.getByLabel(`U of ${name}`).fill('0.020');
    await page.getByLabel('Quantity').first().selectOption('mass');
    await page.getByRole('button', { name: `More of ${name}` }).click();
    const { registryNo } = prototypes.K20;
    await choose(page, 'Reference and its value', registryNo, new RegExp(`${registryNo}.*1984.*in force`));
    await issueOpenDraft(page, PASSWORD);
  });

  await test.step('its chain says what is unknown, and why', async () => {
    const reply = page.waitForResponse((one) =>
      /\/api\/chains\/[0-9a-f-]+$/.test(new URL(one.url()).pathname),
    );
    await openStandard(page, weight.registryNo);
    await page.getByRole('link', { name: 'Open the chain' }).click();
    const { registryNo } = prototypes.K20;
    await expect(
      page.getByText(
        `Unknown, because certificate P ${institute.name} 1984 for ${registryNo} states no uncertainty`,
      ),
    ).toBeVisible();
    const chain = (await (await reply).json()) as PackedChainResponse;
    const checks = unpackChecks(chain.checks);
    expect(chain.uncertainty).toMatchObject({ standard: null, expanded: null, carried: null });
    expect(chain.contributions).toEqual([]);
    expect(chain.links.map((link) => link.flow)).toEqual([null]);
    const outcome = (rule: string) =>
      checks.filter((check) => check.rule === rule).map((check) => [check.subject.type, check.outcome]);
    // U covers what is carried; U of the reference as used; the whole chain's variance; change since the last.
    expect(outcome('B-21')).toContainEqual(['value', 'cannot be judged']);
    expect(outcome('B-46')).toEqual([['chain', 'cannot be judged']]);
    const root = chain.nodes.find((node) => node.tier === 1)!;
    const ofRoot = checks.filter((check) => check.subject.type === 'value' && check.subject.uid === root.uid);
    expect(ofRoot.find((check) => check.rule === 'B-19')).toMatchObject({ outcome: 'cannot be judged' });
    // The published history states no density either, and B-03 says that; nothing else is amiss.
    const failing = ofRoot.filter((check) => check.outcome === 'fails').map((check) => check.rule);
    expect(failing).toEqual(['B-03']);
  });

  await test.step('no U was invented', async () => {
    const rows = await register.rows<Record<string, unknown>>(
      `SELECT DISTINCT v.expanded_u, v.k, v.u, v.local_u, v.nu_eff, v.date_precision, v.root_kind
       FROM assigned_value v WHERE v.standard_id IN (:ids)`,
      { ids: [prototypes.K20.id, prototypes.K4.id] },
    );
    expect(rows).toEqual([
      {
        expanded_u: null,
        k: null,
        u: null,
        local_u: null,
        nu_eff: null,
        date_precision: 'year',
        root_kind: 'recognized certificate',
      },
    ]);
  });
});

/** A certificate of which the year alone is known. */
async function fillYear(page: Page, issuer: string, year: string): Promise<void> {
  await choose(page, 'Issued by', issuer, new RegExp(issuer));
  await page.getByLabel('Certificate number').fill(`P ${issuer} ${year}`);
  for (const label of ['Issued on', 'Begun on', 'Ended on'])
    await page.getByLabel(label).fill(`${year}-01-01`);
  await page.getByLabel('Dates known to the').selectOption('year');
  await page.getByLabel('Method').fill('as published');
}

async function openStandard(page: Page, registryNo: string): Promise<void> {
  await page.goto(`/standards?q=${encodeURIComponent(registryNo)}`);
  await page.getByRole('link', { name: registryNo }).first().click();
  await page.getByRole('link', { name: 'Open the standard' }).click();
}
