import { layoutChain } from '#shared/drawing/layout.ts';
import type { LayoutInput } from '#shared/drawing/layout-input.ts';

/** Lays chains out beside the page, so that a large one never holds up a key press. */
self.onmessage = (event: MessageEvent<{ ask: number; input: LayoutInput }>) => {
  self.postMessage({ ask: event.data.ask, placement: layoutChain(event.data.input) });
};
