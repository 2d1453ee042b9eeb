import { z } from 'zod';

/** An identifier on the wire: a UUID in lower case. The register gives out version 7 only. */
export const Id = z.guid('Expected an identifier').transform((text) => text.toLowerCase());
export type Id = string;

/**
 * Composes a UUID version 7 (RFC 9562, 5.7) from a time and randomness, so that ids sort by the time of
 * the act and the demo network can be made again, id for id, from its seed.
 * @param unixMilliseconds time of the act, milliseconds since 1970
 * @param random ten bytes of randomness
 */
export function uuidV7(unixMilliseconds: number, random: Uint8Array): string {
  const time = Math.floor(unixMilliseconds).toString(16).padStart(12, '0');
  const bytes = Array.from(random.subarray(0, 10));
  bytes[0] = 0x70 | ((bytes[0] ?? 0) & 0x0f);
  bytes[2] = 0x80 | ((bytes[2] ?? 0) & 0x3f);
  const hex = time + bytes.map((byte) => byte.toString(16).padStart(2, '0')).join('');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}
