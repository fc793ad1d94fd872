import type { ValidityNote } from "./validityNote";

/**
 * One piece of work on one model: a history, a depth, an expansion. Named for profiles; its identity is the key under which
 * an {@link Evaluation} keeps the result. Its functions are written as methods so that a part, and an evaluation, of a model with more
 * fields may stand where one with fewer is asked for.
 */
export interface Part<M, T> {
  readonly name: string;
  compute(evaluation: Evaluation<M>): T;
  /** What every number that stands on this part should say: a neglect, an interpolation. Asked only of parts that were used. */
  notes?(evaluation: Evaluation<M>): readonly ValidityNote[];
  /**
   * Whether the part stands on something that the model itself knows only approximately, such as a table: every number that uses it
   * is then measured against the coarse evaluation, which must treat that thing in another way.
   */
  approximate?(model: M): boolean;
  /** Relative error that every number inherits which stands on the part; none unless given. */
  relativeError?(evaluation: Evaluation<M>): number;
}

/** `full`: the settings behind the stated accuracies. `coarse`: looser ones, run only to measure the error of the full ones. */
export type Precision = "full" | "coarse";

/** A part without regard to what it gives and of what: the key of its result. */
interface PartKey {
  readonly name: string;
}

type PartResult = ({ readonly value: unknown } | { readonly failure: unknown }) & {
  /** The parts that it asked for itself, and those that these asked for. */
  readonly stoodOn: ReadonlySet<PartKey>;
};

/**
 * Everything computed from one closed model, each part at most once.
 *
 * Quantities ask for parts; whoever asks first pays, the rest share. A part that failed fails again with the same error.
 */
export class Evaluation<M> {
  readonly model: M;
  readonly precision: Precision;
  private readonly results = new Map<PartKey, PartResult>();
  private companion: Evaluation<M> | undefined;
  /** What the work at hand has used so far; undefined while nobody listens. */
  private used: Set<PartKey> | undefined;

  constructor(model: M, precision: Precision = "full") {
    this.model = model;
    this.precision = precision;
  }

  /** The result of a part, computed at the first call. */
  once<T>(part: Part<M, T>): T {
    const result = this.results.get(part) ?? this.compute(part);
    if (this.used !== undefined && !this.used.has(part)) {
      this.used.add(part);
      for (const other of result.stoodOn) this.used.add(other);
    }
    if ("failure" in result) throw result.failure;
    return result.value as T;
  }

  private compute<T>(part: Part<M, T>): PartResult {
    const outer = this.used;
    const stoodOn = new Set<PartKey>();
    this.used = stoodOn;
    let result: PartResult;
    try {
      result = { value: part.compute(this), stoodOn };
    } catch (failure) {
      result = { failure, stoodOn };
    } finally {
      this.used = outer;
    }
    this.results.set(part, result);
    return result;
  }

  /** Puts a result in place of what a part would compute: for fits that vary what is otherwise fixed. Only before first use. */
  preset<T>(part: Part<M, T>, value: T): void {
    if (this.results.has(part)) throw new Error(`part "${part.name}" is computed already`);
    this.results.set(part, { value, stoodOn: new Set() });
  }

  /** Does some work and tells which parts it used, directly or through other parts. */
  watch<T>(work: () => T): { value: T; parts: readonly Part<M, unknown>[] } {
    const outer = this.used;
    const used = new Set<PartKey>();
    this.used = used;
    try {
      return { value: work(), parts: [...used] as Part<M, unknown>[] };
    } finally {
      this.used = outer;
    }
  }

  /** Names of the parts computed so far, in order of completion. */
  computedParts(): string[] {
    return [...this.results.keys()].map((part) => part.name);
  }

  /**
   * The same model at looser numerical settings. The difference between the two is the error estimate of every quantity that
   * hangs on an integrated history: it includes whatever errors cancel or add on the way.
   */
  coarse(): Evaluation<M> {
    if (this.precision === "coarse") return this;
    this.companion ??= new Evaluation(this.model, "coarse");
    return this.companion;
  }
}
