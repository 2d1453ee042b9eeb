import { describe, expect, it } from 'vitest';
import { placedParameters, readPlaced } from './search.ts';

const A = '01a01e2f-2000-7738-adb1-8fcf65fde7c6';
const B = '01a01e2f-2000-731a-ba28-aff65b53f3bf';
const at = (text: string) => readPlaced(new URLSearchParams(text));

describe('the weights in the address', () => {
  it('are the same after they were written and read again', () => {
    const placed = at(`values=${A},${B}&signs=${encodeURIComponent('+-')}`);
    expect(placed).toEqual([
      { uid: A, sign: 1 },
      { uid: B, sign: -1 },
    ]);
    expect(readPlaced(new URLSearchParams(placedParameters(placed)))).toEqual(placed);
  });

  it('lie on one pan unless said otherwise, and say no signs then', () => {
    expect(placedParameters(at(`values=${A},${B}`))).toEqual({ values: `${A},${B}` });
    expect(placedParameters([])).toEqual({});
  });

  it('leave out what is no identifier, and a weight named twice', () => {
    expect(at(`values=x,${A},${A},&signs=-+`)).toEqual([{ uid: A, sign: 1 }]);
    expect(at('')).toEqual([]);
  });
});
