import { DomainError, NotConvergedError } from "../errors";
import type { RadauStages } from "./radauStages";
import { RadauStep } from "./radauStep";
import { StepRecord, type StiffSolution } from "./stiffSolution";

/** A system y' = f(t, y). */
export interface StiffSystem {
  /** Number of equations. */
  dimension: number;
  /** Writes f(t, y) to `out`; must not write to y. */
  derivative(t: number, y: Float64Array, out: Float64Array): void;
}

/** What `solveStiff` is asked for. */
export interface StiffOptions {
  /** t at which the initial values hold. */
  start: number;
  /** t where the integration ends; below `start` it runs backward. */
  end: number;
  /** Initial values. */
  initial: Float64Array;
  /** Absolute tolerance, one for all components or one each; above 0. */
  absolute: number | Float64Array;
  /** Tolerance relative to the component, added to the absolute one; 0 unless given. */
  relative?: number;
  /** Error allowed between mesh points, in units of the tolerance; 10 unless given. */
  interior?: number;
  /** Size of the first step; 1e-4 of the range unless given. */
  firstStep?: number;
  /**
   * Number of first steps that are taken without an error test; 0 unless given. For initial values that lie a little off
   * the slow solution: they fall onto it (the method is L-stable) instead of being followed through their fast decay.
   */
  settle?: number;
  /** Most steps, accepted and refused; 20000 unless given. */
  maximumSteps?: number;
  /** Ends the integration after the first step at whose end it holds. */
  stopWhen?: (t: number, y: Float64Array) => boolean;
}

/** The error measure goes as the tenth power of the step: local error of a method of order 9. */
const EXPONENT = 1 / 10;
const SAFETY = 0.9;

/**
 * Solves a stiff system of ordinary differential equations.
 *
 * y' = f(t, y), y(start) = initial
 *
 * @param system - dimension and derivative
 * @param options - range, initial values, tolerances; see StiffOptions
 * @returns the solution at the mesh points, with error estimates, and as a function of t
 *
 * Bad options throw DomainError. A step limit reached, a step size that underflows or a derivative that is not finite at
 * the start throws NotConvergedError, with where the integration stood.
 *
 * Method: implicit Runge-Kutta, Radau IIA with five stages; simplified Newton iteration with a finite-difference Jacobian
 * that is kept while it converges; embedded error estimate filtered through (I - h gamma_0 J)^-1; predictive step control.
 * Accuracy: each step's error at the mesh points is held below `absolute + relative |y|` a component; between mesh points
 * the local error is held below `interior` times that.
 * Source: Hairer & Wanner 1996, Solving Ordinary Differential Equations II, IV.8; Hairer & Wanner 1999.
 *
 * @example
 * const system = { dimension: 1, derivative: (t, y, out) => { out[0] = -1e6 * (y[0] - Math.cos(t)); } };
 * solveStiff(system, { start: 0, end: 1, initial: Float64Array.of(1), absolute: 1e-10 });
 */
export function solveStiff(system: StiffSystem, options: StiffOptions): StiffSolution {
  const { start, end, initial, relative = 0, interior = 10, settle = 0, maximumSteps = 20000, stopWhen } = options;
  const n = system.dimension;
  const absolute = validated(n, options, relative, interior);
  const direction = end < start ? -1 : 1;
  const range = Math.abs(end - start);
  const record = new StepRecord(start, initial);
  const step = new RadauStep(system, start, initial, absolute, relative, interior);
  const { stages } = step;
  if (range === 0) throw rangeIsEmpty(end);

  let h = direction * Math.min(Math.abs(options.firstStep ?? 1e-4 * range), range);
  let errorBefore = 0;
  let stepBefore = 0;
  let refused = false;
  for (;;) {
    const remaining = end - stages.t;
    let last = false;
    if (Math.abs(h) >= Math.abs(remaining) * (1 - 1e-10)) {
      h = remaining;
      last = true;
    } else if (Math.abs(h) > 0.5 * Math.abs(remaining)) h = 0.5 * remaining;
    if (record.steps + record.rejected >= maximumSteps) {
      throw stuck(`step limit ${maximumSteps} reached`, stages, record);
    }
    if (!(Math.abs(h) > 8 * Number.EPSILON * Math.max(Math.abs(stages.t), 1e-3 * range))) {
      throw stuck(`step size ${h} underflowed`, stages, record);
    }

    if (!stages.attempt(h)) {
      record.rejected++;
      refused = true;
      h *= stages.reduction;
      continue;
    }
    let error = step.estimate(h, record.steps === 0 || refused);
    if (record.steps < settle) error = step.disregardError();
    const safety = (SAFETY * 25) / (24 + stages.iterations);
    let factor = safety * error ** -EXPONENT;
    if (!(error <= 1)) {
      record.rejected++;
      refused = true;
      // A measure that is NaN shortens the step as far as it goes.
      h *= factor > 0.1 ? Math.min(0.9, factor) : 0.1;
      continue;
    }
    if (record.steps > 0) {
      // Gustafsson's predictive controller: the error's trend over the last two steps goes on.
      const trend = (Math.abs(h) / stepBefore) * (errorBefore / (error * error)) ** EXPONENT;
      factor = Math.min(factor, safety * trend);
    }
    errorBefore = Math.max(error, 1e-12);
    stepBefore = Math.abs(h);
    step.accept(h, last ? end : stages.t + h, record);
    if (last || stopWhen?.(stages.t, stages.y)) break;
    factor = Math.max(0.1, Math.min(6, factor));
    if (refused) factor = Math.min(1, factor);
    // A step that stays the same keeps the factored matrices.
    if (!(factor >= 1 && factor <= 1.1)) h *= factor;
    refused = false;
  }
  record.evaluations = stages.evaluations;
  record.finish();
  return record;
}

function stuck(what: string, stages: RadauStages, record: StepRecord): NotConvergedError {
  const values = Array.from(stages.y, (value) => value.toPrecision(6)).join(", ");
  return new NotConvergedError({
    where: "solveStiff",
    reason: `${what} at t = ${stages.t} after ${record.steps} steps and ${record.rejected} refused; y = [${values}]`,
    value: stages.t,
    evaluations: stages.evaluations,
  });
}

function rangeIsEmpty(end: number): DomainError {
  return new DomainError({ where: "solveStiff", argument: "end", rule: "must differ from start", value: end });
}

function validated(n: number, options: StiffOptions, relative: number, interior: number): Float64Array {
  const where = "solveStiff";
  const refuse = (argument: string, rule: string, value: unknown) => new DomainError({ where, argument, rule, value });
  if (!(Number.isInteger(n) && n >= 1)) throw refuse("dimension", "must be a positive integer", n);
  if (!Number.isFinite(options.start)) throw refuse("start", "must be finite", options.start);
  if (!Number.isFinite(options.end)) throw refuse("end", "must be finite", options.end);
  if (options.initial.length !== n) throw refuse("initial", `must have ${n} values`, options.initial.length);
  for (const value of options.initial) if (!Number.isFinite(value)) throw refuse("initial", "must be finite", value);
  const { absolute, firstStep } = options;
  const each = typeof absolute === "number" ? new Float64Array(n).fill(absolute) : absolute;
  if (each.length !== n) throw refuse("absolute", `must be one number or ${n}`, each.length);
  for (const value of each) if (!(value > 0)) throw refuse("absolute", "must be above 0", value);
  if (!(relative >= 0)) throw refuse("relative", "must be at least 0", relative);
  if (!(interior > 0)) throw refuse("interior", "must be above 0", interior);
  if (firstStep !== undefined && !(Math.abs(firstStep) > 0)) throw refuse("firstStep", "must not be 0", firstStep);
  return each;
}
