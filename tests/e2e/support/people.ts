import { expect, type Page } from '@playwright/test';
import { DEMO_PASSWORD } from '#seeders/demo/people.ts';

/** People of the demo network that the journeys are made by. */
export const METROLOGIST = 'metrologist@portalder.example';
export const SIGNATORY = 'signatory@portalder.example';
export const PASSWORD = DEMO_PASSWORD;

/** Signs in through the door and waits for the desk. */
export async function signIn(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Desk' })).toBeVisible();
}
