import type { Page } from '@playwright/test';
import type { DemoPlaces } from '#tests/support/demo-places.ts';

/** One screen as it is looked at. */
export interface Screen {
  name: string;
  path: (places: DemoPlaces) => string;
  /** Looked at without sign-in. */
  isPublic?: true;
  /** Brings the screen into the state to look at, or waits for what it fetches late. */
  prepare?: (page: Page) => Promise<void>;
}

const drawn = async (page: Page) => {
  await page.locator('.react-flow__node').first().waitFor();
  // The table twin comes with it; the drawing is fitted once its layout has come from the worker.
  await page.locator('.react-flow__edge').first().waitFor({ state: 'attached' });
};

/** Keeps a dry run from its question, and opens it. */
const keptDryRun = async (page: Page) => {
  await page.getByRole('link', { name: 'A new dry run' }).click();
  await page.getByRole('combobox', { name: 'Value' }).fill('PA 0300-01');
  await page
    .getByRole('option', { name: /PA 0300-01/ })
    .first()
    .click();
  await page.getByLabel('Shift, with its unit').fill('0.2 mg');
  await page.getByRole('button', { name: 'Add this change' }).click();
  await page.getByLabel('Name', { exact: true }).fill('PA 0300-01, heavier by 0.2 mg');
  await page.getByRole('button', { name: 'Keep it' }).click();
  await page.getByRole('link', { name: 'PA 0300-01, heavier by 0.2 mg' }).click();
  await page.getByRole('heading', { name: 'Remarks' }).waitFor();
};

/** Every screen of the product. */
export const SCREENS: readonly Screen[] = [
  { name: 'sign-in', path: () => '/sign-in', isPublic: true },
  { name: 'desk', path: () => '/desk' },
  { name: 'standards', path: () => '/standards' },
  { name: 'standards-none-found', path: () => '/standards?q=nothing+by+this+name' },
  { name: 'standards-open', path: ({ standardId }) => `/standards?open=${standardId}` },
  { name: 'standard', path: ({ standardId }) => `/standards/${standardId}` },
  { name: 'standard-of-a-set', path: ({ setMemberId }) => `/standards/${setMemberId}` },
  { name: 'standard-new', path: () => '/standards/new' },
  { name: 'set-new', path: () => '/standards/new-set' },
  { name: 'calibrations', path: () => '/calibrations' },
  { name: 'calibration', path: ({ revisionId }) => `/calibrations/${revisionId}` },
  { name: 'calibration-new', path: () => '/calibrations/drafts/new' },
  { name: 'chains', path: () => '/chains' },
  { name: 'chain', path: ({ valueUid }) => `/chains/${valueUid}`, prepare: drawn },
  {
    name: 'chain-selected',
    path: ({ valueUid }) => `/chains/${valueUid}?at=${valueUid}`,
    prepare: async (page) => {
      await drawn(page);
      await page.getByRole('dialog').waitFor();
    },
  },
  {
    name: 'chain-compared',
    path: ({ valueUid }) =>
      `/chains/${valueUid}?as=now+known&rules=2001-01-01.1&thenDay=2020-01-01&thenKnown=2020-01-01&thenAs=certified`,
    prepare: async (page) => {
      await drawn(page);
      await page.getByRole('slider', { name: 'As known on' }).waitFor();
      await page.getByRole('button', { name: 'End the comparison' }).waitFor();
    },
  },
  {
    name: 'chains-failing',
    path: () => '/chains?failing=1',
  },
  { name: 'audits', path: () => '/audits' },
  {
    name: 'audit',
    path: () => '/audits',
    prepare: async (page) => {
      await page.getByRole('button', { name: 'Begin the audit' }).click();
      await page.getByRole('heading', { name: 'Found' }).waitFor({ timeout: 60_000 });
      await page.getByRole('list', { name: 'Findings by rule' }).getByRole('button').first().click();
      await page.getByText('Save as CSV').waitFor();
    },
  },
  { name: 'downstream', path: ({ valueUid }) => `/chains/${valueUid}/downstream` },
  {
    name: 'downstream-what-if',
    path: ({ valueUid }) => `/chains/${valueUid}/downstream?suppose=shift&amount=0.2+mg`,
    prepare: (page) => page.getByRole('button', { name: 'Keep it' }).waitFor(),
  },
  { name: 'what-if', path: () => '/chains/what-if' },
  {
    name: 'what-if-asked',
    path: ({ valueUid, revisionId }) => {
      const changes = [
        { kind: 'shift', valueUid, shift: '0.0002' },
        { kind: 'withdraw', revisionId },
      ];
      return `/chains/what-if?${new URLSearchParams({ changes: JSON.stringify(changes) }).toString()}`;
    },
    prepare: (page) => page.getByRole('button', { name: 'Keep it' }).waitFor(),
  },
  { name: 'dry-runs', path: () => '/chains/dry-runs' },
  { name: 'dry-run', path: () => '/chains/dry-runs', prepare: keptDryRun },
  { name: 'together-none', path: () => '/chains/together' },
  { name: 'together', path: ({ valueUid }) => `/chains/together?values=${valueUid}` },
  {
    name: 'exposure',
    path: ({ standardId }) => `/standards/${standardId}/exposure?lastGood=2015-01-01&firstBad=2026-01-01`,
  },
  { name: 'network', path: () => '/network' },
  { name: 'laboratory', path: ({ laboratoryId }) => `/network/${laboratoryId}` },
  { name: 'mass-scale', path: () => '/network/mass-scale' },
  { name: 'notice', path: ({ noticeId }) => `/network/notices/${noticeId}` },
  { name: 'notice-new', path: () => '/network/notices/new' },
  { name: 'not-found', path: () => '/no-such-place' },
];

/** Opens a screen and waits until it stands: heading, fonts, nothing on its way. */
export async function openScreen(page: Page, screen: Screen, places: DemoPlaces): Promise<void> {
  await page.goto(screen.path(places));
  await page.getByRole('heading', { level: 1 }).first().waitFor();
  await screen.prepare?.(page);
  await page.waitForLoadState('networkidle');
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
}
