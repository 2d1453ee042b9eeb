import { useId } from 'react';
import { usePreferences } from '#src/lib/preferences.ts';
import { groupDigits, withSign } from '#shared/numbers/format-decimal.ts';
import { quantityLine, quantityText, unitSymbol } from '#shared/numbers/quantity-text.ts';
import { dueState } from '../due-state.ts';
import { dateAsKnown } from '../history/days.ts';
import type { PlotGeometry, PlotPoint } from '../history/plot-geometry.ts';
import { HistoryPoint } from './history-point.tsx';

interface HistoryPlotProps {
  geometry: PlotGeometry;
  width: number;
  height: number;
  /** The drawing in one sentence; the table below it holds every number. */
  summary: string;
}

/** Deviation and U against time: bars where U is stated, no line across an intervention. */
export function HistoryPlot({ geometry, width, height, summary }: HistoryPlotProps) {
  const summaryId = useId();
  const { decimalMark } = usePreferences();
  const { frame, band, unit } = geometry;
  const tickText = (label: string): string => groupDigits(withSign(label, true), decimalMark);
  return (
    <svg role="img" aria-labelledby={summaryId} width={width} height={height} className="block text-sm">
      <title id={summaryId}>{summary}</title>
      {band && (
        <rect
          x={frame.left}
          width={frame.right - frame.left}
          y={band.top}
          height={band.bottom - band.top}
          className="fill-sound opacity-8"
        />
      )}
      {geometry.valueTicks.map((tick) => (
        <g key={tick.label}>
          <line x1={frame.left} x2={frame.right} y1={tick.at} y2={tick.at} className="stroke-rule" />
          <text x={frame.left - 8} y={tick.at + 4} textAnchor="end" className="fill-ink-2">
            {tickText(tick.label)}
          </text>
        </g>
      ))}
      <text x={frame.left - 8} y={11} textAnchor="end" className="fill-ink-2 font-serif">
        {unitSymbol(unit)}
      </text>
      <TimeAxis geometry={geometry} />
      <Marks geometry={geometry} />
      {geometry.lines.map((line, index) => (
        <polyline
          key={index}
          points={line.map(({ x, y }) => `${x},${y}`).join(' ')}
          fill="none"
          className="stroke-brass"
          strokeWidth="1.25"
        />
      ))}
      {band && (
        <text
          x={frame.right}
          y={band.top - 5 > frame.top + 8 ? band.top - 5 : band.top + 14}
          textAnchor="end"
          strokeWidth="4"
          className="fill-sound stroke-paper [paint-order:stroke]"
        >
          {band.label}
        </text>
      )}
      {geometry.points.map((point) => (
        <HistoryPoint key={point.value.uid} point={point} label={pointText(point, decimalMark)} />
      ))}
    </svg>
  );
}

function TimeAxis({ geometry: { frame, timeTicks } }: { geometry: PlotGeometry }) {
  return (
    <>
      <line x1={frame.left} x2={frame.right} y1={frame.bottom} y2={frame.bottom} className="stroke-ink-3" />
      {timeTicks.map((tick) => (
        <g key={tick.label}>
          <line x1={tick.at} x2={tick.at} y1={frame.bottom} y2={frame.bottom + 4} className="stroke-ink-3" />
          <text x={tick.at} y={frame.bottom + 18} textAnchor="middle" className="fill-ink-2">
            {tick.label}
          </text>
        </g>
      ))}
    </>
  );
}

const ROW = 17;

const DUE_INK = { broken: 'fill-broken', caution: 'fill-caution', far: 'fill-ink-2' };
const DUE_LINE = { broken: 'stroke-broken', caution: 'stroke-caution', far: 'stroke-ink-3' };

/** Interventions are dotted, the due date is drawn through in the colour of its state; each wears its label. */
function Marks({ geometry: { frame, marks } }: { geometry: PlotGeometry }) {
  return marks.map((mark) => {
    const due = dueState(mark.day) ?? 'far';
    return (
      <g key={`${mark.kind} ${mark.day}`}>
        <line
          x1={mark.x}
          x2={mark.x}
          y1={8 + mark.row * ROW}
          y2={frame.bottom}
          strokeDasharray={mark.kind === 'epoch' ? '2 3' : undefined}
          className={mark.kind === 'epoch' ? 'stroke-ink' : DUE_LINE[due]}
        />
        <text
          x={mark.textX}
          y={18 + mark.row * ROW}
          textAnchor={mark.anchor}
          strokeWidth="4"
          className={`stroke-paper [paint-order:stroke] ${mark.kind === 'epoch' ? 'fill-ink' : DUE_INK[due]}`}
        >
          {mark.text}
        </text>
      </g>
    );
  });
}

function pointText({ value }: PlotPoint, decimalMark: '.' | ','): string {
  const number = quantityLine(
    quantityText(
      {
        value: value.deviation,
        expandedUncertainty: value.expandedU,
        coverageFactor: value.k,
        kind: 'deviation',
        shownIn: 'auto',
      },
      { decimalMark, uncertainty: 'plus-minus' },
    ),
  );
  const spread = value.expandedU === null ? ', U not stated' : '';
  return `${dateAsKnown(value)}, ${value.certificateNo}: ${number}${spread}, ${value.state}`;
}
