type Numbers = Int8Array | Uint8Array | Uint16Array | Int32Array | Uint32Array | Float64Array;

/** The same numbers in an array of at least `length`; the array itself where it is long enough. */
export function grown<A extends Numbers>(array: A, length: number): A {
  if (length <= array.length) return array;
  const longer = new (array.constructor as new (length: number) => A)(length);
  longer.set(array);
  return longer;
}
