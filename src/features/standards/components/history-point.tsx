import type { PlotPoint } from '../history/plot-geometry.ts';

const INK: Record<PlotPoint['value']['state'], string> = {
  'in force': 'stroke-ink',
  'not yet in force': 'stroke-unjudged',
  superseded: 'stroke-ink-3',
  withdrawn: 'stroke-broken',
};

/** One value: a ring with its bar, dashed where it is superseded, a cross where it is withdrawn. */
export function HistoryPoint({ point, label }: { point: PlotPoint; label: string }) {
  const { value, x, y, bar, whisker, isBeyond } = point;
  const isDashed = value.state === 'superseded' || value.state === 'not yet in force';
  return (
    <g
      className={INK[value.state]}
      strokeWidth="1.25"
      fill="none"
      strokeDasharray={isDashed ? '3 2' : undefined}
    >
      <title>{label}</title>
      {/* Larger than the ring, so that the pointer finds it. */}
      <rect x={x - 10} y={y - 10} width="20" height="20" stroke="none" className="fill-transparent" />
      {bar && (
        <path
          d={`M${x} ${bar.top}V${bar.bottom}M${x - 4} ${bar.top}H${x + 4}M${x - 4} ${bar.bottom}H${x + 4}`}
        />
      )}
      {whisker && (
        <path
          d={`M${whisker.left} ${y}H${whisker.right}M${whisker.left} ${y - 3}V${y + 3}M${whisker.right} ${y - 3}V${y + 3}`}
        />
      )}
      {isBeyond ? (
        <path d={beyond(x, y)} />
      ) : value.state === 'withdrawn' ? (
        <path d={`M${x - 4} ${y - 4}L${x + 4} ${y + 4}M${x + 4} ${y - 4}L${x - 4} ${y + 4}`} />
      ) : (
        <circle cx={x} cy={y} r="3.75" strokeWidth="1.5" className="fill-paper" />
      )}
    </g>
  );
}

/** Two small arrows to the edge: the value lies beyond the plot. */
function beyond(x: number, y: number): string {
  return `M${x - 4} ${y + 6}L${x} ${y}L${x + 4} ${y + 6}M${x - 4} ${y + 11}L${x} ${y + 5}L${x + 4} ${y + 11}`;
}
