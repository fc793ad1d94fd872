/**
 * The grid of the batch engine: fixed in u = ln T_r, so that every function of the radiation's temperature is tabulated once a
 * process, whatever T_cmb a row has.
 *
 * Places count steps of {@link gridStep} downward from the top. The first block has stride 1 and covers recombination; below it,
 * where everything changes slowly, the stride doubles three times. The first {@link equilibriumPoints} points lie in Saha equilibrium
 * and start the march, so its stiff beginning needs no switch.
 */

/** h in u of the finest block. */
export const gridStep = 0.01;

/** T_r at the top, K: hydrogen and helium still follow Saha equilibrium there (z = 3100 at 2.7255 K). */
const topTemperature = 8450;

/** ln of the temperature at the top. */
export const gridTop = Math.log(topTemperature);

/** Points in equilibrium that the six-step formula starts from. */
export const equilibriumPoints = 6;

/** A run of points with one stride. */
export interface GridBlock {
  /** Index of the first point of the block. */
  readonly first: number;
  /** Index after the last. */
  readonly end: number;
  /** Steps of {@link gridStep} from point to point, and from the first point to the last of the block before. */
  readonly stride: number;
}

/** Points of the blocks; the last ends near 50 K. */
const layout: readonly (readonly [points: number, stride: number])[] = [
  [167, 1],
  [14, 2],
  [14, 4],
  [32, 8],
];

const places: number[] = [];
const blockList: GridBlock[] = [];
for (const [points, stride] of layout) {
  const first = places.length;
  for (let i = 0; i < points; i++) places.push(first === 0 && i === 0 ? 0 : places[places.length - 1] + stride);
  blockList.push({ first, end: places.length, stride });
}

/** The blocks, top to bottom. */
export const gridBlocks: readonly GridBlock[] = blockList;

/** Place of every point in steps below the top. */
export const gridPlaces = Int32Array.from(places);

/** Number of points. */
export const gridSize = places.length;

/** T_r of every point, K. */
export const gridTemperatures = Float64Array.from(places, (place) => Math.exp(gridTop - gridStep * place));

/** The first point at or below a temperature. */
export function firstPointBelow(temperature: number): number {
  return gridTemperatures.findIndex((each) => each <= temperature);
}

/** Below this T_r kinetic helium carries no electrons that show; z = 1630 at 2.7255 K. */
const heliumEndTemperature = 4440;

/** The first point without helium's electrons. */
export const heliumEnd = firstPointBelow(heliumEndTemperature);
