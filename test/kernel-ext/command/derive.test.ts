import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import type { ModelGivens } from "../../../cosmo/model";
import { evaluateModel } from "../../../cosmo/solve";
import { runDerive } from "./deriveRun";

// All files of models here are invented.

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-derive-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

const read = (name: string): string => readFileSync(join(folder, name), "utf8");

/** Fifteen significant digits, as the standard library writes them. */
const digits15 = (value: number): string => String(Number(value.toPrecision(15)));

const models: ModelGivens[] = [
  { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 },
  { hubble: 71.25, baryonDensity: 0.0219, coldMatterDensity: 0.1173 },
  { hubble: 64, baryonDensity: 0.0231, coldMatterDensity: 0.131 },
];
const csv = `label,hubble,baryonDensity,coldMatterDensity\n${models
  .map((each, index) => `00${index},${each.hubble},${each.baryonDensity},${each.coldMatterDensity}\n`)
  .join("")}`;

describe("derive", () => {
  it("writes the rows in order, with the columns added at the digits that evaluateModel gives", async () => {
    const path = file("models.csv", csv);
    const out = join(folder, "derived.csv");
    const add = "age, lastScatteringRedshift, acousticAngle, luminosityDistance(1.1), comovingDistance(0.5, 1)";
    const run = await runDerive([path, "--add", add, "--recombination", "peebles", "--out", out]);
    expect(run).toEqual({ code: 0, stdout: "", stderr: "" });
    const expected = models.map((givens, index) => {
      const numbers = evaluateModel({ ...givens, recombination: "peebles" });
      const values = [
        numbers.value("age"),
        numbers.value("lastScatteringRedshift"),
        numbers.value("acousticAngle"),
        numbers.value("luminosityDistance", 1.1),
        numbers.value("comovingDistance", 0.5, 1),
      ];
      return `00${index},${givens.hubble},${givens.baryonDensity},${givens.coldMatterDensity},${values.map(digits15).join(",")}`;
    });
    const header =
      'label,hubble,baryonDensity,coldMatterDensity,age,lastScatteringRedshift,acousticAngle,luminosityDistance(1.1),"comovingDistance(0.5,1)"';
    expect(read("derived.csv")).toBe(`${[header, ...expected].join("\n")}\n`);
    expect(readdirSync(folder).sort()).toEqual(["derived.csv", "models.csv"]);
  });

  it("gives the age of a universe of matter alone as 2/(3 H0) (Einstein & de Sitter 1932)", async () => {
    const text = "H0,baryonFraction,Om,photonTemperature\n70,0,1,0\n";
    const run = await runDerive(["-", "--map", "H0=hubble,Om=matterFraction", "--add", "age", "--digits", "17"], text);
    // Parsec from the au of IAU 2012 B2 and IAU 2015 B2: 648000/pi x 149597870700 m; Gyr of Julian years.
    const megaparsec = ((648000 / Math.PI) * 149597870700 * 1e6) / 1e3;
    const age = ((2 / 3) * megaparsec) / 70 / (1e9 * 365.25 * 86400);
    const got = Number(run.stdout.split("\n")[1]!.split(",")[4]);
    // Measured 2e-16.
    expect(Math.abs(got / age - 1)).toBeLessThan(2e-15);
    expect(run.code).toBe(0);
  });

  it("reads standard input and writes standard output by default", async () => {
    const run = await runDerive(["-", "--add", "hubbleDistance(0)"], csv);
    expect(run.code).toBe(0);
    expect(run.stderr).toBe("");
    expect(run.stdout.split("\n")[1]).toBe(
      `000,67.4,0.0224,0.12,${digits15(evaluateModel(models[0]!).value("hubbleDistance", 0))}`,
    );
  });

  it("--map reads a column under another name and keeps its own name in the output", async () => {
    const text = "H0,Om,omega_b\n67.4,0.315,0.0224\n";
    const map = ["--map", "H0=hubble, Om=matterFraction", "--map", "omega_b=baryonDensity"];
    const run = await runDerive(["-", ...map, "--add", "age"], text);
    const age = evaluateModel({ hubble: 67.4, matterFraction: 0.315, baryonDensity: 0.0224 }).value("age");
    expect(run).toEqual({ code: 0, stderr: "", stdout: `H0,Om,omega_b,age\n67.4,0.315,0.0224,${digits15(age)}\n` });
  });

  it("--set fills a column that is lacking, and empty cells", async () => {
    const text = "hubble,baryonDensity,coldMatterDensity,curvature\n67.4,0.0224,0.12,\n67.4,0.0224,0.12,0.01\n";
    const set = ["--set", "neutrinos.effectiveNumber=3.046,curvature=-0.02", "--set", "neutrinos.masses=0.05;0.01"];
    const run = await runDerive(["-", ...set, "--set", "conventions.closure=radiationOnTop", "--add", "age"], text);
    const age = (curvature: number): string =>
      digits15(
        evaluateModel({
          ...models[0],
          curvature,
          neutrinos: { effectiveNumber: 3.046, masses: [0.05, 0.01] },
          conventions: { closure: "radiationOnTop" },
        }).value("age"),
      );
    expect(run.stdout.split("\n").slice(1)).toEqual([
      `67.4,0.0224,0.12,,${age(-0.02)}`,
      `67.4,0.0224,0.12,0.01,${age(0.01)}`,
      "",
    ]);
    expect(run.stderr).toBe(
      'cosmology-cells derive standard input: column "curvature" gives curvature; the value that was set fills only its empty cells\n',
    );
  });

  it("reads lists with ; and words, by their flat names", async () => {
    const text =
      "hubble,baryonDensity,coldMatterDensity,neutrinos.masses,helium,conventions.equalityMatter\n" +
      "67.4,0.0224,0.12,0.06;0.02,nucleosynthesis,allMatter\n67.4,0.0224,0.12,0,0.25,baryonsAndCold\n";
    const run = await runDerive(["-", "--add", "equalityRedshift, matterDensity"], text);
    const rows = [
      { neutrinos: { masses: [0.06, 0.02] }, conventions: { equalityMatter: "allMatter" as const } },
      { neutrinos: { masses: [0] }, helium: 0.25 },
    ].map((more) => evaluateModel({ ...models[0], ...more }));
    expect(
      run.stdout
        .split("\n")
        .slice(1, 3)
        .map((line) => line.split(",").slice(6)),
    ).toEqual(
      rows.map((numbers) => [digits15(numbers.value("equalityRedshift")), digits15(numbers.value("matterDensity"))]),
    );
  });

  it("carries the user's own columns through untouched and asks about near misses of the vocabulary", async () => {
    const text =
      'id,note,hubbel,hubble,baryonDensity,coldMatterDensity,curvatur\n00123,"a, ""b""",1e400,67.4,0.0224,0.12, x \n';
    const run = await runDerive(["-", "--add", "reducedHubble"], text);
    expect(run.stdout).toBe(
      'id,note,hubbel,hubble,baryonDensity,coldMatterDensity,curvatur,reducedHubble\n00123,"a, ""b""",1e400,67.4,0.0224,0.12," x ",0.674\n',
    );
    // Nothing is said about "hubbel": hubble is there.
    expect(run.stderr).toBe(
      'cosmology-cells derive standard input: column "curvatur" is not in the vocabulary and is carried through; if it is curvature, say --map "curvatur=curvature"\n',
    );
  });

  it("carries a derived number through where nothing is missing, and says so", async () => {
    const run = await runDerive(["-", "--add", "reducedHubble"], csv.replace("label", "age"));
    expect(run.code).toBe(0);
    expect(run.stdout.split("\n")[1]).toBe("000,67.4,0.0224,0.12,0.674");
    expect(run.stderr).toContain(
      'column "age" is a derived number, and is carried through, not used for the model; --given makes it part of it',
    );
  });

  it("solves for what is missing from a derived number that stands in for it", async () => {
    const densities = { baryonDensity: 0.0224, coldMatterDensity: 0.12 };
    const text = "acousticAngle,baryonDensity,coldMatterDensity\n1.0411,0.0224,0.12\n";
    const hubble = digits15(evaluateModel({ ...densities, acousticAngle: 1.0411 }).value("hubble"));
    const run = await runDerive(["-", "--add", "hubble"], text);
    expect(run.stdout.split("\n")[1]).toBe(`1.0411,0.0224,0.12,${hubble}`);
    expect(run.stderr).toBe(
      'cosmology-cells derive standard input: no column gives hubble or reducedHubble; solved for from "acousticAngle"\n',
    );
    // Back again: the model with that hubble has that angle.
    const back = evaluateModel({ ...densities, hubble: Number(hubble) });
    // Measured 1.4e-13.
    expect(Math.abs(back.value("acousticAngle") / 1.0411 - 1)).toBeLessThan(1.5e-12);
    const renamed = await runDerive(
      ["-", "--add", "hubble", "--map", "theta=acousticAngle"],
      text.replace("acousticAngle", "theta"),
    );
    expect(renamed).toEqual({ code: 0, stdout: run.stdout.replace("acousticAngle", "theta"), stderr: "" });
  });

  it("--given and --solve-for choose among derived numbers and what they determine", async () => {
    const text = "acousticAngle,baryonDensity,coldMatterDensity,age\n1.0411,0.0224,0.12,13.79\n";
    const add = ["-", "--add", "hubble, curvature"];
    const givens = { acousticAngle: 1.0411, baryonDensity: 0.0224, coldMatterDensity: 0.12 };
    const undecided = await runDerive(add, text);
    expect(undecided.code).toBe(2);
    expect(undecided.stderr).toContain(
      'derive: no column gives hubble or reducedHubble; say with --given which of "acousticAngle", "age" stands in',
    );
    for (const [more, model] of [
      [["--given", "acousticAngle"], givens],
      [
        ["--given", "acousticAngle,age", "--solve-for", "curvature"],
        { ...givens, age: 13.79, solveFor: ["curvature"] },
      ],
    ] as const) {
      const run = await runDerive([...add, ...more], text);
      const numbers = evaluateModel(model);
      expect(run.code).toBe(0);
      expect(run.stdout.split("\n")[1]!.split(",").slice(4)).toEqual([
        digits15(numbers.value("hubble")),
        digits15(numbers.value("curvature")),
      ]);
    }
  });

  it("--errors adds the error that evaluateModel gives, to three digits", async () => {
    const run = await runDerive(["-", "--add", "age,acousticAngle", "--errors"], csv);
    const lines = run.stdout.trimEnd().split("\n");
    expect(lines[0]).toBe(
      "label,hubble,baryonDensity,coldMatterDensity,age,age.error,acousticAngle,acousticAngle.error",
    );
    models.forEach((givens, index) => {
      const numbers = evaluateModel(givens);
      const cells = ["age", "acousticAngle"].flatMap((name) => {
        const { value, error } = numbers.quantity(name);
        return [digits15(value), String(Number(error.toPrecision(3)))];
      });
      expect(lines[index + 1]!.split(",").slice(4)).toEqual(cells);
    });
  });

  it("--digits and --header no shape the output", async () => {
    const run = await runDerive(["-", "--add", "age", "--digits", "4", "--header", "no"], csv);
    const ages = models.map((givens) => String(Number(evaluateModel(givens).value("age").toPrecision(4))));
    expect(run.stdout.split("\n").map((line) => line.split(",")[4])).toEqual([...ages, undefined]);
  });

  it("reads and writes tsv and jsonl by the end of the name, numbers as numbers and text as text", async () => {
    const path = file("models.tsv", csv.replaceAll(",", "\t").replace("000\t", "0,0\t"));
    const lines = join(folder, "derived.jsonl");
    expect((await runDerive([path, "--add", "age", "--out", lines])).code).toBe(0);
    const ages = models.map((givens) => Number(digits15(evaluateModel(givens).value("age"))));
    expect(
      read("derived.jsonl")
        .trimEnd()
        .split("\n")
        .map((line) => JSON.parse(line)),
    ).toEqual(
      models.map((givens, index) => ({ label: index === 0 ? "0,0" : `00${index}`, ...givens, age: ages[index] })),
    );
    const back = join(folder, "back.tsv");
    expect((await runDerive([lines, "--add", "reducedHubble", "--out", back])).code).toBe(0);
    expect(read("back.tsv").split("\n")[1]).toBe(`0,0\t67.4\t0.0224\t0.12\t${ages[0]}\t0.674`);
  });

  it("takes nested models in JSON lines, and a field that a line leaves out as not given", async () => {
    const text =
      '{"hubble":67.4,"baryonDensity":0.0224,"coldMatterDensity":0.12,"neutrinos":{"massSum":0.15,"ordering":"normal"},"tag":12345678901234567890}\n' +
      '{"tag":1,"hubble":67.4,"baryonDensity":0.0224,"coldMatterDensity":0.12}\n';
    const run = await runDerive(["-", "--format", "jsonl", "--add", "matterDensity"], text);
    const value = (more: ModelGivens): string =>
      digits15(evaluateModel({ ...models[0], ...more }).value("matterDensity"));
    const [first, second] = text
      .trimEnd()
      .split("\n")
      .map((line) => line.slice(0, -1));
    expect(run).toEqual({
      code: 0,
      stderr: "",
      stdout:
        `${first},"matterDensity":${value({ neutrinos: { massSum: 0.15, ordering: "normal" } })}}\n` +
        `${second},"matterDensity":${value({})}}\n`,
    });
  });

  it("rows depend on themselves alone: two halves of a file give the rows of the whole", async () => {
    const [header, ...rows] = csv.trimEnd().split("\n");
    const add = ["-", "--add", "lastScatteringRedshift,age", "--recombination", "peebles"];
    const whole = await runDerive(add, csv);
    const first = await runDerive(add, `${header}\n${rows.slice(0, 1).join("\n")}\n`);
    const second = await runDerive([...add, "--header", "no"], `${header}\n${rows.slice(1).join("\n")}\n`);
    expect(rows.length).toBeGreaterThan(2);
    expect(first.stdout + second.stdout).toBe(whole.stdout);
  });

  it("an empty table gives its header", async () => {
    const run = await runDerive(["-", "--add", "age"], "hubble,baryonDensity\n");
    expect(run).toEqual({ code: 0, stdout: "hubble,baryonDensity,age\n", stderr: "" });
  });

  it("tells warnings that come with the numbers once, with their count and first row", async () => {
    const text = `${csv}x,67.4,0.05,0.12\ny,67.4,0.05,0.3\n`;
    const run = await runDerive(["-", "--add", "lastScatteringRedshift,dragRedshift,age"], text);
    expect(run.stderr).toMatch(
      /^cosmology-cells derive standard input: lastScatteringRedshift, dragRedshift: warning in \d rows, first in row \d: densities outside what the calibration was tested on/,
    );
    expect(run.stderr.trimEnd().split("\n")).toHaveLength(1);
  });

  it("--progress tells rows and rate on standard error, and a terminal gets it unasked", async () => {
    const asked = await runDerive(["-", "--add", "reducedHubble", "--progress"], csv);
    expect(asked.stderr).toMatch(/^3 rows, [\d.e+]+ rows\/s, finished in 0 s\n$/);
    const terminal = await runDerive(["-", "--add", "reducedHubble"], csv, true);
    expect(terminal.stderr).toMatch(/^\r3 rows, [\d.e+]+ rows\/s, finished in 0 s\n$/);
    expect(terminal.stdout).toBe(asked.stdout);
  });
});

describe("derive with --bad-rows keep", () => {
  const text =
    "label,hubble,baryonDensity,coldMatterDensity\na,67.4,0.0224,0.12\nb,67.4,12abc,0.12\nc,-3,0.0224,0.12\nd,67.4\ne,67.4,0,0.12\nf,64,0.0224,0.12\n";

  it("writes bad rows in their place with empty cells and the reason, and counts them", async () => {
    const out = join(folder, "kept.csv");
    const run = await runDerive(["-", "--add", "age,lastScatteringRedshift", "--bad-rows", "keep", "--out", out], text);
    expect(run.code).toBe(0);
    expect(run.stderr).toContain('4 of 6 rows are bad; their reasons are in the column "problem"\n');
    const lines = read("kept.csv").trimEnd().split("\n");
    expect(lines[0]).toBe("label,hubble,baryonDensity,coldMatterDensity,age,lastScatteringRedshift,problem");
    expect(lines[2]).toBe(
      'b,67.4,12abc,0.12,,,"baryonDensity: must be a number such as 67.4 or 2.2e-2, got ""12abc"""',
    );
    expect(lines[3]).toBe('c,-3,0.0224,0.12,,,"hubble: must be finite and positive, got -3"');
    expect(lines[4]).toBe("d,67.4,,,,,has 2 fields where the header has 4");
    expect(lines[5]).toMatch(/^e,67.4,0,0.12,,,"?lastScatteringRedshift: /);
    for (const [line, hubble] of [
      [lines[1]!, 67.4],
      [lines[6]!, 64],
    ] as const) {
      const numbers = evaluateModel({ ...models[0], hubble });
      const cells = [digits15(numbers.value("age")), digits15(numbers.value("lastScatteringRedshift")), ""];
      expect(line.split(",").slice(4)).toEqual(cells);
    }
  });

  it("keeps every row of JSON lines, even one that cannot be read", async () => {
    const lines =
      '{"hubble":67.4,"baryonDensity":0.0224,"coldMatterDensity":0.12}\n{"hubble":67.4\n{"hubble":null,"baryonDensity":0.02}\n';
    const run = await runDerive(["-", "--format", "jsonl", "--add", "reducedHubble", "--bad-rows", "keep"], lines);
    const rows = run.stdout
      .trimEnd()
      .split("\n")
      .map((line) => JSON.parse(line) as Record<string, unknown>);
    expect(rows[0]).toMatchObject({ hubble: 67.4, reducedHubble: 0.674, problem: null });
    expect(Object.keys(rows[1]!)).toEqual(["reducedHubble", "problem"]);
    expect(rows[1]!.problem).toMatch(/^is not valid JSON \(.*\), got "\{\\"hubble\\":67.4"$/);
    expect(rows[2]).toMatchObject({ hubble: null, reducedHubble: null });
    expect(rows[2]!.problem).toBe(
      "hubble: is empty, and it is part of the model as hubble (fill it with --set hubble=VALUE, or leave the column out)",
    );
  });

  it("gives a second run its own problem column", async () => {
    const once = await runDerive(["-", "--add", "age", "--bad-rows", "keep"], text);
    const again = ["-", "--add", "reducedHubble", "--bad-rows", "keep"];
    const refused = await runDerive(again, once.stdout);
    expect(refused.code).toBe(2);
    expect(refused.stderr).toContain(
      'derive: the file already has a column "problem"; give another name with --problem-column',
    );
    const run = await runDerive([...again, "--problem-column", "problem2"], once.stdout);
    expect(run.code).toBe(0);
    expect(run.stdout.split("\n")[0]).toBe(`${once.stdout.split("\n")[0]},reducedHubble,problem2`);
  });
});
