import { spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { readParquet } from "../../../kernel-ext/data";
import { uniformNumbers } from "../chain/invented";
import { allRows } from "../data/tables";
import { runDerive } from "./deriveRun";

// All files of models here are invented. Worker threads run the build (node setup.mjs).

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-derive-fast-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

/** A file of models with a column that is carried through. */
function modelFile(rows: number): string {
  const uniform = uniformNumbers(4711);
  const lines = Array.from({ length: rows }, (_, row) => {
    const hubble = (62 + 10 * uniform()).toFixed(4);
    return `${String(row).padStart(6, "0")},${hubble},${(0.021 + 0.003 * uniform()).toFixed(6)},${(0.1 + 0.04 * uniform()).toFixed(5)}`;
  });
  return `label,hubble,baryonDensity,coldMatterDensity\n${lines.join("\n")}\n`;
}

const add = "age, acousticAngle, luminosityDistance(1.1)";
const rowsOf = (text: string): string[][] =>
  text
    .trimEnd()
    .split("\n")
    .map((line) => line.split(","));

describe("derive --fast", () => {
  it("agrees with the full computation within 1e-6, in nine digits, and says which accuracy it has", async () => {
    const text = modelFile(12);
    const full = rowsOf((await runDerive(["-", "--add", add], text)).stdout);
    const run = await runDerive(["-", "--add", add, "--fast"], text);
    const fast = rowsOf(run.stdout);
    expect(run.code).toBe(0);
    expect(run.stderr).toBe("cosmology-cells derive standard input: batch engine, accuracy 1e-6 or better\n");
    expect(fast[0]).toEqual(full[0]);
    fast.slice(1).forEach((row, index) => {
      expect(row.slice(0, 4)).toEqual(full[index + 1]!.slice(0, 4));
      row.slice(4).forEach((cell, column) => {
        expect(Math.abs(Number(cell) / Number(full[index + 1]![column + 4]) - 1)).toBeLessThan(1e-6);
        expect(cell.replace(/[.]/, "").length).toBeLessThanOrEqual(9);
      });
    });
  });

  it("writes the same bytes with any number of workers, over several blocks, in order", async () => {
    const path = file("models.csv", modelFile(20_000));
    const outs = await Promise.all(
      ["0", "1", "3"].map(async (workers) => {
        const out = join(folder, `out${workers}.csv`);
        expect((await runDerive([path, "--fast", "--workers", workers, "--add", add, "--out", out])).code).toBe(0);
        return readFileSync(out, "utf8");
      }),
    );
    expect(outs[1]).toBe(outs[0]);
    expect(outs[2]).toBe(outs[0]);
    expect(
      rowsOf(outs[0]!)
        .slice(1)
        .map(([label]) => Number(label)),
    ).toEqual([...Array(20_000).keys()]);
  });

  it("gives each row the digits that it has alone", async () => {
    const lines = modelFile(40).trimEnd().split("\n");
    const whole = rowsOf((await runDerive(["-", "--fast", "--add", add], `${lines.join("\n")}\n`)).stdout);
    const alone = rowsOf((await runDerive(["-", "--fast", "--add", add], `${lines[0]}\n${lines[24]}\n`)).stdout);
    expect(alone[1]).toEqual(whole[24]);
  });

  it("tells a bad row as the full computation does, refused or kept", async () => {
    const text = `${modelFile(3)}000003,-5,0.022,0.12\n000004,67,,0.12\n000005,67,0.022,0.12\n`;
    for (const args of [[], ["--bad-rows", "keep"]]) {
      const full = await runDerive(["-", "--add", "age", "--digits", "6", ...args], text);
      const fast = await runDerive(["-", "--add", "age", "--digits", "6", "--fast", ...args], text);
      expect(fast.code).toBe(full.code);
      expect(fast.stdout).toBe(full.stdout);
      expect(fast.stderr).toContain(full.stderr.split("\n")[0]);
    }
    const out = join(folder, "out.csv");
    expect((await runDerive(["-", "--add", "age", "--fast", "--out", out], text)).code).toBe(1);
    expect(readdirSync(folder)).toEqual([]);
  });

  it("computes rows outside the engine's range in full and says how many", async () => {
    const text = `${modelFile(2)}x,67,0.022,0.5\n`;
    const run = await runDerive(["-", "--add", "age", "--fast", "--digits", "15"], text);
    const age = evaluateModel({ hubble: 67, baryonDensity: 0.022, coldMatterDensity: 0.5 }).value("age");
    expect(rowsOf(run.stdout)[3]![4]).toBe(String(Number(age.toPrecision(15))));
    expect(run.stderr).toContain("1 of 3 rows took the full computation");
  });

  it("reads masses as lists, fills empty cells with --set, and takes the tier", async () => {
    const text = "hubble,baryonDensity,coldMatterDensity,neutrinos.masses\n67,0.0224,0.12,0.05;0.01\n68,,0.12,0.06\n";
    const args = ["-", "--add", "acousticAngle", "--set", "baryonDensity=0.0224", "--recombination", "peebles"];
    const [full, fast] = [await runDerive(args, text), await runDerive([...args, "--fast"], text)];
    for (const row of [1, 2]) {
      const [one, other] = [full, fast].map((run) => Number(rowsOf(run.stdout)[row]![4]));
      expect(Math.abs(one! / other! - 1)).toBeLessThan(1e-6);
    }
    expect(fast.stderr).toContain("batch engine");
  });

  it("solves for H0 from theta_* and from the age", async () => {
    const text = "baryonDensity,coldMatterDensity,acousticAngle\n0.0224,0.12,1.0411\n0.0223,0.119,1.042\n";
    const run = await runDerive(["-", "--fast", "--add", "hubble, age"], text);
    expect(run.stderr).toContain("batch engine, accuracy 1e-6 or better; H0 is solved for from acousticAngle");
    const expected = evaluateModel({ baryonDensity: 0.0224, coldMatterDensity: 0.12, acousticAngle: 1.0411 });
    // Measured 1.2e-8 in H0 and 5e-9 in the age, the rounding to nine digits besides.
    const [, , , hubble, age] = rowsOf(run.stdout)[1]!.map(Number);
    expect(Math.abs(hubble! / expected.model.hubble - 1)).toBeLessThan(2e-7);
    expect(Math.abs(age! / expected.value("age") - 1)).toBeLessThan(1e-7);
  });

  const reasons: [string, string, string[], string][] = [
    [
      "an output that the engine does not know",
      modelFile(1),
      ["--add", "age, lastScatteringRedshift, visibilityWidth"],
      "the batch engine does not compute visibilityWidth",
    ],
    [
      "a column of words",
      "hubble,baryonDensity,coldMatterDensity,recombination\n67,0.0224,0.12,peebles\n",
      ["--add", "age"],
      "the column recombination holds words",
    ],
    [
      "a parameter other than H0 to be solved for",
      "hubble,baryonDensity,acousticAngle\n67,0.0224,1.0411\n",
      ["--add", "age"],
      "acousticAngle stands in for a parameter other than H0",
    ],
    [
      "the cold matter stated twice",
      "hubble,baryonDensity,coldMatterDensity,coldMatterFraction\n50,0.025,0.1,0.4\n",
      ["--add", "age"],
      "coldMatterDensity and coldMatterFraction state the cold matter twice",
    ],
  ];
  for (const [name, text, args, reason] of reasons) {
    it(`takes the full computation for ${name}, says so, and gives its digits`, async () => {
      const run = await runDerive(["-", "--fast", ...args, "--digits", "15"], text);
      const full = await runDerive(["-", ...args], text);
      expect(run.stderr).toContain(`--fast cannot be used: ${reason}`);
      expect([run.code, run.stdout]).toEqual([full.code, full.stdout]);
    });
  }

  const refusals: [string, string[], string][] = [
    ["--errors beside it", ["--errors"], "--errors and --fast do not go together"],
    [
      "a number of workers that is none",
      ["--workers", "many"],
      '--workers must be a whole number from 0 to 256, got "many"',
    ],
  ];
  for (const [name, args, message] of refusals) {
    it(`refuses ${name}`, async () => {
      const run = await runDerive(["-", "--fast", "--add", "age", ...args], modelFile(1));
      expect([run.code, run.stdout]).toEqual([2, ""]);
      expect(run.stderr).toContain(message);
    });
  }

  it("--workers without it is refused", async () => {
    expect((await runDerive(["-", "--add", "age", "--workers", "2"], modelFile(1))).stderr).toContain(
      "--workers is for --fast",
    );
  });
});

describe("derive and Parquet", () => {
  it("goes from CSV to Parquet and back with the same numbers, on both paths", async () => {
    const csv = file("models.csv", modelFile(30));
    const parquet = join(folder, "models.parquet");
    expect((await runDerive([csv, "--fast", "--add", "age", "--out", parquet])).code).toBe(0);
    const rows = await allRows(await readParquet(parquet));
    expect(rows[7]!.cells[0]).toBe("000007");
    const back = join(folder, "back.csv");
    for (const path of [[], ["--fast"]]) {
      const run = await runDerive([parquet, ...path, "--add", "equalityRedshift", "--digits", "9", "--out", back]);
      expect(run.code).toBe(0);
      const direct = await runDerive(["-", ...path, "--add", "equalityRedshift", "--digits", "9"], modelFile(30));
      const derived = rowsOf(readFileSync(back, "utf8"));
      expect(derived[0]).toEqual(["label", "hubble", "baryonDensity", "coldMatterDensity", "age", "equalityRedshift"]);
      expect(derived.map((row) => row.at(-1))).toEqual(rowsOf(direct.stdout).map((row) => row.at(-1)));
      expect(derived.slice(1).map((row) => Number(row[4]))).toEqual(rows.map((row) => row.cells[4]));
    }
  });

  it("goes from JSON lines to Parquet, with bad rows kept", async () => {
    const path = file(
      "models.jsonl",
      '{"hubble":67,"baryonDensity":0.0224,"coldMatterDensity":0.12}\n{"hubble":-1,"baryonDensity":0.0224,"coldMatterDensity":0.12}\n',
    );
    const out = join(folder, "out.parquet");
    expect((await runDerive([path, "--add", "age", "--bad-rows", "keep", "--out", out])).code).toBe(0);
    const [good, bad] = (await allRows(await readParquet(out))).map((row) => row.cells);
    expect(good![3]).toBeCloseTo(
      evaluateModel({ hubble: 67, baryonDensity: 0.0224, coldMatterDensity: 0.12 }).value("age"),
      12,
    );
    expect(good![4]).toBeNull();
    expect([bad![3], bad![4]]).toEqual([null, "hubble: must be finite and positive, got -1"]);
  });

  it("refuses Parquet on standard input, a file that is not there, and one that is none", async () => {
    expect((await runDerive(["-", "--format", "parquet", "--add", "age"])).stderr).toContain(
      "Parquet cannot be read from standard input",
    );
    expect((await runDerive([join(folder, "none.parquet"), "--add", "age"])).code).toBe(2);
    const wrong = await runDerive([file("wrong.parquet", "hubble\n67\n"), "--add", "age"]);
    expect(wrong.code).toBe(1);
    expect(wrong.stderr).toContain("is no Parquet file that can be read");
  });

  it("leaves nothing half-written when a row is refused", async () => {
    const out = join(folder, "out.parquet");
    const run = await runDerive(["-", "--add", "age", "--out", out], `${modelFile(2)}x,-1,0.02,0.12\n`);
    expect(run.code).toBe(1);
    expect(readdirSync(folder)).toEqual([]);
  });
});

// Debian's GNU parallel; where it must be there COSMOLOGY_CELLS_REQUIRE_DEBIAN is set.
const parallel = "/usr/bin/parallel";
const missing = !existsSync(parallel) && process.env["COSMOLOGY_CELLS_REQUIRE_DEBIAN"] === undefined;

describe.skipIf(missing)("derive under GNU parallel", () => {
  const program = join(__dirname, "..", "..", "..", "bin.cjs");

  it("with two local jobs gives the rows that one process gives", () => {
    const text = modelFile(3000);
    const arguments_ = ["derive", "-", "--fast", "--workers", "0", "--add", "age,acousticAngle", "--header", "no"];
    const one = spawnSync(process.execPath, [program, ...arguments_], { input: text, encoding: "utf8" });
    expect(one.status, one.stderr).toBe(0);
    const two = spawnSync(
      parallel,
      [
        ...["--will-cite", "--pipe", "--header", ":", "--jobs", "2", "--block", "40k", "--keep-order"],
        ...[process.execPath, program, ...arguments_],
      ],
      { input: text, encoding: "utf8", env: { ...process.env, HOME: folder } },
    );
    expect(two.status, two.stderr).toBe(0);
    expect(two.stderr.match(/batch engine/g)!.length).toBeGreaterThan(1);
    expect(two.stdout).toBe(one.stdout);
  });

  it("ends with an exit code that is not 0 when a piece was refused", () => {
    const text = `${modelFile(1000)}x,-1,0.02,0.12\n`;
    const run = spawnSync(
      parallel,
      [
        "--will-cite",
        "--pipe",
        "--header",
        ":",
        "--jobs",
        "2",
        "--block",
        "20k",
        process.execPath,
        program,
        "derive",
        "-",
        "--fast",
        "--add",
        "age",
      ],
      { input: text, encoding: "utf8", env: { ...process.env, HOME: folder } },
    );
    expect(run.status).toBe(1);
  });
});
