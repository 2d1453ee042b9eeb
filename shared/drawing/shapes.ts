import type { Ink } from './inks.ts';
import type { Face } from './text-width.ts';

/** A piece of a line of text. */
export interface TextSpan {
  text: string;
  face: Face;
  size: number;
  ink: Ink;
  /** Raised, as an exponent is; its size is given already. */
  rise?: number;
}

interface Stroke {
  ink: Ink;
  width: number;
  dash?: readonly number[];
  isRound?: true;
}

/** What a picture consists of: each export draws these four and nothing else. Lengths px, y downwards. */
export type Shape =
  | { kind: 'rect'; x: number; y: number; width: number; height: number; fill?: Ink; stroke?: Stroke }
  | { kind: 'path'; d: string; fill?: Ink; stroke?: Stroke; at?: { x: number; y: number; scale?: number } }
  | { kind: 'circle'; x: number; y: number; radius: number; fill?: Ink; stroke?: Stroke }
  | {
      kind: 'text';
      x: number;
      /** Of the baseline. */
      y: number;
      anchor: 'start' | 'middle' | 'end';
      spans: TextSpan[];
      /** An outline in the ground's ink, so that the text can be read above a line. */
      halo?: Ink;
    };

/** Shapes that belong together: a plate, a ribbon, the band. */
export interface Figure {
  kind: 'band' | 'plate' | 'ribbon' | 'caption';
  /** Of the plate or ribbon; the word itself for the others. */
  id: string;
  /** In words, for those who do not see it. */
  title: string;
  shapes: Shape[];
}

/** A drawing, ready to be written as SVG or PDF. */
export interface Picture {
  title: string;
  description: string;
  x: number;
  y: number;
  width: number;
  height: number;
  figures: Figure[];
}
