/** Doubles that all threads see. */
export function sharedDoubles(length: number): Float64Array {
  return new Float64Array(new SharedArrayBuffer(8 * length));
}

/** The same numbers in memory that all threads see; the array itself where it is there already. */
export function asShared(values: Float64Array): Float64Array {
  if (values.buffer instanceof SharedArrayBuffer) return values;
  const shared = sharedDoubles(values.length);
  shared.set(values);
  return shared;
}
