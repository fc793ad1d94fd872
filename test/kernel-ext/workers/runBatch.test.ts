import { describe, expect, it } from "vitest";
import { type BatchColumns, rowStatus } from "../../../cosmo/batch";
import { evaluateModel } from "../../../cosmo/solve";
import { type BatchRun, BatchStoppedError, chunkRows, runBatch, workerPool } from "../../../kernel-ext/workers";
import { uniformNumbers } from "../chain/invented";

// Worker threads run the build (node setup.mjs); all models here are invented.

const outputs = ["age", "acousticAngle", "dragSoundHorizon", "dampingWavenumber", "luminosityDistance(1.1)"];

function models(rows: number, seed = 20261201): Record<string, Float64Array> {
  const uniform = uniformNumbers(seed);
  const column = (low: number, high: number) =>
    Float64Array.from({ length: rows }, () => low + (high - low) * uniform());
  return {
    hubble: column(60, 75),
    baryonDensity: column(0.02, 0.025),
    coldMatterDensity: column(0.1, 0.14),
    curvature: column(-0.05, 0.05),
    "neutrinos.massSum": column(0, 0.4),
  };
}

function givens(columns: BatchColumns, row: number) {
  const at = (name: string) => (columns[name] as Float64Array)[row]!;
  return {
    hubble: at("hubble"),
    baryonDensity: at("baryonDensity"),
    coldMatterDensity: at("coldMatterDensity"),
    curvature: at("curvature"),
    neutrinos: { massSum: at("neutrinos.massSum") },
  };
}

const bytes = (run: BatchRun): Uint8Array[] => outputs.map((name) => new Uint8Array(run.columns[name]!.buffer));

describe("runBatch", () => {
  it("gives the same digits with no worker, one, two and three, and whatever stands around a row", async () => {
    const rows = 3 * chunkRows + 77;
    const columns = models(rows);
    const here = await runBatch({ outputs }, columns, { workers: 0 });
    for (const workers of [1, 2, 3]) {
      expect(bytes(await runBatch({ outputs }, columns, { workers }))).toEqual(bytes(here));
    }
    const part = Object.fromEntries(Object.entries(columns).map(([name, column]) => [name, column.slice(1001, 1020)]));
    const alone = await runBatch({ outputs }, part, { workers: 0 });
    for (const name of outputs) expect(alone.columns[name]).toEqual(here.columns[name]!.slice(1001, 1020));
    expect(here.counts.engine).toBe(rows);
  });

  it("agrees with evaluateModel within 1e-6, and with accuracy full to the last digit", async () => {
    const columns = models(12);
    const fast = await runBatch({ outputs }, columns, { workers: 1 });
    const full = await runBatch({ outputs, accuracy: "full" }, columns, { workers: 1 });
    for (let row = 0; row < 12; row++) {
      const numbers = evaluateModel(givens(columns, row));
      for (const name of outputs) {
        const value = name.startsWith("lum") ? numbers.value("luminosityDistance", 1.1) : numbers.value(name);
        expect(full.columns[name]![row]).toBe(value);
        // The contract of the batch engine, see test/cosmo/batch.
        expect(Math.abs(fast.columns[name]![row]! / value - 1)).toBeLessThan(1e-6);
      }
    }
    expect(fast.fullOutputs).toEqual([]);
    expect(full.fullOutputs).toEqual(outputs);
    expect(full.counts.engine).toBe(0);
  });

  it("keeps a failed row empty, with its reason, and goes on", async () => {
    const columns = models(50);
    columns["hubble"]![7] = -1;
    columns["baryonDensity"]![30] = Number.NaN;
    columns["coldMatterDensity"]![31] = 0.9;
    for (const workers of [0, 2]) {
      const run = await runBatch({ outputs: ["age"] }, columns, { workers });
      const empty = [...run.columns["age"]!.keys()].filter((row) => Number.isNaN(run.columns["age"]![row]!));
      expect(empty).toEqual([7, 30]);
      expect(run.problems.map(({ row, output }) => [row, output])).toEqual([
        [7, undefined],
        [30, undefined],
      ]);
      expect(run.problems[0]!.message).toContain("hubble must be finite and positive, got -1");
      expect(run.problems[1]!.message).toContain("baryonDensity");
      expect([run.status[7], run.status[30]]).toEqual([rowStatus.failed, rowStatus.failed]);
      // Outside the engine's range, and computed all the same.
      expect(run.status[31]).toBe(rowStatus.outsideRange);
      expect(run.columns["age"]![31]).toBe(evaluateModel(givens(columns, 31)).value("age"));
    }
  });

  it("computes an output that has no value in some rows where it has one", async () => {
    const columns = {
      hubble: Float64Array.of(67, 67),
      baryonDensity: Float64Array.of(0, 0.022),
      coldMatterDensity: 0.12,
    };
    const run = await runBatch({ outputs: ["age", "acousticAngle"] }, columns, { workers: 0 });
    expect(run.columns["age"]!.every(Number.isFinite)).toBe(true);
    expect(Number.isNaN(run.columns["acousticAngle"]![0]!)).toBe(true);
    expect(run.status[0]).toBe(rowStatus.partlyEmpty);
    expect(run.problems).toMatchObject([{ row: 0, output: "acousticAngle" }]);
  });

  it("tells progress that rises to the number of rows", async () => {
    const rows = 2 * chunkRows;
    for (const workers of [0, 2]) {
      const seen: number[] = [];
      await runBatch({ outputs }, models(rows), {
        workers,
        onProgress: (done, all) => {
          expect(all).toBe(rows);
          seen.push(done);
        },
      });
      expect(seen.at(-1)).toBe(rows);
      expect([...seen].sort((a, b) => a - b)).toEqual(seen);
    }
  });

  it("holds lists of masses, a number for all rows, and memory that is shared already", async () => {
    const masses = [Float64Array.of(0.06, 0.1), Float64Array.of(0, 0.05), 0];
    const shared = new Float64Array(new SharedArrayBuffer(16));
    shared.set([67, 68]);
    const run = await runBatch(
      { outputs: ["neutrinoDensity", "acousticAngle"], shared: { baryonDensity: 0.0224, recombination: "peebles" } },
      { hubble: shared, coldMatterDensity: 0.12, "neutrinos.masses": masses },
      { workers: 1 },
    );
    const expected = evaluateModel({
      hubble: 68,
      baryonDensity: 0.0224,
      coldMatterDensity: 0.12,
      neutrinos: { masses: [0.1, 0.05, 0] },
      recombination: "peebles",
    });
    for (const name of ["neutrinoDensity", "acousticAngle"]) {
      expect(Math.abs(run.columns[name]![1]! / expected.value(name) - 1)).toBeLessThan(1e-6);
    }
  });
});

describe("a run that is stopped", () => {
  const slow = { outputs: ["age"], accuracy: "full" as const };

  it("by its signal rejects at once, with the rows done, and the workers are free for the next run", async () => {
    for (const workers of [0, 2]) {
      const control = new AbortController();
      const running = runBatch({ ...slow, outputs }, models(200_000), {
        workers,
        signal: control.signal,
        onProgress: () => control.abort(),
      });
      await expect(running).rejects.toThrow(BatchStoppedError);
      await expect(running).rejects.toThrow(/stopped after \d+ of 200000 rows/);
      const next = await runBatch({ outputs: ["age"] }, models(10), { workers });
      expect(next.problems).toEqual([]);
    }
  });

  it("before it begins rejects", async () => {
    await expect(runBatch(slow, models(10), { signal: AbortSignal.abort() })).rejects.toThrow("after 0 of 10 rows");
  });

  it("by an error of its listener rejects with that error", async () => {
    const running = runBatch(slow, models(200_000), {
      workers: 1,
      onProgress: () => {
        throw new RangeError("no more");
      },
    });
    await expect(running).rejects.toThrow("no more");
  });

  it("by a worker that dies is told, and the pool makes new ones", async () => {
    const running = runBatch({ ...slow, outputs }, models(200_000), {
      workers: 2,
      // What a worker gets when it runs out of memory, or is taken away.
      onProgress: () => void workerPool().close(),
    });
    await expect(running).rejects.toThrow("the pool was closed");
    expect((await runBatch({ outputs: ["age"] }, models(10), { workers: 2 })).problems).toEqual([]);
  });
});

describe("runBatch solves for H0 from a derived quantity", () => {
  // Measured 7e-15 at most; the engine's own value of the derived quantity goes in.
  for (const name of ["acousticAngle", "age", "acousticMultipole", "matterFraction"]) {
    it(`${name} gives back the H0 that it came from`, async () => {
      const columns = models(600);
      const { hubble, curvature: _, ...rest } = columns;
      const flat = { ...rest, hubble: hubble! };
      const forward = await runBatch({ outputs: [name] }, flat, { workers: 0 });
      const back = await runBatch(
        { outputs: ["hubble", "luminosityDistance(1.1)"], hubbleFrom: name },
        { ...rest, [name]: forward.columns[name]! },
        { workers: 0 },
      );
      expect(back.problems).toEqual([]);
      expect(back.counts.engine).toBe(600);
      hubble!.forEach((value, row) => {
        expect(Math.abs(back.hubble![row]! / value - 1)).toBeLessThan(1e-13);
        expect(back.columns["hubble"]![row]).toBe(back.hubble![row]);
      });
    });
  }

  it("agrees with the full computation within the engine's accuracy over how strongly theta_* depends on H0", async () => {
    const columns = {
      acousticAngle: Float64Array.of(1.0411, 1.05, 1.03),
      baryonDensity: 0.0224,
      coldMatterDensity: 0.12,
    };
    const fast = await runBatch({ outputs: ["age"], hubbleFrom: "acousticAngle" }, columns, { workers: 0 });
    // Measured 1.8e-8 in H0 and 8e-9 in the age.
    for (const [row, acousticAngle] of [1.0411, 1.05, 1.03].entries()) {
      const exact = evaluateModel({ acousticAngle, baryonDensity: 0.0224, coldMatterDensity: 0.12 });
      expect(Math.abs(fast.hubble![row]! / exact.model.hubble - 1)).toBeLessThan(2e-7);
      expect(Math.abs(fast.columns["age"]![row]! / exact.value("age") - 1)).toBeLessThan(1e-7);
    }
  });

  it("leaves a row outside the engine's range of H0 to the full computation, and says why there is no answer", async () => {
    const columns = { age: Float64Array.of(13.8, 30, 1000), baryonDensity: 0.0224, coldMatterDensity: 0.12 };
    const run = await runBatch({ outputs: ["age"], hubbleFrom: "age" }, columns, { workers: 0 });
    expect(run.status[0]).toBe(rowStatus.engine);
    expect(run.problems.every(({ row }) => row > 0)).toBe(true);
    expect(run.problems.at(-1)!.message).toMatch(/no model was found|age/);
    expect(Number.isNaN(run.hubble![2]!)).toBe(true);
  });
});

describe("runBatch refuses before a row is computed", () => {
  const columns = models(3);
  const refusals: [string, () => Promise<unknown>, string][] = [
    ["an unknown quantity", () => runBatch({ outputs: ["agee"] }, columns), '"agee"'],
    ["a quantity twice", () => runBatch({ outputs: ["age", "age"] }, columns), "must not ask twice"],
    ["no quantity", () => runBatch({ outputs: [] }, columns), "must name at least one quantity"],
    ["an unknown column", () => runBatch({ outputs: ["age"] }, { ...columns, hubbel: new Float64Array(3) }), "hubbel"],
    [
      "columns of two lengths",
      () => runBatch({ outputs: ["age"] }, { ...columns, curvature: new Float64Array(4) }),
      "must have as many rows as hubble, 3, got 4",
    ],
    ["no rows", () => runBatch({ outputs: ["age"] }, { hubble: 67 }), "at least one column with at least one row"],
    ["too few givens", () => runBatch({ outputs: ["age"] }, { hubble: columns["hubble"]! }), "gives the baryons"],
    [
      "a wrong number of workers",
      () => runBatch({ outputs: ["age"] }, columns, { workers: 1.5 }),
      "workers must be a whole number",
    ],
    ["an accuracy that is none", () => runBatch({ outputs: ["age"], accuracy: "high" as "full" }, columns), "accuracy"],
    [
      "a quantity of z in place of H0",
      () => runBatch({ outputs: ["age"], hubbleFrom: "luminosityDistance" }, columns),
      "luminosityDistance",
    ],
    [
      "a column in place of H0 that is not there",
      () => runBatch({ outputs: ["age"], hubbleFrom: "acousticAngle" }, columns),
      "acousticAngle must be among the columns",
    ],
  ];
  for (const [name, run, message] of refusals) {
    it(name, async () => {
      await expect(run()).rejects.toThrow(message);
    });
  }
});
