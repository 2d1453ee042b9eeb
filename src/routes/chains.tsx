import { Page } from '#src/components/layout/page.tsx';

/** Keeps the place of the screen at this address. */
export function Component() {
  return <Page title="Chains">{null}</Page>;
}
