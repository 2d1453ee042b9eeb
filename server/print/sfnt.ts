import { brotliDecompressSync } from 'node:zlib';
import { ByteReader } from './byte-reader.ts';
import { restoreGlyphs } from './woff2-glyphs.ts';

const SIGNATURE = 0x774f4632;
const HEADER_LENGTH = 48;
/** Tables by the number that stands for them in a WOFF2 directory (WOFF File Format 2.0, table 3). */
const KNOWN_TAGS =
  'cmap head hhea hmtx maxp name OS/2 post cvt_ fpgm glyf loca prep CFF_ VORG EBDT EBLC gasp hdmx kern LTSH PCLT VDMX vhea vmtx BASE GDEF GPOS GSUB EBSC JSTF MATH CBDT CBLC COLR CPAL SVG_ sbix acnt avar bdat bloc bsln cvar fdsc feat fmtx fvar gvar hsty just lcar mort morx opbd prop trak Zapf Silf Glat Gloc Feat Sill'
    .replaceAll('_', ' ')
    .match(/\S{3,4} ?(?= |$)/g)!
    .map((tag) => tag.padEnd(4).slice(0, 4));

/** What bends a variable font: left out, its regular form stays, which is what is printed. */
const VARIATIONS = ['avar', 'fvar', 'gvar', 'HVAR', 'MVAR', 'STAT'];

interface Entry {
  tag: string;
  isTransformed: boolean;
  /** Bytes in the compressed stream. */
  length: number;
}

/**
 * A web font in its regular form, unpacked so that it can be embedded in part: PDF knows neither WOFF2 nor variations.
 * Source: W3C, WOFF File Format 2.0.
 * @throws Error for what is not a WOFF2 font, or transforms a table that no font of ours transforms
 */
export function sfntOf(woff2: Buffer): Buffer {
  if (woff2.length < HEADER_LENGTH || woff2.readUInt32BE(0) !== SIGNATURE)
    throw new Error('This is not a WOFF2 font.');
  const reader = new ByteReader(woff2, HEADER_LENGTH);
  const entries = Array.from({ length: woff2.readUInt16BE(12) }, () => readEntry(reader));
  const packed = woff2.subarray(reader.position, reader.position + woff2.readUInt32BE(20));
  const tables = cutTables(brotliDecompressSync(packed), entries);
  const transformed = entries.filter((entry) => entry.isTransformed).map((entry) => entry.tag);
  if (transformed.some((tag) => tag !== 'glyf' && tag !== 'loca'))
    throw new Error(`This font transforms ${transformed.join(', ')}; only glyf and loca are known here.`);
  if (transformed.includes('glyf')) {
    const { glyf, loca } = restoreGlyphs(tables.get('glyf')!);
    tables.set('glyf', glyf).set('loca', loca);
    const head = Buffer.from(tables.get('head')!);
    head.writeInt16BE(1, 50); // Offsets of glyphs are 32 bits wide.
    tables.set('head', head);
  }
  for (const tag of VARIATIONS) tables.delete(tag);
  return writeSfnt(woff2.readUInt32BE(4), tables);
}

function readEntry(reader: ByteReader): Entry {
  const flags = reader.u8();
  const known = flags & 0x3f;
  const tag = known === 0x3f ? reader.take(4).toString('latin1') : KNOWN_TAGS[known]!;
  const version = flags >> 6;
  const isTransformed = tag === 'glyf' || tag === 'loca' ? version === 0 : version !== 0;
  const original = reader.base128();
  return { tag, isTransformed, length: isTransformed ? reader.base128() : original };
}

function cutTables(stream: Buffer, entries: Entry[]): Map<string, Buffer> {
  const reader = new ByteReader(stream, 0);
  return new Map(entries.map(({ tag, length }) => [tag, reader.take(length)]));
}

/** An OpenType file: header, directory in the order of tags, tables on four-byte borders. */
function writeSfnt(flavour: number, tables: Map<string, Buffer>): Buffer {
  const sorted = [...tables].sort(([a], [b]) => (a < b ? -1 : 1));
  const directory = Buffer.alloc(12 + 16 * sorted.length);
  directory.writeUInt32BE(flavour, 0);
  directory.writeUInt16BE(sorted.length, 4);
  const pieces: Buffer[] = [directory];
  let offset = directory.length;
  sorted.forEach(([tag, table], index) => {
    const at = 12 + 16 * index;
    directory.write(tag, at, 'latin1');
    directory.writeUInt32BE(offset, at + 8);
    directory.writeUInt32BE(table.length, at + 12);
    const padding = Buffer.alloc((4 - (table.length % 4)) % 4);
    pieces.push(table, padding);
    offset += table.length + padding.length;
  });
  return Buffer.concat(pieces);
}
