import { memo } from 'react';
import { PAGE_INKS } from '#shared/drawing/inks.ts';
import type { Shape, TextSpan } from '#shared/drawing/shapes.ts';
import type { Face } from '#shared/drawing/text-width.ts';
import { placedPath } from './placed-path.ts';

const FACES: Readonly<Record<Face, string>> = {
  sans: 'font-sans',
  serif: 'font-serif',
  italic: 'font-serif italic',
  mono: 'font-mono',
};

/** Shapes of a drawing as SVG, in the inks of the theme: the very shapes that every export writes. */
export const ShapesView = memo(function ShapesView({ shapes }: { shapes: readonly Shape[] }) {
  return shapes.map((shape, index) => <ShapeView key={index} shape={shape} />);
});

function ShapeView({ shape }: { shape: Shape }) {
  if (shape.kind === 'text') return <TextView shape={shape} />;
  const paint = paintOf(shape);
  if (shape.kind === 'rect') {
    const { x, y, width, height } = shape;
    return <rect {...{ x, y, width, height }} {...paint} />;
  }
  if (shape.kind === 'circle') return <circle cx={shape.x} cy={shape.y} r={shape.radius} {...paint} />;
  const { at } = shape;
  return <path d={at ? placedPath(shape.d, at) : shape.d} {...paintOf(shape, at?.scale)} />;
}

function paintOf({ fill, stroke }: Exclude<Shape, { kind: 'text' }>, scale = 1) {
  return {
    fill: fill ? PAGE_INKS[fill] : 'none',
    stroke: stroke && PAGE_INKS[stroke.ink],
    strokeWidth: stroke && stroke.width * scale,
    strokeDasharray: stroke?.dash?.map((length) => length * scale).join(' '),
    strokeLinecap: stroke?.isRound && ('round' as const),
  };
}

function TextView({ shape }: { shape: Extract<Shape, { kind: 'text' }> }) {
  const halo = shape.halo && {
    stroke: PAGE_INKS[shape.halo],
    strokeWidth: 4,
    strokeLinejoin: 'round' as const,
    paintOrder: 'stroke',
  };
  return (
    <text x={shape.x} y={shape.y} textAnchor={shape.anchor} xmlSpace="preserve" {...halo}>
      {shape.spans.map((span, index) => (
        <SpanView key={index} span={span} before={shape.spans[index - 1]} />
      ))}
    </text>
  );
}

function SpanView({ span, before }: { span: TextSpan; before: TextSpan | undefined }) {
  const fall = (before?.rise ?? 0) - (span.rise ?? 0);
  return (
    <tspan
      className={FACES[span.face]}
      fontSize={span.size}
      fill={PAGE_INKS[span.ink]}
      dy={fall === 0 ? undefined : fall}
    >
      {span.text}
    </tspan>
  );
}
