/**
 * How a row of a batch came by its values, as the codes that fit a byte.
 *
 * `engine`: by the batch engine. The next four took the single path, in full or because the engine does not serve: `notServed` (Saha
 * equilibrium, a published fit by convention, dark energy by formula or table), `outsideRange` (of validatedRange.ts, or not a number), `nearTurningPoint` (a closed model whose expansion
 * nearly or truly turned), `offGrid` (a depth that reaches one outside the grid, or a value that came out not finite). `partlyEmpty`: some
 * outputs have no value; `failed`: none has.
 */
export const rowStatus = {
  engine: 0,
  notServed: 1,
  outsideRange: 2,
  nearTurningPoint: 3,
  offGrid: 4,
  partlyEmpty: 5,
  failed: 6,
} as const;

/** The words for the codes, in their order. */
export const rowStatusNames = Object.keys(rowStatus) as readonly (keyof typeof rowStatus)[];
