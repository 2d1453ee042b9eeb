import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import type { CDPSession, Page } from '@playwright/test';

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** Collects what the browser reports as an error from now on. */
export function consoleErrors(page: Page): string[] {
  const errors: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  page.on('pageerror', (error) => errors.push(String(error)));
  return errors;
}

/** Serious and critical findings of axe-core, one text each. Its source is evaluated in the page: no script tag. */
export async function axeFindings(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    interface Axe {
      run(
        context: Document,
        options: object,
      ): Promise<{
        violations: {
          id: string;
          impact: string;
          help: string;
          nodes: { target: unknown[]; failureSummary?: string }[];
        }[];
      }>;
    }
    const { axe } = globalThis as unknown as { axe: Axe };
    const { violations } = await axe.run(document, { resultTypes: ['violations'] });
    return violations
      .filter(({ impact }) => impact === 'serious' || impact === 'critical')
      .flatMap(({ id, help, nodes }) =>
        nodes
          .slice(0, 5)
          .map((node) => `${id} (${help}): ${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
      );
  });
}

/** Fonts of the system that were used to draw text, each with the text. Ours are fetched with the page. */
export async function systemFonts(page: Page): Promise<string[]> {
  const session = await page.context().newCDPSession(page);
  await session.send('DOM.enable');
  await session.send('CSS.enable');
  await session.send('DOM.getDocument', { depth: -1, pierce: true });
  const found = new Map<string, string>();
  for (const { nodeId, text } of await textNodes(page, session)) {
    const { fonts } = await session.send('CSS.getPlatformFontsForNode', { nodeId });
    for (const font of fonts) if (!font.isCustomFont && font.glyphCount > 0) found.set(font.familyName, text);
  }
  await session.detach();
  return [...found].map(([family, text]) => `${family} draws part of "${text}"`);
}

const MARK = 'data-font-check';

/** Elements that hold text themselves. */
async function textNodes(page: Page, session: CDPSession): Promise<{ nodeId: number; text: string }[]> {
  const texts = await page.evaluate((mark) => {
    const found: string[] = [];
    for (const element of document.body.querySelectorAll('*')) {
      const own = [...element.childNodes].filter((node) => node.nodeType === Node.TEXT_NODE);
      const text = own
        .map((node) => node.textContent)
        .join(' ')
        .trim();
      if (text === '' || ['SCRIPT', 'STYLE'].includes(element.tagName)) continue;
      element.setAttribute(mark, String(found.length));
      found.push(text.slice(0, 60));
    }
    return found;
  }, MARK);
  const { root } = await session.send('DOM.getDocument', { depth: 0 });
  const { nodeIds } = await session.send('DOM.querySelectorAll', {
    nodeId: root.nodeId,
    selector: `[${MARK}]`,
  });
  return nodeIds.map((nodeId, at) => ({ nodeId, text: texts[at] ?? '' }));
}

/** How far the page is wider than the window, px; what may scroll scrolls inside its own frame. */
export async function horizontalOverflow(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}
