import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { runDerive } from "./deriveRun";

// All files of models here are invented and broken on purpose.

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "cosmology-cells-derive-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const head = "hubble,baryonDensity,coldMatterDensity";
const good = "67.4,0.0224,0.12";

/** Two good rows, then one that is as told. */
const third = (row: string, columns = ""): string =>
  `${head}${columns}\n${[good, good].map((line) => `${line}${columns.replace(/[^,]/g, "")}`).join("\n")}\n${row}\n`;

interface Broken {
  name: string;
  text: string;
  /** What standard error says after "cosmology-cells derive broken.csv: ". */
  message: string;
  add?: string;
  options?: string[];
  format?: "tsv" | "jsonl";
}

const number = "must be a number such as 67.4 or 2.2e-2";

const brokenFiles: Broken[] = [
  {
    name: "text in a number column",
    text: third("67.4,0.0224,12abc"),
    message: `row 3 of column "coldMatterDensity": ${number}, got "12abc"`,
  },
  {
    name: "NaN",
    text: third("NaN,0.0224,0.12"),
    message: 'row 3 of column "hubble": must be a finite number, got "NaN"',
  },
  {
    name: "infinity",
    text: third("67.4,-inf,0.12"),
    message: 'row 3 of column "baryonDensity": must be a finite number, got "-inf"',
  },
  {
    name: "a number beyond the range",
    text: third("1e400,0.0224,0.12"),
    message: 'row 3 of column "hubble": is beyond the range of double precision, got "1e400"',
  },
  {
    name: "a number too small to hold",
    text: third("67.4,1e-400,0.12"),
    message: 'row 3 of column "baryonDensity": is beyond the range of double precision, got "1e-400"',
  },
  {
    name: "an empty cell",
    text: third("67.4,,0.12"),
    message:
      'row 3 of column "baryonDensity": is empty, and it is part of the model as baryonDensity\n  fill it with --set baryonDensity=VALUE, or leave the column out',
  },
  {
    name: "a decimal comma",
    text: third('"67,4",0.0224,0.12'),
    message: `row 3 of column "hubble": ${number}, got "67,4"`,
  },
  {
    name: "a hexadecimal number",
    text: third("0x43,0.0224,0.12"),
    message: `row 3 of column "hubble": ${number}, got "0x43"`,
  },
  {
    name: "a negative density",
    text: third("67.4,-0.0224,0.12"),
    message: 'row 3 of column "baryonDensity": must be finite and not negative, got -0.0224',
  },
  {
    name: "an expansion rate of zero",
    text: third("0,0.0224,0.12"),
    message: 'row 3 of column "hubble": must be finite and positive, got 0',
  },
  {
    name: "a bad value in a column that was renamed",
    text: third("-1,0.0224,0.12").replace("hubble", "H0"),
    options: ["--map", "H0=hubble"],
    message: 'row 3 of column "H0": must be finite and positive, got -1',
  },
  { name: "too few fields", text: third("67.4,0.0224"), message: "row 3: has 2 fields where the header has 3" },
  {
    name: "too many fields",
    text: third("67.4,0.0224,0.12,1"),
    message: 'row 3: has 4 fields where the header has 3; beyond the header: "1"',
  },
  {
    name: "a quote that is never closed",
    text: third('"67.4,0.0224,0.12'),
    message: "row 3: a quote that opens a field is never closed\n  a quote inside a quoted field is written twice",
  },
  {
    name: "a column named twice",
    text: `${head},hubble\n${good},70\n`,
    message: 'columns 1 and 4 have the same name "hubble"\n  rename one of them',
  },
  { name: "an empty file", text: "", message: "is empty: there is no header row" },
  {
    name: "no header",
    text: `${good}\n${good}\n`,
    message: 'the first row must name the columns, and it holds numbers: "67.4 0.0224 0.12"',
  },
  { name: "binary data", text: "\u0000\u0001\u0002", message: "holds a NUL character: it is no text file" },
  {
    name: "semicolons between the columns",
    text: third(good).replaceAll(",", ";"),
    message: 'seems to separate its columns by ";", and csv needs ","',
  },
  {
    name: "tsv with commas",
    text: third(good),
    format: "tsv",
    message: 'seems to separate its columns by ",", and tsv needs tabs',
  },
  {
    name: "too few givens",
    text: "hubble,baryonDensity\n67.4,0.0224\n",
    message:
      "row 1: the cold matter is not given\n  give one of coldMatterDensity, coldMatterFraction, matterDensity, matterFraction",
  },
  {
    name: "givens that contradict each other",
    text: `${head},reducedHubble\n${good},0.7\n`,
    message:
      "row 1: hubble, reducedHubble contradict each other: from hubble 67.4 follows reducedHubble 0.67400000, given 0.7",
  },
  {
    name: "a derived number that no model has",
    text: "acousticAngle,baryonDensity,coldMatterDensity\n50,0.0224,0.12\n",
    message: "row 1: no model was found with acousticAngle 50",
  },
  {
    name: "text in the column of a derived number",
    text: "age,baryonDensity,coldMatterDensity\nold,0.0224,0.12\n",
    message: `row 1 of column "age": ${number}, got "old"`,
  },
  {
    name: "matter that is less than its baryons",
    text: "hubble,baryonDensity,matterDensity\n67.4,0.0224,0.02\n",
    message: "row 1: matterDensity 0.02 is less than its parts",
  },
  {
    name: "a word that is not known",
    text: `${head},recombination\n${good},peebels\n`,
    message:
      'row 1 of column "recombination": is not a known value of recombination, got "peebels"\n  did you mean "peebles"?',
  },
  {
    name: "a list with a hole",
    text: `${head},neutrinos.masses\n${good},0.06;;0.01\n`,
    message:
      'row 1 of column "neutrinos.masses": each number of the list must be a number, and it is empty, got "0.06;;0.01"',
  },
  {
    name: "four neutrino masses",
    text: `${head},neutrinos.masses\n${good},0;0;0;0\n`,
    message:
      'row 1 of column "neutrinos.masses": must be a list of at most three finite masses, none negative, got [0, 0, 0, 0]',
  },
  {
    name: "helium that is neither number nor word",
    text: `${head},helium\n${good},1.2\n`,
    message:
      'row 1 of column "helium": must be at least 0 and below 1 (a mass fraction), or "nucleosynthesis", got 1.2',
  },
  {
    name: "dark energy that outgrows radiation",
    text: `${head},darkEnergy.w0\n${good},0.5\n`,
    message:
      "row 1: darkEnergy.w0 + darkEnergy.wa must be below 1/3, or dark energy outgrows radiation in the past, got 0.5",
  },
  {
    name: "no baryons to recombine",
    text: third("67.4,0,0.12"),
    add: "lastScatteringRedshift",
    message:
      'row 3 of column "lastScatteringRedshift": recombination: this model has no baryons (baryonDensity 0), so nothing recombines',
  },
  {
    name: "a model that had no Big Bang",
    text: `${head},darkEnergyFraction\n${good},4\n`,
    add: "luminosityDistance(5)",
    message: 'row 1 of column "luminosityDistance(5)": redshift 5 lies beyond the turning point of this closed model',
  },
  {
    name: "JSON lines: text for a number",
    text: '{"hubble":67.4,"baryonDensity":"0.0224","coldMatterDensity":0.12}\n',
    format: "jsonl",
    message: 'row 1 of column "baryonDensity": must be a number, got "0.0224"',
  },
  {
    name: "JSON lines: a number beyond the range",
    text: '{"hubble":1e400,"baryonDensity":0.02,"coldMatterDensity":0.12}\n',
    format: "jsonl",
    message: 'row 1 of column "hubble": is beyond the range of double precision, got Infinity',
  },
  {
    name: "JSON lines: a line cut in half",
    text: '{"hubble":67.4,"baryonDensity":0.02,"coldMatterDensity":0.12}\n{"hubble":67.4,"bary',
    format: "jsonl",
    message: "row 2: is not valid JSON (",
  },
  {
    name: "JSON lines: a field named twice",
    text: '{"hubble":67.4,"baryonDensity":0.02,"coldMatterDensity":0.12}\n{"hubble":67,"hubble":70}\n',
    format: "jsonl",
    message: 'row 2: names a field twice, got "{\\"hubble\\":67,\\"hubble\\":70}"',
  },
  {
    name: "JSON lines: a misspelt field in a group",
    text: '{"hubble":67.4,"baryonDensity":0.02,"coldMatterDensity":0.12,"neutrinos":{"massSumm":0.1}}\n',
    format: "jsonl",
    message:
      'row 1 of column "neutrinos": must be an object with fields of effectiveNumber, masses, massSum, ordering, got "massSumm"',
  },
  {
    name: "JSON lines: a group that is no object",
    text: '{"hubble":67.4,"baryonDensity":0.02,"coldMatterDensity":0.12,"darkEnergy":-1}\n',
    format: "jsonl",
    message: 'row 1 of column "darkEnergy": must be an object with fields of w0, wa, equation, table, got -1',
  },
  {
    name: "JSON lines: a field given flat and nested",
    text: '{"hubble":67.4,"baryonDensity":0.02,"coldMatterDensity":0.12,"darkEnergy.w0":-1,"darkEnergy":{"w0":-0.9}}\n',
    format: "jsonl",
    message: 'row 1 of column "darkEnergy.w0": gives darkEnergy.w0 a second time, got -0.9',
  },
];

describe("derive refuses broken files with code 1 and leaves nothing under the name of --out:", () => {
  for (const { name, text, message, add = "hubbleDistance(0)", options = [], format = "csv" } of brokenFiles) {
    it(name, async () => {
      const path = join(folder, `broken.${format}`);
      writeFileSync(path, text);
      const out = join(folder, "out.csv");
      const before = readdirSync(folder).sort();
      const run = await runDerive([path, "--add", add, "--out", out, ...options]);
      expect(run.stderr.replaceAll(path, `broken.${format}`)).toContain(
        `cosmology-cells derive broken.${format}: ${message}`,
      );
      expect(run.code).toBe(1);
      expect(run.stdout).toBe("");
      expect(existsSync(out)).toBe(false);
      expect(readdirSync(folder).sort()).toEqual(before);
    });
  }

  it("an old file under that name stays as it was", async () => {
    const out = join(folder, "old.csv");
    writeFileSync(out, "from before");
    const run = await runDerive(["-", "--add", "age", "--out", out], third("67.4,x,0.12"));
    expect(run.code).toBe(1);
    expect(readFileSync(out, "utf8")).toBe("from before");
  });

  it("standard output has exactly the rows before the bad one", async () => {
    const run = await runDerive(["-", "--add", "reducedHubble"], third("67.4,x,0.12"));
    expect(run.code).toBe(1);
    expect(run.stdout).toBe(`${head},reducedHubble\n${good},0.674\n${good},0.674\n`);
  });
});

interface Wrong {
  name: string;
  args: string[];
  message: string;
}

const wrongCommands: Wrong[] = [
  { name: "no file", args: ["--add", "age"], message: "derive: name the file of models, or - for standard input" },
  {
    name: "two files",
    args: ["-", "b.csv", "--add", "age"],
    message: 'derive: name one file, got "-", "b.csv"; quote lists with blanks',
  },
  { name: "nothing to add", args: ["-"], message: 'derive: say what to add: --add "age, luminosityDistance(1.1)"' },
  { name: "an empty --add", args: ["-", "--add", " "], message: "derive: --add names no quantity" },
  {
    name: "an unknown quantity",
    args: ["-", "--add", "agee"],
    message: 'derive --add: "agee" is not a known quantity\n  did you mean "age"?',
  },
  {
    name: "a quantity without its argument",
    args: ["-", "--add", "luminosityDistance"],
    message: "luminosityDistance: arguments must be (z)",
  },
  {
    name: "a redshift below -1",
    args: ["-", "--add", "hubbleRate(-1.5)"],
    message: "hubbleRate: redshift must be finite and above -1, got -1.5",
  },
  {
    name: "a quantity asked twice",
    args: ["-", "--add", "hubbleRate(1), hubbleRate(1.0)"],
    message: 'derive: --add asks twice for "hubbleRate(1.0)"',
  },
  {
    name: "an unknown option",
    args: ["-", "--add", "age", "--digit", "3"],
    message: "derive: there is no option --digit; did you mean --digits?",
  },
  { name: "an unknown letter", args: ["-", "-q", "--add", "age"], message: "derive: there is no option -q" },
  { name: "an option without its value", args: ["-", "--add", "age", "--out"], message: "derive: --out needs a value" },
  {
    name: "an option in place of a value",
    args: ["-", "--add", "--errors"],
    message: 'derive: --add needs a value, got "--errors"',
  },
  {
    name: "a value for a flag",
    args: ["-", "--add", "age", "--errors=yes"],
    message: 'derive: --errors takes no value, got "yes"',
  },
  {
    name: "an option twice",
    args: ["-", "--add", "age", "--digits", "3", "--digits", "4"],
    message: 'derive: --digits is given twice, as "3" and "4"',
  },
  {
    name: "digits outside 1 to 17",
    args: ["-", "--add", "age", "--digits", "18"],
    message: 'derive: --digits must be a whole number from 1 to 17, got "18"',
  },
  {
    name: "another way with bad rows",
    args: ["-", "--add", "age", "--bad-rows", "drop"],
    message: 'derive: --bad-rows must be refuse or keep, got "drop"',
  },
  {
    name: "a header that is neither yes nor no",
    args: ["-", "--add", "age", "--header", "maybe"],
    message: 'derive: --header must be yes or no, got "maybe"',
  },
  {
    name: "an unknown format",
    args: ["-", "--add", "age", "--format", "xlsx"],
    message:
      "derive: --format must be one of csv (comma separated), tsv (tab separated), jsonl (one JSON object a line), parquet",
  },
  {
    name: "a wrong end of the name",
    args: ["models.txt", "--add", "age"],
    message: 'derive models.txt: the name must end in .csv, .tsv, .jsonl, .parquet, and it ends in ".txt"',
  },
  {
    name: "a wrong end of the output's name",
    args: ["-", "--add", "age", "--out", "derived"],
    message: "derive derived: the name must end in .csv, .tsv, .jsonl, .parquet, and it ends in none of them",
  },
  {
    name: "a file that is not there",
    args: ["/nowhere/models.csv", "--add", "age"],
    message: "derive /nowhere/models.csv: cannot be read: there is no such file or folder",
  },
  {
    name: "a folder for the output that is not there",
    args: ["-", "--add", "age", "--out", "/nowhere/out.csv"],
    message: "derive /nowhere/out.csv: cannot be written: there is no such file or folder",
  },
  {
    name: "a map without =",
    args: ["-", "--add", "age", "--map", "H0"],
    message: 'derive: --map must look like H0=hubble, got "H0"',
  },
  {
    name: "a map to an unknown name",
    args: ["-", "--add", "age", "--map", "hubble=hubbel"],
    message: 'derive --map: "hubbel" is not a known parameter\n  did you mean "hubble"?',
  },
  {
    name: "a map of a column that is not there",
    args: ["-", "--add", "age", "--map", "hubbel=hubble"],
    message: 'derive: --map renames the column "hubbel", which the file does not have; did you mean "hubble"?',
  },
  {
    name: "a map that renames twice",
    args: ["-", "--add", "age", "--map", "a=hubble,a=baryonDensity"],
    message: 'derive: --map renames the column "a" twice',
  },
  {
    name: "two columns that come to one name",
    args: ["-", "--add", "age", "--map", "hubble=baryonDensity"],
    message: 'derive: the columns "hubble" and "baryonDensity" are both "baryonDensity"',
  },
  {
    name: "a column that is there already",
    args: ["-", "--add", "age, hubble"],
    message: 'derive: the file already has a column "hubble"',
  },
  {
    name: "a set without a value",
    args: ["-", "--add", "age", "--set", "curvature="],
    message: 'derive: --set must look like neutrinos.effectiveNumber=3.046, got "curvature="',
  },
  {
    name: "a set of an unknown name",
    args: ["-", "--add", "age", "--set", "curvatur=0"],
    message: 'derive --set: "curvatur" is not a known parameter\n  did you mean "curvature"?',
  },
  {
    name: "a set of text for a number",
    args: ["-", "--add", "age", "--set", "curvature=flat"],
    message: `derive --set: curvature ${number}, got "flat"`,
  },
  {
    name: "a set outside its rule",
    args: ["-", "--add", "age", "--set", "helium=2"],
    message: "derive --set: helium must be at least 0 and below 1",
  },
  {
    name: "a set twice",
    args: ["-", "--add", "age", "--set", "helium=0.24,helium=0.25"],
    message: 'derive: --set gives "helium" twice',
  },
  {
    name: "a given column that is not there",
    args: ["-", "--add", "age", "--given", "acousticAngle"],
    message:
      'derive: --given names the column "acousticAngle", which the file does not have; it has "hubble", "baryonDensity", "coldMatterDensity"',
  },
  {
    name: "a parameter to be solved for that is none",
    args: ["-", "--add", "age", "--solve-for", "curvatur"],
    message: 'derive --solve-for: "curvatur" is not a known parameter\n  did you mean "curvature"?',
  },
  {
    name: "a solution near what is no number",
    args: ["-", "--add", "age", "--solve-near", "curvature=flat"],
    message: `derive --solve-near: curvature ${number}, got "flat"`,
  },
  {
    name: "an unknown tier",
    args: ["-", "--add", "age", "--recombination", "peeble"],
    message: 'derive --set: "peeble" is not a known value of recombination\n  did you mean "peebles"?',
  },
  {
    name: "a tier twice",
    args: ["-", "--add", "age", "--recombination", "saha", "--set", "recombination=saha"],
    message: "derive: --set and --recombination both give the tier",
  },
];

describe("derive refuses wrong commands with code 2 and writes nothing:", () => {
  for (const { name, args, message } of wrongCommands) {
    it(name, async () => {
      const run = await runDerive(args, third(good));
      expect(run.stderr).toContain(`cosmology-cells ${message}`);
      expect(run.code).toBe(2);
      expect(run.stdout).toBe("");
    });
  }

  it("an output that is the input", async () => {
    const path = join(folder, "same.csv");
    writeFileSync(path, third(good));
    const run = await runDerive([path, "--add", "age", "--out", join(folder, ".", "same.csv")]);
    expect(run.code).toBe(2);
    expect(run.stderr).toContain("derive: --out is the file that is read");
    expect(readFileSync(path, "utf8")).toBe(third(good));
  });

  it("a format where both names say one", async () => {
    const path = join(folder, "named.csv");
    writeFileSync(path, third(good));
    const run = await runDerive([path, "--add", "age", "--out", join(folder, "x.csv"), "--format", "tsv"]);
    expect(run.stderr).toContain("derive: --format is for standard input or output; here both names say the format");
    expect(run.code).toBe(2);
  });
});
