import type { Inks } from '#shared/drawing/inks.ts';
import type { Picture, Shape } from '#shared/drawing/shapes.ts';
import { setLine, type Paper } from './set-line.ts';

/** Draws a picture with its upper left corner at a place of the page, as vectors; text stays text. */
export function drawPicture(
  paper: Paper,
  picture: Picture,
  place: { x: number; y: number; scale: number },
  inks: Inks,
): void {
  paper.save();
  paper.translate(place.x, place.y).scale(place.scale).translate(-picture.x, -picture.y);
  for (const figure of picture.figures) {
    for (const shape of figure.shapes) drawShape(paper, shape, inks);
  }
  paper.restore();
}

function drawShape(paper: Paper, shape: Shape, inks: Inks): void {
  if (shape.kind === 'text') {
    setLine(paper, shape.spans, shape, inks, shape.halo && inks[shape.halo]);
    return;
  }
  paper.save();
  if (shape.kind === 'rect') paper.rect(shape.x, shape.y, shape.width, shape.height);
  if (shape.kind === 'circle') paper.circle(shape.x, shape.y, shape.radius);
  if (shape.kind === 'path') {
    if (shape.at) paper.translate(shape.at.x, shape.at.y).scale(shape.at.scale ?? 1);
    paper.path(shape.d);
  }
  paint(paper, shape, inks);
  paper.restore();
}

function paint(paper: Paper, { fill, stroke }: Exclude<Shape, { kind: 'text' }>, inks: Inks): void {
  if (stroke) {
    paper.lineWidth(stroke.width).lineCap(stroke.isRound ? 'round' : 'butt');
    if (stroke.dash) paper.dash(stroke.dash[0]!, { space: stroke.dash[1]! });
    else paper.undash();
  }
  if (fill && stroke) paper.fillAndStroke(inks[fill], inks[stroke.ink]);
  else if (fill) paper.fill(inks[fill]);
  else if (stroke) paper.stroke(inks[stroke.ink]);
}
