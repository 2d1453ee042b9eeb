/** Reads a font's bytes from front to back. */
export class ByteReader {
  readonly #bytes: Buffer;
  position: number;

  constructor(bytes: Buffer, position: number) {
    this.#bytes = bytes;
    this.position = position;
  }

  u8(): number {
    return this.#bytes.readUInt8(this.position++);
  }

  u16(): number {
    this.position += 2;
    return this.#bytes.readUInt16BE(this.position - 2);
  }

  i16(): number {
    this.position += 2;
    return this.#bytes.readInt16BE(this.position - 2);
  }

  u32(): number {
    this.position += 4;
    return this.#bytes.readUInt32BE(this.position - 4);
  }

  take(length: number): Buffer {
    this.position += length;
    return this.#bytes.subarray(this.position - length, this.position);
  }

  /** A number in seven-bit pieces (WOFF File Format 2.0, 4.1). */
  base128(): number {
    let value = 0;
    for (let piece = 0; piece < 5; piece += 1) {
      const byte = this.u8();
      value = value * 128 + (byte & 0x7f);
      if (byte < 0x80) return value;
    }
    throw new Error('A number of this font is longer than five bytes.');
  }

  /** A number of one to three bytes (WOFF File Format 2.0, 4.2). */
  u255(): number {
    const code = this.u8();
    if (code === 253) return this.u16();
    if (code === 254) return this.u8() + 506;
    return code === 255 ? this.u8() + 253 : code;
  }
}
