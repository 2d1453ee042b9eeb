import { NotFound } from '#src/app/error-page.tsx';

/** Any address without a screen. */
export function Component() {
  return <NotFound />;
}
