/** Draws in [0, 1) that depend on nothing but the seed and what they are for: no order of drawing to keep. */
export type Draw = (purpose: number, index: number) => number;

/**
 * Makes the draws of one seed: a 32-bit mix of seed, purpose and index (the finaliser of MurmurHash3, public domain,
 * from memory).
 */
export function drawsOf(seed: number): Draw {
  return (purpose, index) => mixed(seed, purpose, index) / 4_294_967_296;
}

/** 32 mixed bits of three whole numbers. */
export function mixed(seed: number, purpose: number, index: number): number {
  let bits = Math.imul(seed ^ Math.imul(purpose + 1, 0x9e3779b1), 0x85ebca6b) ^ index;
  bits = Math.imul(bits ^ (bits >>> 16), 0x85ebca6b);
  bits = Math.imul(bits ^ (bits >>> 13), 0xc2b2ae35);
  bits ^= Math.imul(index, 0x27d4eb2f);
  bits = Math.imul(bits ^ (bits >>> 15), 0x2c1b3c6d);
  return (bits ^ (bits >>> 16)) >>> 0;
}

/** What is drawn, so that no two purposes share their draws. */
export const PURPOSE = {
  trueValue: 1,
  noise: 2,
  start: 3,
  period: 4,
  issue: 5,
  ending: 6,
  endingDay: 7,
  references: 8,
  firstReference: 9,
  pieces: 10,
  holder: 11,
  volumeShared: 12,
  airDensity: 13,
  identifier: 14,
  signatory: 15,
} as const;
