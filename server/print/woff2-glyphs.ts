import { ByteReader } from './byte-reader.ts';

const COMPONENT = {
  wordArguments: 0x1,
  scale: 0x8,
  more: 0x20,
  bothScales: 0x40,
  matrix: 0x80,
  program: 0x100,
};

interface Streams {
  contours: ByteReader;
  points: ByteReader;
  flags: ByteReader;
  glyphs: ByteReader;
  composites: ByteReader;
  boxes: ByteReader;
  programs: ByteReader;
}

interface Point {
  x: number;
  y: number;
  isOnCurve: boolean;
}

/**
 * The outlines of a font as TrueType keeps them, from the seven streams that WOFF2 parts them into.
 * Source: W3C, WOFF File Format 2.0, 5.1.
 */
export function restoreGlyphs(transformed: Buffer): { glyf: Buffer; loca: Buffer } {
  const reader = new ByteReader(transformed, 4);
  const count = reader.u16();
  reader.u16();
  const lengths = Array.from({ length: 7 }, () => reader.u32());
  const [contours, points, flags, glyphs, composites, boxes, programs] = lengths.map(
    (length) => new ByteReader(reader.take(length), 0),
  ) as [ByteReader, ByteReader, ByteReader, ByteReader, ByteReader, ByteReader, ByteReader];
  const streams: Streams = { contours, points, flags, glyphs, composites, boxes, programs };
  const hasBox = boxes.take(4 * Math.floor((count + 31) / 32));
  const pieces: Buffer[] = [];
  const loca = Buffer.alloc(4 * (count + 1));
  let offset = 0;
  for (let index = 0; index < count; index += 1) {
    const isBoxed = ((hasBox[index >> 3]! >> (7 - (index & 7))) & 1) === 1;
    const glyph = padded(restoreGlyph(streams, isBoxed));
    loca.writeUInt32BE(offset, 4 * index);
    pieces.push(glyph);
    offset += glyph.length;
  }
  loca.writeUInt32BE(offset, 4 * count);
  return { glyf: Buffer.concat(pieces), loca };
}

function restoreGlyph(streams: Streams, isBoxed: boolean): Buffer {
  const contours = streams.contours.i16();
  if (contours === 0) return Buffer.alloc(0);
  if (contours < 0) return restoreComposite(streams);
  return restoreSimple(streams, contours, isBoxed);
}

function restoreComposite(streams: Streams): Buffer {
  const pieces = [i16s(-1), streams.boxes.take(8)];
  let flags = COMPONENT.more;
  let hasProgram = false;
  while (flags & COMPONENT.more) {
    const head = streams.composites.take(4);
    flags = head.readUInt16BE(0);
    hasProgram ||= (flags & COMPONENT.program) !== 0;
    pieces.push(head, streams.composites.take(componentLength(flags)));
  }
  if (hasProgram) pieces.push(...programOf(streams));
  return Buffer.concat(pieces);
}

/** Bytes of a component after its flags and glyph: two arguments, then what scales it. */
function componentLength(flags: number): number {
  const scaling =
    flags & COMPONENT.matrix ? 8 : flags & COMPONENT.bothScales ? 4 : flags & COMPONENT.scale ? 2 : 0;
  return (flags & COMPONENT.wordArguments ? 4 : 2) + scaling;
}

function restoreSimple(streams: Streams, contours: number, isBoxed: boolean): Buffer {
  const ends: number[] = [];
  let total = 0;
  for (let contour = 0; contour < contours; contour += 1) {
    total += streams.points.u255();
    ends.push(total - 1);
  }
  const points = readPoints(streams, total);
  const program = programOf(streams);
  const box = isBoxed ? streams.boxes.take(8) : boxOf(points);
  return Buffer.concat([i16s(contours), box, u16s(ends), ...program, ...outline(points)]);
}

function programOf(streams: Streams): [Buffer, Buffer] {
  const length = streams.glyphs.u255();
  return [u16s([length]), streams.programs.take(length)];
}

function readPoints({ flags, glyphs }: Streams, total: number): Point[] {
  let [x, y] = [0, 0];
  return Array.from({ length: total }, () => {
    const flag = flags.u8();
    const [dx, dy] = step(flag & 0x7f, glyphs);
    x += dx;
    y += dy;
    return { x, y, isOnCurve: flag < 0x80 };
  });
}

/** The way to the next point: the flag says how its two parts are packed (WOFF File Format 2.0, 5.2). */
function step(flag: number, bytes: ByteReader): [number, number] {
  const first = (size: number) => (flag & 1 ? size : -size);
  const second = (size: number) => (flag & 2 ? size : -size);
  if (flag < 10) return [0, first(((flag & 14) << 7) + bytes.u8())];
  if (flag < 20) return [first((((flag - 10) & 14) << 7) + bytes.u8()), 0];
  if (flag < 84) {
    const [base, byte] = [flag - 20, bytes.u8()];
    return [first(1 + (base & 0x30) + (byte >> 4)), second(1 + ((base & 0x0c) << 2) + (byte & 0x0f))];
  }
  if (flag < 120) {
    const base = flag - 84;
    const dx = 1 + (Math.floor(base / 12) << 8) + bytes.u8();
    return [first(dx), second(1 + (((base % 12) >> 2) << 8) + bytes.u8())];
  }
  if (flag < 124) {
    const [high, middle, low] = [bytes.u8(), bytes.u8(), bytes.u8()];
    return [first((high << 4) + (middle >> 4)), second(((middle & 0x0f) << 8) + low)];
  }
  return [first(bytes.u16()), second(bytes.u16())];
}

/** Flags and coordinates in the plainest spelling: two bytes a coordinate, nothing repeated. */
function outline(points: Point[]): [Buffer, Buffer, Buffer] {
  const steps = (of: 'x' | 'y') =>
    i16s(...points.map((point, index) => point[of] - (points[index - 1]?.[of] ?? 0)));
  return [Buffer.from(points.map((point) => (point.isOnCurve ? 1 : 0))), steps('x'), steps('y')];
}

function boxOf(points: Point[]): Buffer {
  const [xs, ys] = [points.map(({ x }) => x), points.map(({ y }) => y)];
  return i16s(Math.min(...xs), Math.min(...ys), Math.max(...xs), Math.max(...ys));
}

function i16s(...values: number[]): Buffer {
  const bytes = Buffer.alloc(2 * values.length);
  values.forEach((value, index) => bytes.writeInt16BE(value, 2 * index));
  return bytes;
}

function u16s(values: number[]): Buffer {
  const bytes = Buffer.alloc(2 * values.length);
  values.forEach((value, index) => bytes.writeUInt16BE(value, 2 * index));
  return bytes;
}

function padded(glyph: Buffer): Buffer {
  return Buffer.concat([glyph, Buffer.alloc((4 - (glyph.length % 4)) % 4)]);
}
