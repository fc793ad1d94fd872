import { type BatchColumns, type BatchPlan, prepareBatch, validatedRange } from "../../cosmo/batch";
import { NoAnswerError } from "../../cosmo/errors";
import { chunkRows, type WorkerRequest } from "./batchJob";

/** Places in ln H0 where every row is computed first. */
const samples = 7;
/** ln H0 counts as found when a step becomes smaller. */
const smallestStep = 1e-11;
const mostSteps = 12;

/** In place of the full computation: what the engine does not serve is left out, for it would cost a hundred rows. */
function notHere(): never {
  throw new NoAnswerError({ where: "batch", reason: "the engine does not serve this model" });
}

/**
 * H0 of many rows at once from a derived quantity, by the batch engine.
 *
 * Method: samples over the engine's range of h, inverse interpolation through them (Lagrange), then secant steps that stay inside
 * the bracket and halve it where they would leave it. All open rows are computed together at each step. Where the quantity does not
 * rise or fall steadily over the samples, or does not reach the given value, the row is left to the full computation, which looks
 * for several answers and says why there is none.
 *
 * Accuracy: that of the engine in the derived quantity, divided by how strongly it depends on H0.
 */
export class HubbleSolver {
  private readonly plan: BatchPlan;
  private readonly name: string;
  private readonly hubble = new Float64Array(chunkRows);
  private readonly value = new Float64Array(chunkRows);
  private readonly status = new Uint8Array(chunkRows);
  private readonly scratch: BatchColumns;
  private readonly gather: (place: number, row: number) => void;
  private readonly target: (row: number) => number;
  private readonly grid: Float64Array;
  private readonly sampled = Array.from({ length: samples }, () => new Float64Array(chunkRows));

  constructor(
    request: WorkerRequest & { readonly hubbleFrom: string },
    fields: BatchColumns,
    given: Float64Array | number,
  ) {
    this.name = request.hubbleFrom;
    this.plan = prepareBatch({ outputs: [this.name], shared: request.shared ?? {}, closeModel: notHere });
    const pairs: [from: Float64Array, to: Float64Array][] = [];
    const local = (column: Float64Array | number): Float64Array | number => {
      if (typeof column === "number") return column;
      const copy = new Float64Array(chunkRows);
      pairs.push([column, copy]);
      return copy;
    };
    this.scratch = Object.fromEntries(
      Object.entries(fields).map(([name, column]) => [
        name,
        Array.isArray(column) ? column.map(local) : local(column as Float64Array | number),
      ]),
    );
    this.gather = (place, row) => {
      for (const [from, to] of pairs) to[place] = from[row]!;
    };
    this.target = typeof given === "number" ? () => given : (row) => given[row]!;
    const [low, high] = validatedRange.reducedHubble.map((h) => Math.log(100 * h)) as [number, number];
    // The very ends could fall outside by rounding.
    const inset = 1e-9;
    this.grid = Float64Array.from(
      { length: samples },
      (_, k) => low + inset + ((high - low - 2 * inset) * k) / (samples - 1),
    );
  }

  /** Fills H0 of the rows from `from` to before `to`, at most {@link chunkRows}; NaN where the engine does not find it for sure. */
  solve(from: number, to: number, hubble: Float64Array): void {
    const rows = to - from;
    for (let k = 0; k < samples; k++) {
      for (let i = 0; i < rows; i++) {
        this.gather(i, from + i);
        this.hubble[i] = Math.exp(this.grid[k]!);
      }
      this.evaluate(rows);
      this.sampled[k]!.set(this.value.subarray(0, rows));
    }
    let open: Open[] = [];
    for (let i = 0; i < rows; i++) {
      hubble[from + i] = Number.NaN;
      const start = this.start(i, from + i);
      if (start !== undefined) open.push(start);
    }
    for (let step = 0; step < mostSteps && open.length > 0; step++) {
      open.forEach((each, place) => {
        this.gather(place, each.row);
        this.hubble[place] = Math.exp(each.x);
      });
      this.evaluate(open.length);
      const still: Open[] = [];
      open.forEach((each, place) => {
        const value = this.value[place]!;
        if (this.status[place] !== 0 || !Number.isFinite(value)) return;
        if (advance(each, value)) hubble[each.row] = Math.exp(each.x);
        else still.push(each);
      });
      open = still;
    }
  }

  private evaluate(rows: number): void {
    this.plan.run(
      { ...this.scratch, hubble: this.hubble },
      { from: 0, to: rows },
      { [this.name]: this.value },
      undefined,
      this.status,
    );
  }

  /** The bracket of a row and its first point; undefined where the samples are not steady or do not reach the target. */
  private start(place: number, row: number): Open | undefined {
    const target = this.target(row);
    // With all densities held, a low H0 may leave the engine's range: the samples that it serves lie in one piece.
    let first = 0;
    while (first < samples && Number.isNaN(this.sampled[first]![place]!)) first++;
    const values = this.sampled.slice(first).map((each) => each[place]!);
    const places = this.grid.subarray(first);
    const count = values.length;
    if (count < 3) return undefined;
    const rising = values[count - 1]! > values[0]!;
    for (let k = 1; k < count; k++) {
      // Not a number fails too.
      if (!(rising ? values[k]! > values[k - 1]! : values[k]! < values[k - 1]!)) return undefined;
    }
    let below = -1;
    for (let k = 0; k + 1 < count; k++) {
      if ((values[k]! - target) * (values[k + 1]! - target) <= 0) {
        below = k;
        break;
      }
    }
    if (below < 0) return undefined;
    let x = 0;
    for (let k = 0; k < count; k++) {
      let weight = places[k]!;
      for (let j = 0; j < count; j++) if (j !== k) weight *= (target - values[j]!) / (values[k]! - values[j]!);
      x += weight;
    }
    const [low, high] = [places[below]!, places[below + 1]!];
    if (!(x > low && x < high)) x = (low + high) / 2;
    const nearLow = Math.abs(values[below]! - target) < Math.abs(values[below + 1]! - target);
    return {
      row,
      target,
      rising,
      x,
      low,
      high,
      before: nearLow ? low : high,
      valueBefore: values[nearLow ? below : below + 1]!,
    };
  }
}

/** A row whose H0 is still open; x is ln H0. */
interface Open {
  readonly row: number;
  readonly target: number;
  readonly rising: boolean;
  x: number;
  low: number;
  high: number;
  before: number;
  valueBefore: number;
}

/** Takes the value at x and steps on; true when x is found. */
function advance(open: Open, value: number): boolean {
  const { x, target, rising } = open;
  if (value === target) return true;
  if (value > target === rising) open.high = Math.min(open.high, x);
  else open.low = Math.max(open.low, x);
  const slope = (value - open.valueBefore) / (x - open.before);
  let next = x + (target - value) / slope;
  if (Math.abs(next - x) < smallestStep) {
    open.x = next;
    return true;
  }
  if (!(next > open.low && next < open.high)) next = (open.low + open.high) / 2;
  open.before = x;
  open.valueBefore = value;
  open.x = next;
  return open.high - open.low < smallestStep;
}
