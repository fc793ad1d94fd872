import { describe, expect, it } from "vitest";
import { evaluateModel } from "../../../cosmo/solve";
import { compileModel } from "../../../kernel-ext/cells/compileModel";
import { runDerive } from "./deriveRun";

const base = { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
const head = "hubble,baryonDensity,coldMatterDensity,darkEnergy.equation";
const good = "67.4,0.0224,0.12";

/** The cells of the last line. */
const lastCells = (text: string) => text.trimEnd().split("\n").at(-1)!.split(",");

describe("derive with darkEnergy.equation", () => {
  it("reads a formula a row and gives the digits of the model with it", async () => {
    const equation = "-0.9 + 0.3 (1 - a)";
    const { code, stdout, stderr } = await runDerive(
      ["-", "--add", "age, hubbleRate(1)"],
      `${head}\n${good},${equation}\n`,
    );
    expect(stderr).toBe("");
    expect(code).toBe(0);
    const numbers = evaluateModel(compileModel({ ...base, darkEnergy: { equation } }, "test"));
    const cells = lastCells(stdout);
    expect(Number(cells[4])).toBe(Number(numbers.value("age").toPrecision(15)));
    expect(Number(cells[5])).toBe(Number(numbers.value("hubbleRate", 1).toPrecision(15)));
    expect(cells[3]).toBe(equation);
    // And not those of a model without it.
    expect(Math.abs(Number(cells[4]) / evaluateModel(base).value("age") - 1)).toBeGreaterThan(1e-3);
  });

  it("takes one for all rows by --set, commas between its arguments included", async () => {
    const args = ["-", "--add", "age", "--set", "darkEnergy.equation=max(-1, -0.9 - z), photonTemperature=2.726"];
    const { code, stdout } = await runDerive(args, `hubble,baryonDensity,coldMatterDensity\n${good}\n`);
    expect(code).toBe(0);
    const model = { ...base, photonTemperature: 2.726, darkEnergy: { equation: "max(-1, -0.9 - z)" } };
    const expected = evaluateModel(compileModel(model, "test")).value("age");
    expect(Number(lastCells(stdout)[3])).toBe(Number(expected.toPrecision(15)));
  });

  it("names row, column, place and reason of a formula that cannot be taken", async () => {
    for (const [equation, text] of [
      ["-1 + 0.1 q", "this one has an unknown name q (character 10)"],
      ["-1 + 0.01 z", "must stay below 1/3 at early times"],
      ["log(1 - z)", "must give a finite number at every redshift"],
    ] as const) {
      const { code, stderr } = await runDerive(["-", "--add", "age"], `${head}\n${good},-1\n${good},${equation}\n`);
      expect(code, equation).toBe(1);
      expect(stderr).toContain('row 2 of column "darkEnergy.equation"');
      expect(stderr).toContain(text);
    }
    const bad = await runDerive(["-", "--add", "age", "--set", "darkEnergy.equation=1 +"], `hubble\n67\n`);
    expect(bad.code).toBe(2);
    expect(bad.stderr).toContain("darkEnergy.equation must be a formula in z or in a");
  });

  it("reads a table from JSON lines, nested or flat, and its interpolation error with --errors", async () => {
    const table = { redshifts: [0, 0.5, 1, 2], values: [-1, -0.9, -0.85, -0.8] };
    const expected = evaluateModel({ ...base, darkEnergy: { table } }).quantity("age");
    for (const row of [
      { ...base, darkEnergy: { table } },
      { ...base, "darkEnergy.table": table },
    ]) {
      const args = ["-", "--format", "jsonl", "--add", "age", "--errors"];
      const { code, stdout, stderr } = await runDerive(args, `${JSON.stringify(row)}\n`);
      expect(stderr).toBe("");
      expect(code).toBe(0);
      const out = JSON.parse(stdout) as Record<string, number>;
      expect(out["age"]).toBe(Number(expected.value.toPrecision(15)));
      expect(out["age.error"]! / expected.error).toBeCloseTo(1, 2);
    }
    const text = await runDerive(["-", "--add", "age"], `${head.replace("equation", "table")}\n${good},0;1\n`);
    expect(text.code).toBe(1);
    expect(text.stderr).toContain("must be an object with lists redshifts and values");
  });

  it("knows the conventions by fit, the peaks and the fits themselves", async () => {
    const args = [
      "-",
      "--add",
      "dragSoundHorizon, dragSoundHorizon.brieden2023, peakMultipole(1), lastScatteringRedshift",
    ];
    const set = ["--set", "conventions.soundHorizon=brieden2023, conventions.lastScattering=huSugiyama1996"];
    const { code, stdout } = await runDerive([...args, ...set], `hubble,baryonDensity,coldMatterDensity\n${good}\n`);
    expect(code).toBe(0);
    const cells = lastCells(stdout).map(Number);
    expect(cells[3]).toBe(cells[4]);
    expect(cells[5]! / 220.6).toBeCloseTo(1, 2);
    const numbers = evaluateModel({ ...base, conventions: { lastScattering: "huSugiyama1996" } });
    expect(cells[6]).toBe(Number(numbers.value("lastScatteringRedshift").toPrecision(15)));
  });
});
