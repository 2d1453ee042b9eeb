import { describe, expect, it } from 'vitest';
import { PLATE } from '#shared/drawing/geometry.ts';
import { boxHeight, bringIntoSight, viewOf, type Drawing } from './view-of.ts';

const DESKTOP = { height: 900, isByFinger: false };
const tall: Drawing = { left: -100, width: 470, height: 1400, focusX: 135 };
const wide: Drawing = { left: 0, width: 2000, height: 700, focusX: 1900 };

describe('frame of the drawing', () => {
  it('grows with the chain, so that a tall one stands whole at full size', () => {
    const height = boxHeight(tall, 620, DESKTOP);
    const view = viewOf(tall, { width: 620, height });
    expect(height).toBeGreaterThan(1400);
    expect(view).toMatchObject({ zoom: 1, isWhole: true });
    expect(view.x + tall.left * view.zoom).toBeGreaterThan(0);
    expect(view.x + (tall.left + tall.width) * view.zoom).toBeLessThan(620);
  });

  it('stands whole as long as number and state can be read', () => {
    const broad = { ...wide, width: 1200, focusX: 1100 };
    const height = boxHeight(broad, 620, DESKTOP);
    const view = viewOf(broad, { width: 620, height });
    expect(view.isWhole).toBe(true);
    expect(view.zoom).toBeCloseTo(580 / 1200, 9);
  });

  it('never draws smaller than can be read; what is too wide shows the weight at its foot', () => {
    const height = boxHeight(wide, 620, DESKTOP);
    const view = viewOf(wide, { width: 620, height });
    expect(view).toMatchObject({ zoom: 0.75, isWhole: false });
    const focus = view.x + wide.focusX * view.zoom;
    expect(focus).toBeGreaterThan(0);
    expect(focus).toBeLessThan(620);
  });

  it('ends at 1600 px, and under a finger before the window does; the foot stays in sight', () => {
    const endless = { ...tall, height: 5000 };
    expect(boxHeight(endless, 620, DESKTOP)).toBe(1600);
    const height = boxHeight(endless, 358, { height: 800, isByFinger: true });
    expect(height).toBe(608);
    const { y, zoom } = viewOf(endless, { width: 358, height });
    expect(y + endless.height * zoom).toBeLessThan(height);
    expect(y + endless.height * zoom).toBeGreaterThan(height - 70);
  });

  it('moves as little as needed to bring a plate into sight', () => {
    const box = { width: 620, height: 500 };
    expect(bringIntoSight({ x: 100, y: 100 }, { x: 0, y: 0, zoom: 1 }, box)).toBeNull();
    const moved = bringIntoSight({ x: 1000, y: -200 }, { x: 0, y: 0, zoom: 1 }, box)!;
    expect(1000 + PLATE.width + moved.x).toBe(600);
    expect(-200 + moved.y).toBe(20);
  });
});
