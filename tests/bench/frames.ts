import { chromium, type Browser, type Page } from '@playwright/test';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { packChecks } from '#shared/contracts/packed-checks.ts';
import { generatedChain } from '#shared/drawing/generated-chain.ts';

/** Frame times of a drawing that is moved, ms. */
export interface FrameTimes {
  plates: number;
  links: number;
  /** Of the layout in the worker. */
  layoutMs: number;
  /** From the navigation to the first plates on screen. */
  shownMs: number;
  moves: Move[];
}

/** One way of moving the drawing. */
export interface Move {
  name: string;
  /** Time between two frames, ms by the clock: with the waiting for other programs of the machine. */
  frames: number[];
  /** Processor time of the page's longest single task, ms: without that waiting. */
  longestTaskMs: number;
}

interface Product {
  baseUrl: string;
  cookie: string;
  chromium: string;
}

/**
 * Opens a generated chain in the built product, drags and zooms the drawing, and records every frame. The chain
 * stands in no register: the reply is put in the server's place, in this browser only.
 */
export async function frameTimes(product: Product, plates: number): Promise<FrameTimes> {
  const browser = await chromium.launch({
    executablePath: product.chromium,
    args: ['--no-sandbox', '--disable-gpu'],
  });
  try {
    const chain = generatedChain({ plates });
    const page = await openChain(browser, product, chain);
    const { layoutMs, shownMs } = await untilDrawn(page);
    const box = (await page.locator('.react-flow').boundingBox())!;
    const middle = { x: box.x + box.width / 2, y: box.y + Math.min(box.height, 800) / 2 };
    const moves: Move[] = [];
    for (const { name, act } of MOVES) {
      await browser.startTracing(page, { categories: ['toplevel'] });
      const frames = await framesDuring(page, () => act(page, middle));
      moves.push({ name, frames, longestTaskMs: longestTask(await browser.stopTracing()) });
    }
    return { plates: chain.nodes.length, links: chain.links.length, layoutMs, shownMs, moves };
  } finally {
    await browser.close();
  }
}

async function openChain(browser: Browser, product: Product, chain: ChainResponse): Promise<Page> {
  const context = await browser.newContext({
    baseURL: product.baseUrl,
    viewport: { width: 1920, height: 1080 },
    reducedMotion: 'reduce',
  });
  const [name, value] = product.cookie.split('=');
  await context.addCookies([{ name: name!, value: value!, url: product.baseUrl }]);
  const page = await context.newPage();
  await page.route(new RegExp(`/api/chains/${chain.focusUid}(\\?|$)`), (route) =>
    route.fulfill({ json: { ...chain, checks: packChecks(chain.checks) } }),
  );
  await page.goto(`/chains/${chain.focusUid}?place=wide&effects=all`);
  return page;
}

async function untilDrawn(page: Page): Promise<{ layoutMs: number; shownMs: number }> {
  await page.locator('[data-plate]').first().waitFor();
  const shownMs = await page.evaluate(() => performance.now());
  await page.waitForLoadState('networkidle');
  const layoutMs = Number(await page.locator('[data-layout-ms]').getAttribute('data-layout-ms'));
  return { layoutMs, shownMs };
}

interface Point {
  x: number;
  y: number;
}

const STEPS = 60;
const PLATE_READ = 12;

const MOVES: { name: string; act: (page: Page, at: Point) => Promise<void> }[] = [
  { name: 'drag, plates read', act: drag },
  { name: 'zoom out', act: (page, at) => wheel(page, at, 40) },
  { name: 'drag, all in sight', act: drag },
  { name: 'zoom in', act: (page, at) => wheel(page, at, -40) },
];

async function drag(page: Page, at: Point): Promise<void> {
  for (let round = 0; round < 3; round += 1) {
    await page.mouse.move(at.x, at.y);
    await page.mouse.down();
    for (let step = 1; step <= STEPS; step += 1) {
      const turn = (step / STEPS) * 2 * Math.PI;
      await page.mouse.move(at.x + 300 * Math.sin(turn), at.y + PLATE_READ * 10 * (1 - Math.cos(turn)));
    }
    await page.mouse.up();
  }
}

/** A pinch, as a touch pad sends it. */
async function wheel(page: Page, at: Point, by: number): Promise<void> {
  await page.mouse.move(at.x, at.y);
  await page.keyboard.down('Control');
  for (let step = 0; step < STEPS; step += 1) await page.mouse.wheel(0, by);
  await page.keyboard.up('Control');
}

/** Runs in the page, as it stands: what the compiler would add to a function is not there. */
const RECORD = `
  window.frameRecord = { times: [], isOn: true };
  requestAnimationFrame(function tick(time) {
    window.frameRecord.times.push(time);
    if (window.frameRecord.isOn) requestAnimationFrame(tick);
  });`;
const END_OF_RECORD = `(window.frameRecord.isOn = false, window.frameRecord.times)`;

async function framesDuring(page: Page, act: () => Promise<void>): Promise<number[]> {
  await page.evaluate(RECORD);
  await act();
  const times = await page.evaluate<number[]>(END_OF_RECORD);
  return times.slice(1).map((time, index) => time - times[index]!);
}

interface TraceEvent {
  name: string;
  ph: string;
  pid: number;
  tid: number;
  /** Processor time of the event's thread, microseconds. */
  tdur?: number;
  args: { name?: string };
}

function longestTask(trace: Buffer): number {
  const { traceEvents } = JSON.parse(trace.toString()) as { traceEvents: TraceEvent[] };
  const threadOf = ({ pid, tid }: TraceEvent) => `${pid} ${tid}`;
  const mains = new Set(
    traceEvents
      .filter(({ name, args }) => name === 'thread_name' && args.name === 'CrRendererMain')
      .map(threadOf),
  );
  const tasks = traceEvents.filter((event) => event.ph === 'X' && event.tdur && mains.has(threadOf(event)));
  return Math.max(0, ...tasks.map(({ tdur }) => tdur! / 1000));
}

/** The frames of a move in one line. */
export function framesInWords({ name, frames, longestTaskMs }: Move): string {
  const sorted = frames.toSorted((a, b) => a - b);
  const at = (share: number) => sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))] ?? 0;
  const slow = frames.filter((frame) => frame > 50).length;
  const figures = [at(0.5), at(0.95), at(1)].map((value) => value.toFixed(1).padStart(7));
  return `  ${name.padEnd(20)} ${String(frames.length).padStart(5)} ${figures.join(' ')} ${String(slow).padStart(8)} ${longestTaskMs.toFixed(1).padStart(13)}`;
}

/** Head of the lines of `framesInWords`. */
export const FRAMES_HEAD = `  ${''.padEnd(20)} frames     p50     p95     max  > 50 ms  longest task`;
