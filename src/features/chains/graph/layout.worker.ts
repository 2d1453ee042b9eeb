import { layoutChain } from '#shared/drawing/layout.ts';
import type { LayoutInput } from '#shared/drawing/layout-input.ts';

/** Lays chains out beside the page, so that a large one never holds up a key press. */
self.onmessage = (event: MessageEvent<{ ask: number; input: LayoutInput }>) => {
  const start = performance.now();
  const placement = layoutChain(event.data.input);
  self.postMessage({ ask: event.data.ask, placement, milliseconds: performance.now() - start });
};
