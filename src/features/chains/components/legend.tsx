/** How to read the drawing, in a line or two under it. */
export function Legend() {
  return (
    <p className="text-sm text-ink-2">
      A line is as wide as the share of the weight’s variance that flows through it; grey stubs are what a
      value adds of its own. Dashed: a negative flow, where correlations cancel. Dotted: informs, nothing
      flows. A hairline is too thin for the scale. Shared effects below 1 % are shown when asked for.
    </p>
  );
}
