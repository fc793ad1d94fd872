import { mirroredDigits } from "../numerics";
import type { Slot } from "./slots";

/** First primes: the bases of Halton's sequence. */
const bases = [2, 3, 5, 7, 11, 13, 17, 19];

/**
 * Points to start a search from: the usual values (or those that `near` names) first, then points spread evenly over the ranges
 * (Halton 1960), narrowed to where models of use lie.
 */
export function scatteredStarts(
  unknowns: readonly Slot[],
  near: { readonly [parameter: string]: number },
  count: number,
): Float64Array[] {
  const center = Float64Array.from(unknowns, (slot) => searched(slot, near[slot.parameter] ?? slot.start));
  const starts = [center];
  for (let k = 1; k < count; k++) {
    starts.push(
      Float64Array.from(unknowns, (slot, i) => {
        const [low, high] = slot.range.map((edge) => searched(slot, edge)) as [number, number];
        const middle = center[i]!;
        const share = mirroredDigits(k, bases[i % bases.length]!);
        // The inner half of each side: the edges of the ranges are for the search to run to, not to start from.
        return share < 0.5 ? middle - (0.5 - share) * (middle - low) : middle + (share - 0.5) * (high - middle);
      }),
    );
  }
  return starts;
}

function searched(slot: Slot, value: number): number {
  return slot.logarithmic ? Math.log(value) : value;
}
