/**
 * The grid of the batch engine: fixed in u = ln T_r, so that every function of the radiation's temperature is tabulated once a
 * process, whatever T_cmb a row has.
 *
 * Two runs of points lie one after the other in the same arrays. The first, {@link heliumBlock}, has a coarse step and covers the
 * recombination of helium, while hydrogen keeps Saha equilibrium. The second begins at {@link mainTop} with the fine step, covers
 * hydrogen's, and doubles its stride four times below, where everything changes slowly. They overlap where helium's last electrons still count.
 */

/** h in u of the fine block. */
export const gridStep = 0.01;

/** T_r at the top of the fine block, K: hydrogen still keeps Saha equilibrium to 1e-6 of x_e for a while (z = 1900 at 2.7255 K). */
const mainTopTemperature = 5250;

/** ln of the temperature at the top of the fine block. */
export const mainTop = Math.log(mainTopTemperature);

/** Steps of {@link gridStep} between the points of the helium block. */
export const coarseStride = 2;

/** T_r at which helium's march begins, K: Saha equilibrium still holds to 1e-5 of x_e (z = 3490 at 2.7255 K). */
const heliumTopTemperature = 9500;

/** Below this T_r helium carries no electrons that show; z = 1630 at 2.7255 K. */
const heliumEndTemperature = 4440;

/** Points in equilibrium that a march starts from: what the formula looks back at. */
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

/** Points of the blocks of the second run; the last ends near 25 K, where a power law takes over. */
const layout: readonly (readonly [points: number, stride: number])[] = [
  [120, 1],
  [14, 2],
  [14, 4],
  [20, 8],
  [11, 16],
];

/** Coarse steps above the top of the fine block, and points of the helium block: a few more than helium needs, to interpolate between. */
const coarseSteps = Math.round(Math.log(heliumTopTemperature / mainTopTemperature) / (coarseStride * gridStep));
const overlap = Math.ceil(Math.log(mainTopTemperature / heliumEndTemperature) / (coarseStride * gridStep)) + 3;

/** Places in steps below the top of the fine block: negative above it. */
const places: number[] = [];
for (let i = 0; i < coarseSteps + overlap; i++) places.push((i - coarseSteps) * coarseStride);

/** Where helium is followed, in coarse steps. */
export const heliumBlock: GridBlock = { first: 0, end: places.length, stride: coarseStride };

/** The first point of the fine block, and the point of the helium block at the same place. */
export const mainFirst = places.length;
export const heliumAtMainTop = coarseSteps;

const blockList: GridBlock[] = [];
let place = 0;
for (const [points, stride] of layout) {
  const first = places.length;
  for (let i = 0; i < points; i++) {
    if (places.length > mainFirst) place += stride;
    places.push(place);
  }
  blockList.push({ first, end: places.length, stride });
}

/** The blocks of the second run, top to bottom. */
export const gridBlocks: readonly GridBlock[] = blockList;

/** Place of every point in steps below the top of the fine block. */
export const gridPlaces = Int32Array.from(places);

/** Number of points. */
export const gridSize = places.length;

/** T_r of every point, K. */
export const gridTemperatures = Float64Array.from(places, (each) => Math.exp(mainTop - gridStep * each));

/** The first point of the second run at or below a temperature. */
export function firstPointBelow(temperature: number): number {
  for (let i = mainFirst; i < gridSize; i++) if (gridTemperatures[i] <= temperature) return i;
  return gridSize;
}

/** The first point of the second run without helium's electrons. */
export const heliumEnd = firstPointBelow(heliumEndTemperature);
