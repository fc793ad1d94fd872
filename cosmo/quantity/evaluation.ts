/**
 * One piece of work on one model: a history, a depth, an expansion. Named for profiles; its identity is the key under which
 * an {@link Evaluation} keeps the result.
 */
export interface Part<M, T> {
  readonly name: string;
  readonly compute: (evaluation: Evaluation<M>) => T;
}

/** `full`: the settings behind the stated accuracies. `coarse`: looser ones, run only to measure the error of the full ones. */
export type Precision = "full" | "coarse";

/**
 * Everything computed from one closed model, each part at most once.
 *
 * Quantities ask for parts; whoever asks first pays, the rest share. A part that failed fails again with the same error.
 */
export class Evaluation<M> {
  readonly model: M;
  readonly precision: Precision;
  private readonly results = new Map<Part<M, unknown>, { value: unknown } | { failure: unknown }>();
  private companion: Evaluation<M> | undefined;

  constructor(model: M, precision: Precision = "full") {
    this.model = model;
    this.precision = precision;
  }

  /** The result of a part, computed at the first call. */
  once<T>(part: Part<M, T>): T {
    const known = this.results.get(part);
    if (known !== undefined) {
      if ("failure" in known) throw known.failure;
      return known.value as T;
    }
    try {
      const value = part.compute(this);
      this.results.set(part, { value });
      return value;
    } catch (failure) {
      this.results.set(part, { failure });
      throw failure;
    }
  }

  /** Puts a result in place of what a part would compute: for fits that vary what is otherwise fixed. Only before first use. */
  preset<T>(part: Part<M, T>, value: T): void {
    if (this.results.has(part)) throw new Error(`part "${part.name}" is computed already`);
    this.results.set(part, { value });
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
