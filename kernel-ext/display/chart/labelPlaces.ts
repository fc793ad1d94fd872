/**
 * Where the names of upright rules go: above the plot, each at its rule like a flag at its pole, to the right or to the
 * left of it, in as few rows as keep every name clear of the other names and of the poles that pass it.
 */

/** A name to be placed. */
export interface LabelToPlace {
  /** Pixels. */
  readonly width: number;
  /** Where its rule is, in pixels; the middle for a band. */
  readonly at: number;
  /** Whether a rule runs up to it; without one the name is centered. */
  readonly pole: boolean;
}

/** Where a name goes. */
export interface LabelPlace {
  /** Left end in pixels. */
  readonly from: number;
  /** 0 is the row just above the plot. */
  readonly row: number;
}

interface Candidate extends LabelPlace {
  readonly to: number;
  readonly pole: number | undefined;
}

const gap = 5;
/** Beyond this many names the search for the best arrangement would take too long; rows are then simply stacked. */
const mostSearched = 7;

/** Whether the pole of one name runs through another name, which it passes when its own row is not lower. */
function crosses(one: Candidate, other: Candidate): boolean {
  const { pole } = one;
  return pole !== undefined && one.row >= other.row && pole > other.from - 1 && pole < other.to + 1;
}

/** Whether two names and their poles leave each other alone; names in one row stand in the order of their poles. */
function clear(one: Candidate, other: Candidate): boolean {
  if (crosses(one, other) || crosses(other, one)) return false;
  if (one.row !== other.row) return true;
  const [left, right] = one.from < other.from ? [one, other] : [other, one];
  if (left.pole !== undefined && right.pole !== undefined && left.pole > right.pole) return false;
  return left.to + gap <= right.from;
}

function candidates({ width, at, pole }: LabelToPlace, rows: number, plotWidth: number): Candidate[] {
  const lefts = pole ? [at + gap, at - gap - width] : [at - width / 2];
  const room = Math.max(0, plotWidth - width);
  // A flag that would leave the plot may still hang over its edge a little; a centered name is pushed inside.
  const inside = pole
    ? lefts.filter((left) => left >= -40 && left + width <= plotWidth + 40)
    : lefts.map((left) => Math.min(Math.max(left, 0), room));
  const kept = inside.length > 0 ? inside : lefts.slice(0, 1);
  return Array.from({ length: rows }, (_, row) =>
    kept.map((from) => ({ from, to: from + width, row, pole: pole ? at : undefined })),
  ).flat();
}

/**
 * Finds places for names above a plot.
 *
 * Method: search with pruning over rows and sides for the arrangement with the smallest sum of rows; up to seven names.
 *
 * @param labels widths and positions
 * @param plotWidth pixels
 * @returns a place for each label, in the same order
 */
export function placeLabels(labels: readonly LabelToPlace[], plotWidth: number): LabelPlace[] {
  if (labels.length > mostSearched) {
    return labels.map((label, row) => ({ ...(candidates(label, 1, plotWidth)[0] as Candidate), row }));
  }
  let best: Candidate[] = [];
  let bestCost = Number.POSITIVE_INFINITY;
  const chosen: Candidate[] = [];
  const choices = labels.map((label) => candidates(label, labels.length, plotWidth));
  const search = (index: number, cost: number): void => {
    if (cost >= bestCost) return;
    if (index === labels.length) {
      best = [...chosen];
      bestCost = cost;
      return;
    }
    for (const [order, candidate] of (choices[index] as Candidate[]).entries()) {
      if (!chosen.every((other) => clear(candidate, other))) continue;
      chosen.push(candidate);
      // Among equal rows the first side, the right one, is liked a little better.
      search(index + 1, cost + candidate.row + (order % 2) * 0.01);
      chosen.pop();
    }
  };
  search(0, 0);
  if (best.length === labels.length) return best;
  return labels.map((label, row) => ({ ...(candidates(label, 1, plotWidth)[0] as Candidate), row }));
}
