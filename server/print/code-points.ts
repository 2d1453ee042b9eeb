const FORMAT_4 = 4;
const FORMAT_12 = 12;

/** The signs that a font has, from its `cmap` (OpenType, formats 4 and 12). */
export function codePointsOf(sfnt: Buffer): ReadonlySet<number> {
  const cmap = tableOf(sfnt, 'cmap');
  const found = new Set<number>();
  const count = cmap.readUInt16BE(2);
  for (let index = 0; index < count; index += 1) {
    const subtable = cmap.subarray(cmap.readUInt32BE(4 + 8 * index + 4));
    const format = subtable.readUInt16BE(0);
    if (format === FORMAT_4) addSegments(subtable, found);
    if (format === FORMAT_12) addGroups(subtable, found);
  }
  found.delete(0xffff);
  return found;
}

function tableOf(sfnt: Buffer, wanted: string): Buffer {
  const count = sfnt.readUInt16BE(4);
  for (let index = 0; index < count; index += 1) {
    const at = 12 + 16 * index;
    if (sfnt.toString('latin1', at, at + 4) !== wanted) continue;
    const offset = sfnt.readUInt32BE(at + 8);
    return sfnt.subarray(offset, offset + sfnt.readUInt32BE(at + 12));
  }
  throw new Error(`This font has no table ${wanted}.`);
}

function addSegments(subtable: Buffer, found: Set<number>): void {
  const doubled = subtable.readUInt16BE(6);
  const at = (part: number, index: number) => 14 + part * doubled + (part > 0 ? 2 : 0) + index;
  for (let index = 0; index < doubled; index += 2) {
    const end = subtable.readUInt16BE(at(0, index));
    const start = subtable.readUInt16BE(at(1, index));
    const delta = subtable.readUInt16BE(at(2, index));
    const offset = subtable.readUInt16BE(at(3, index));
    for (let code = start; code <= end; code += 1) {
      const glyph =
        offset === 0
          ? (code + delta) & 0xffff
          : subtable.readUInt16BE(at(3, index) + offset + 2 * (code - start));
      if (glyph !== 0) found.add(code);
    }
  }
}

function addGroups(subtable: Buffer, found: Set<number>): void {
  const groups = subtable.readUInt32BE(12);
  for (let index = 0; index < groups; index += 1) {
    const at = 16 + 12 * index;
    for (let code = subtable.readUInt32BE(at); code <= subtable.readUInt32BE(at + 4); code += 1)
      found.add(code);
  }
}
