/** Cursor positions: front ends count code points, the compiler counts UTF-16 units. */

/** The UTF-16 offset of a position counted in code points. */
export function unitsFromPoints(text: string, points: number): number {
  let units = 0;
  let left = points;
  for (const character of text) {
    if (left-- <= 0) break;
    units += character.length;
  }
  return units;
}

/** The position in code points of a UTF-16 offset. */
export function pointsFromUnits(text: string, units: number): number {
  return [...text.slice(0, units)].length;
}
