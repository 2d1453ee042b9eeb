import { expect, test } from '@playwright/test';
import { openDatabase } from '#server/db/sequelize.ts';
import { axeFindings, consoleErrors, horizontalOverflow, systemFonts } from '#tests/look/checks.ts';
import { openScreen, SCREENS } from '#tests/look/screens.ts';
import { demoPlaces, LOOKING_METROLOGIST } from '#tests/support/demo-places.ts';
import { toolEnvironment } from '#tests/support/tool-environment.ts';
import { PASSWORD } from './support/people.ts';

/** Every screen in one test each theme: a sign-in for each would take longer than the looking. */
for (const theme of ['light', 'dark'] as const) {
  test(`no screen has errors, serious findings, fonts of the system or overflow (${theme})`, async ({
    browser,
  }) => {
    test.setTimeout(240_000);
    const database = openDatabase(toolEnvironment().databaseUrl, 2);
    const places = await demoPlaces(database);
    await database.close();
    const context = await browser.newContext({ colorScheme: theme, reducedMotion: 'reduce' });
    for (const screen of SCREENS) {
      if (!screen.isPublic && (await context.cookies()).length === 0) {
        const reply = await context.request.post('/api/session', {
          data: { email: LOOKING_METROLOGIST, password: PASSWORD },
          headers: { 'X-Requested-With': 'exagium' },
        });
        expect(reply.ok()).toBe(true);
      }
      const page = await context.newPage();
      const errors = consoleErrors(page);
      await openScreen(page, screen, places);
      const found = {
        overflow: await horizontalOverflow(page),
        fonts: theme === 'light' ? await systemFonts(page) : [],
        findings: await axeFindings(page),
        errors,
      };
      expect.soft(found, screen.name).toEqual({ overflow: 0, fonts: [], findings: [], errors: [] });
      await page.close();
    }
    await context.close();
  });
}
