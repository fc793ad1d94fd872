import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError, NotConvergedError } from "../../../cosmo/errors";
import { type StiffSystem, solveStiff } from "../../../cosmo/numerics";
import { RadauStep } from "../../../cosmo/numerics/radauStep";
import { StepRecord } from "../../../cosmo/numerics/stiffSolution";

/** Prothero & Robinson 1974: y' = -rate (y - sin t) + cos t, whose solution is sin t whatever the rate. */
const protheroRobinson = (rate: number): StiffSystem => ({
  dimension: 1,
  derivative: (t, y, out) => {
    out[0] = -rate * (y[0] - Math.sin(t)) + Math.cos(t);
  },
});

const oscillator: StiffSystem = {
  dimension: 2,
  derivative: (_t, y, out) => {
    out[0] = y[1];
    out[1] = -y[0];
  },
};

const robertson: StiffSystem = {
  dimension: 3,
  derivative: (_t, y, out) => {
    const first = 0.04 * y[0];
    const second = 1e4 * y[1] * y[2];
    const third = 3e7 * y[1] * y[1];
    out[0] = -first + second;
    out[1] = first - second - third;
    out[2] = third;
  },
};

/** Steps of equal size, without control. */
function equalSteps(system: StiffSystem, initial: Float64Array, end: number, count: number): StepRecord {
  const absolute = new Float64Array(initial.length).fill(1e-14);
  const stepper = new RadauStep(system, 0, initial, absolute, 0, 1);
  const record = new StepRecord(0, initial);
  for (let k = 0; k < count; k++) {
    expect(stepper.stages.attempt(end / count)).toBe(true);
    stepper.estimate(end / count, false);
    stepper.accept(end / count, (end * (k + 1)) / count, record);
  }
  record.finish();
  return record;
}

describe("one Radau step", () => {
  it("of y' = lambda y multiplies by the Pade approximant (4, 5) of the exponential", () => {
    // R(z) = P/Q, P = sum_k C(4,k) (9-k)!/9! z^k, Q = sum_k C(5,k) (9-k)!/9! (-z)^k; Hairer & Wanner 1996, IV.3, theorem 3.12
    const pade = [1, 4 / 9, 1 / 12, 1 / 126, 1 / 3024];
    const under = [1, -5 / 9, 5 / 36, -5 / 252, 5 / 3024, -1 / 15120];
    const sum = (terms: number[], z: number) => terms.reduceRight((total, term) => total * z + term, 0);
    for (const z of [0.5, -0.1, -1, -5, -30, -1e3, -1e8]) {
      const record = equalSteps(
        {
          dimension: 1,
          derivative: (_t, y, out) => {
            out[0] = z * y[0];
          },
        },
        Float64Array.of(1),
        1,
        1,
      );
      const exact = sum(pade, z) / sum(under, z);
      expect(Math.abs(record.values[1] - exact)).toBeLessThan(2e-14 * Math.max(1, Math.abs(exact))); // measured 2e-15
    }
  });

  it("gains order 9 at the mesh points and order 7 between them", () => {
    const end = Math.PI;
    const errors = [2, 4, 8].map((count) => {
      const record = equalSteps(oscillator, Float64Array.of(1, 0), end, count);
      const atMesh = Math.hypot(record.values[2 * count] + 1, record.values[2 * count + 1]);
      let between = 0;
      const y = new Float64Array(2);
      // the first step has no step before it to improve its polynomial
      for (let t = end / 2; t <= end; t += 0.001) {
        record.evaluate(t, y);
        between = Math.max(between, Math.hypot(y[0] - Math.cos(t), y[1] + Math.sin(t)));
      }
      return { atMesh, between };
    });
    for (let k = 0; k < 2; k++) {
      const order = Math.log2(errors[k].atMesh / errors[k + 1].atMesh);
      expect(order).toBeGreaterThan(8.8); // measured 8.93 and 8.98
      expect(order).toBeLessThan(9.3);
      expect(Math.log2(errors[k].between / errors[k + 1].between)).toBeGreaterThan(6.7); // measured 6.9 and 7.0
    }
  });
});

describe("solveStiff", () => {
  it("follows Prothero and Robinson's solution for any stiffness, within its tolerances and its own estimates", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 10, noNaN: true }),
        fc.double({ min: -11, max: -5, noNaN: true }),
        fc.boolean(),
        (logRate, logTolerance, backward) => {
          const tolerance = 10 ** logTolerance;
          const [start, end] = backward ? [6, -1] : [-1, 6];
          const rate = 10 ** logRate * (backward ? -1 : 1);
          const solution = solveStiff(protheroRobinson(rate), {
            start,
            end,
            initial: Float64Array.of(Math.sin(start)),
            absolute: tolerance,
          });
          const y = new Float64Array(1);
          let atMesh = 0;
          let between = 0;
          for (let i = 0; i <= solution.steps; i++) {
            atMesh = Math.max(atMesh, Math.abs(solution.values[i] - Math.sin(solution.mesh[i])));
          }
          for (let t = -1; t <= 6; t += 0.01) {
            solution.evaluate(t, y);
            between = Math.max(between, Math.abs(y[0] - Math.sin(t)));
          }
          expect(atMesh).toBeLessThan(12 * tolerance + 1e-14); // some hundred steps; at most 3.6 in 1500 runs
          expect(atMesh).toBeLessThan(4 * solution.error[0] + 1e-14); // at most 1.8 in 1500 runs
          expect(between).toBeLessThan(20 * tolerance + 1e-14); // at most 6.3 in 1500 runs; the option allows 10 a step
          expect(solution.converged).toBe(true);
        },
      ),
      { numRuns: 60 },
    );
  });

  it("solves Van der Pol's oscillator with mu^2 = 1e6 to the test set's digits", () => {
    const system: StiffSystem = {
      dimension: 2,
      derivative: (_t, y, out) => {
        out[0] = y[1];
        out[1] = ((1 - y[0] * y[0]) * y[1] - y[0]) / 1e-6;
      },
    };
    const initial = Float64Array.of(2, 0);
    const solution = solveStiff(system, { start: 0, end: 2, initial, absolute: 1e-10, relative: 1e-10 });
    const at = 2 * solution.steps;
    // Hairer & Wanner 1996, IV.10; Test Set for IVP Solvers, problem VDPOL: y(2) (memory)
    expect(Math.abs(solution.values[at] / 1.706167732170483 - 1)).toBeLessThan(1e-11); // measured 1.1e-13 to 1e-12
    expect(Math.abs(solution.values[at + 1] / -0.8928097010247975 - 1)).toBeLessThan(2e-11); // measured 4e-13 to 2e-12
    expect(solution.steps).toBeLessThan(900); // measured 646
  });

  it("solves Robertson's reaction over eleven decades of t, with components of very different size", () => {
    const solution = solveStiff(robertson, {
      start: 0,
      end: 1e11,
      initial: Float64Array.of(1, 0, 0),
      absolute: Float64Array.of(1e-17, 1e-21, 1e-11),
      relative: 1e-11,
      firstStep: 1e-6,
    });
    const y = solution.values.subarray(3 * solution.steps);
    // Test Set for IVP Solvers, problem ROBER: y(1e11) (memory)
    expect(Math.abs(y[0] / 2.083340149701255e-8 - 1)).toBeLessThan(2e-10); // measured 1.9e-11
    expect(Math.abs(y[1] / 8.333360770334713e-14 - 1)).toBeLessThan(2e-10); // measured 1.9e-11
    expect(Math.abs(y[2] / 0.999999979166505 - 1)).toBeLessThan(1e-13); // measured 1.0e-14
    expect(Math.abs(y[0] + y[1] + y[2] - 1)).toBeLessThan(1e-13); // an invariant that the method keeps; measured 1e-15
    expect(solution.steps).toBeLessThan(700); // measured 513
  });

  it("solves the eight equations of HIRES", () => {
    const system: StiffSystem = {
      dimension: 8,
      derivative: (_t, y, out) => {
        out[0] = -1.71 * y[0] + 0.43 * y[1] + 8.32 * y[2] + 0.0007;
        out[1] = 1.71 * y[0] - 8.75 * y[1];
        out[2] = -10.03 * y[2] + 0.43 * y[3] + 0.035 * y[4];
        out[3] = 8.32 * y[1] + 1.71 * y[2] - 1.12 * y[3];
        out[4] = -1.745 * y[4] + 0.43 * y[5] + 0.43 * y[6];
        out[5] = -280 * y[5] * y[7] + 0.69 * y[3] + 1.71 * y[4] - 0.43 * y[5] + 0.69 * y[6];
        out[6] = 280 * y[5] * y[7] - 1.81 * y[6];
        out[7] = -280 * y[5] * y[7] + 1.81 * y[6];
      },
    };
    const initial = Float64Array.of(1, 0, 0, 0, 0, 0, 0, 0.0057);
    const solution = solveStiff(system, { start: 0, end: 321.8122, initial, absolute: 1e-14, relative: 1e-11 });
    // Schaefer 1975; Test Set for IVP Solvers, problem HIRES: y(321.8122) (memory)
    const printed = [
      0.7371312573325668e-3, 0.1442485726316185e-3, 0.5888729740967575e-4, 0.1175651343283149e-2, 0.2386356198831331e-2,
      0.6238968252742796e-2, 0.2849998395185769e-2, 0.2850001604814231e-2,
    ];
    printed.forEach((value, c) => {
      expect(Math.abs(solution.values[8 * solution.steps + c] / value - 1)).toBeLessThan(3e-12); // measured 3.2e-13
    });
  });

  it("reaches a tolerance of 1e-11 on a coupled linear system with rates from 1 to 1e8", () => {
    // y = S exp(-D t) S^-1 y_0 with an S that mixes all three
    const system: StiffSystem = {
      dimension: 3,
      derivative: (_t, y, out) => {
        const [a, b, c] = [y[0] - y[1], y[1] - y[2], y[2]];
        const [da, db, dc] = [-a, -1e4 * b, -1e8 * (c - 1)];
        out[2] = dc;
        out[1] = db + dc;
        out[0] = da + db + dc;
      },
    };
    const exact = (t: number) => {
      const [a, b, c] = [Math.exp(-t), 2 * Math.exp(-1e4 * t), 1 + Math.exp(-1e8 * t)];
      return [a + b + c, b + c, c];
    };
    const initial = Float64Array.from(exact(0));
    const solution = solveStiff(system, { start: 0, end: 3, initial, absolute: 1e-11, firstStep: 1e-10 });
    let worst = 0;
    for (let i = 0; i <= solution.steps; i++) {
      exact(solution.mesh[i]).forEach((value, c) => {
        worst = Math.max(worst, Math.abs(solution.values[3 * i + c] - value));
      });
    }
    expect(worst).toBeLessThan(5e-13); // measured 4.1e-14
    expect(worst).toBeLessThan(3 * Math.max(...solution.error));
  });

  it("runs backward over the same path", () => {
    const forward = solveStiff(oscillator, { start: 0, end: 5, initial: Float64Array.of(1, 0), absolute: 1e-11 });
    const y = forward.values.slice(-2);
    expect(Math.abs(y[0] - Math.cos(5))).toBeLessThan(1e-11);
    const back = solveStiff(oscillator, { start: 5, end: 0, initial: y, absolute: 1e-11 });
    expect(back.mesh[back.steps]).toBe(0);
    expect(Math.abs(back.values[2 * back.steps] - 1)).toBeLessThan(2e-11);
    expect(Math.abs(back.values[2 * back.steps + 1])).toBeLessThan(2e-11);
  });

  it("has a continuous solution that meets the mesh values, and locates every t", () => {
    for (const [start, end] of [
      [0, 5],
      [5, 0],
    ]) {
      const initial = Float64Array.of(Math.cos(start), -Math.sin(start));
      const solution = solveStiff(oscillator, { start, end, initial, absolute: 1e-8 });
      const y = new Float64Array(2);
      expect(solution.mesh.length).toBe(solution.steps + 1);
      expect(solution.values.length).toBe(2 * solution.steps + 2);
      expect(solution.locate(start)).toBe(0);
      expect(solution.locate(end)).toBe(solution.steps - 1);
      for (let step = 0; step < solution.steps; step++) {
        const [left, right] = [solution.mesh[step], solution.mesh[step + 1]];
        expect(solution.locate(0.5 * (left + right))).toBe(step);
        expect(solution.locate(right)).toBe(step);
        for (const [t, index] of [
          [left, step],
          [right, step + 1],
        ]) {
          solution.evaluateInStep(step, t, y);
          expect(Math.abs(y[0] - solution.values[2 * index])).toBeLessThan(1e-15);
          expect(Math.abs(y[1] - solution.values[2 * index + 1])).toBeLessThan(1e-15);
        }
      }
      expect(() => solution.evaluate(5.0001, y)).toThrow(DomainError);
      expect(() => solution.evaluate(Number.NaN, y)).toThrow(`t must lie between ${start} and ${end}, got NaN`);
    }
  });

  it("takes fewer steps for a looser tolerance and where the inside of the steps may be poorer", () => {
    const steps = (absolute: number, interior: number) =>
      solveStiff(oscillator, { start: 0, end: 20, initial: Float64Array.of(1, 0), absolute, interior }).steps;
    expect(steps(1e-6, 10)).toBeLessThan(steps(1e-9, 10));
    expect(steps(1e-9, 1000)).toBeLessThan(steps(1e-9, 1));
  });

  it("stops after the step in which stopWhen holds", () => {
    const solution = solveStiff(oscillator, {
      start: 0,
      end: 5,
      initial: Float64Array.of(1, 0),
      absolute: 1e-8,
      stopWhen: (_t, y) => y[0] < 0,
    });
    const last = solution.values[2 * solution.steps];
    expect(last).toBeLessThan(0);
    expect(solution.values[2 * solution.steps - 2]).toBeGreaterThanOrEqual(0);
    expect(solution.mesh[solution.steps]).toBeLessThan(5);
  });

  it("lets initial values that lie off the slow solution fall onto it in the steps it is told to settle", () => {
    const options = { start: 1, end: 4, initial: Float64Array.of(Math.sin(1) + 1e-3), absolute: 1e-10 };
    const followed = solveStiff(protheroRobinson(1e9), { ...options, firstStep: 1e-12 });
    const settled = solveStiff(protheroRobinson(1e9), { ...options, settle: 2 });
    expect(settled.steps).toBeLessThan(followed.steps - 10); // measured 19 and 37
    for (const solution of [followed, settled]) {
      expect(Math.abs(solution.values[solution.steps] - Math.sin(4))).toBeLessThan(1e-10);
    }
  });

  it("throws where it stands when steps run out, when they underflow, and when f is not finite", () => {
    const initial = Float64Array.of(1);
    const stop = () =>
      solveStiff(oscillator, {
        start: 0,
        end: 1000,
        initial: Float64Array.of(1, 0),
        absolute: 1e-10,
        maximumSteps: 30,
      });
    expect(stop).toThrow(NotConvergedError);
    expect(stop).toThrow(/step limit 30 reached at t = \d/);
    // y = 1 / (1 - t) has no continuation past t = 1
    const pole: StiffSystem = {
      dimension: 1,
      derivative: (_t, y, out) => {
        out[0] = y[0] * y[0];
      },
    };
    expect(() => solveStiff(pole, { start: 0, end: 2, initial, absolute: 1e-8, relative: 1e-8 })).toThrow(
      NotConvergedError,
    );
    const broken: StiffSystem = {
      dimension: 1,
      derivative: (_t, _y, out) => {
        out[0] = Number.NaN;
      },
    };
    expect(() => solveStiff(broken, { start: 3, end: 4, initial, absolute: 1e-8 })).toThrow(
      "the derivative is not finite at t = 3: [NaN]",
    );
    const wall: StiffSystem = {
      dimension: 1,
      derivative: (t, _y, out) => {
        out[0] = t < 0.5 ? 1 : Number.NaN;
      },
    };
    expect(() => solveStiff(wall, { start: 0, end: 1, initial, absolute: 1e-8 })).toThrow(/underflowed at t = 0.4999/);
  });

  it("refuses bad options by name", () => {
    const good = { start: 0, end: 1, initial: Float64Array.of(1), absolute: 1e-8 };
    const solve = (change: object) => () => solveStiff(protheroRobinson(1), { ...good, ...change });
    expect(solve({ start: Number.NaN })).toThrow("solveStiff: start must be finite, got NaN");
    expect(solve({ end: Number.POSITIVE_INFINITY })).toThrow("end must be finite, got Infinity");
    expect(solve({ end: 0 })).toThrow("end must differ from start, got 0");
    expect(solve({ initial: Float64Array.of(1, 2) })).toThrow("initial must have 1 values, got 2");
    expect(solve({ initial: Float64Array.of(Number.NaN) })).toThrow("initial must be finite, got NaN");
    expect(solve({ absolute: 0 })).toThrow("absolute must be above 0, got 0");
    expect(solve({ absolute: Float64Array.of(1, 1) })).toThrow("absolute must be one number or 1, got 2");
    expect(solve({ relative: -1 })).toThrow("relative must be at least 0, got -1");
    expect(solve({ interior: Number.NaN })).toThrow("interior must be above 0, got NaN");
    expect(solve({ firstStep: 0 })).toThrow("firstStep must not be 0, got 0");
    expect(() => solveStiff({ ...protheroRobinson(1), dimension: 0 }, good)).toThrow("dimension must be");
  });
});
