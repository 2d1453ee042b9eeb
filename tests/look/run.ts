/**
 * Photographs every screen in both themes at three widths into test-results/look, and looks for what a machine can
 * see: errors in the console, findings of axe-core, fonts of the system, pages wider than the window.
 * Run: `npm run look`, or `npm run look -- chain desk` for the screens whose names begin so.
 */
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { chromium, type Browser, type BrowserContext } from '@playwright/test';
import { openDatabase } from '#server/db/sequelize.ts';
import { DEMO_PASSWORD } from '#seeders/demo/people.ts';
import { demoPlaces, LOOKING_METROLOGIST, type DemoPlaces } from '#tests/support/demo-places.ts';
import { toolEnvironment } from '#tests/support/tool-environment.ts';
import { axeFindings, consoleErrors, horizontalOverflow, systemFonts } from './checks.ts';
import { openScreen, SCREENS, type Screen } from './screens.ts';

const THEMES = { paper: 'light', lamp: 'dark' } as const;
/** Photographed; the narrowest and the widest are only measured. */
const WIDTHS = [390, 1280, 1920];
const EDGES = [360, 2560];
const LONGEST_WAIT_MS = 15_000;
const OUT = path.resolve('test-results/look');

const { baseUrl, databaseUrl, chromium: executablePath } = toolEnvironment();
const wanted = process.argv.slice(2);
const screens = SCREENS.filter(
  ({ name }) => wanted.length === 0 || wanted.some((begin) => name.startsWith(begin)),
);
const findings: string[] = [];

const database = openDatabase(databaseUrl, 2);
const places = await demoPlaces(database);
await database.close();
mkdirSync(OUT, { recursive: true });
const browser = await chromium.launch({ executablePath, args: ['--no-sandbox', '--disable-gpu'] });
for (const theme of ['paper', 'lamp'] as const) {
  for (const width of [...WIDTHS, ...(theme === 'paper' ? EDGES : [])]) {
    const context = await openContext(browser, theme, width);
    for (const screen of screens) await look(context, screen, places, theme, width);
    await context.close();
  }
}
await browser.close();

console.log(`\n${screens.length} screens photographed into ${path.relative(process.cwd(), OUT)}`);
if (findings.length === 0) console.log('Nothing found.');
else {
  console.log(`${findings.length} findings:`);
  for (const finding of findings) console.log(`- ${finding}`);
  process.exitCode = 1;
}

async function openContext(on: Browser, theme: keyof typeof THEMES, width: number): Promise<BrowserContext> {
  const height = width < 640 ? 844 : Math.min(1080, Math.round(width * 0.65));
  const context = await on.newContext({
    baseURL: baseUrl,
    viewport: { width, height },
    colorScheme: THEMES[theme],
    locale: 'en-GB',
    timezoneId: 'UTC',
    reducedMotion: 'reduce',
  });
  context.setDefaultTimeout(LONGEST_WAIT_MS);
  return context;
}

async function look(
  context: BrowserContext,
  screen: Screen,
  at: DemoPlaces,
  theme: keyof typeof THEMES,
  width: number,
): Promise<void> {
  const name = `${screen.name}-${width}-${theme}`;
  if (screen.isPublic) await context.clearCookies();
  else await signIn(context);
  const page = await context.newPage();
  const errors = consoleErrors(page);
  try {
    await openScreen(page, screen, at);
    if (WIDTHS.includes(width)) await page.screenshot({ path: path.join(OUT, `${name}.png`) });
    const overflow = await horizontalOverflow(page);
    if (overflow > 0) findings.push(`${name}: the page is ${overflow} px wider than the window`);
    if (width === 390 || width === 1280) {
      for (const finding of await axeFindings(page)) findings.push(`${name}: ${finding}`);
    }
    if (width === 1280 && theme === 'paper') {
      for (const font of await systemFonts(page)) findings.push(`${name}: ${font}`);
    }
  } catch (error) {
    findings.push(`${name}: ${String(error).split('\n')[0]}`);
    await page.screenshot({ path: path.join(OUT, `${name}-failed.png`) });
  }
  for (const error of errors) findings.push(`${name}: console: ${error}`);
  await page.close();
  process.stdout.write('.');
}

/** Once per context: the cookie stays. */
async function signIn(context: BrowserContext): Promise<void> {
  if ((await context.cookies()).length > 0) return;
  const reply = await context.request.post('/api/session', {
    data: { email: LOOKING_METROLOGIST, password: DEMO_PASSWORD },
    headers: { 'X-Requested-With': 'exagium' },
  });
  if (!reply.ok()) throw new Error(`Sign-in gave ${reply.status()}: ${await reply.text()}`);
}
