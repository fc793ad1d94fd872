/**
 * npm run bench: how fast the program is on this machine, as tables, and as JSON in out/bench.json. README.md here tells how to read it.
 *
 *   npm run bench -- --short                    under a minute, less exact
 *   npm run bench -- --only programs,scaling    some of: single, programs, scaling, derive, kernels
 *   npm run bench -- --rows 100000              rows of the chain for derive, default a million
 *
 * No bound is set: the numbers belong to the machine. What carries over to another one are the ratios, each taken in one
 * run. Run it on a machine that has nothing else to do.
 */
import { mkdirSync, writeFileSync } from "node:fs";
import { cpus, loadavg } from "node:os";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { timeDerive } from "./derive.mjs";
import { timeKernels } from "./kernels.mjs";
import { programTables, timePrograms } from "./programs.mjs";
import { timeScaling } from "./scaling.mjs";
import { timeSingleModel } from "./singleModel.mjs";
import { root, suite } from "./suite.mjs";

const sections = ["single", "programs", "scaling", "derive", "kernels"];
const { values: options } = parseArgs({
  options: { short: { type: "boolean", default: false }, only: { type: "string" }, rows: { type: "string" } },
});
const { short } = options;
const wanted = options.only?.split(",") ?? sections;
const rows = Number(options.rows ?? (short ? 20_000 : 1_000_000));
for (const name of wanted) {
  if (!sections.includes(name)) throw new Error(`--only: ${name} is none of ${sections.join(", ")}`);
}
if (!(Number.isInteger(rows) && rows >= 100))
  throw new Error(`--rows: must be a whole number from 100, not ${options.rows}`);

const say = (text) => process.stderr.write(`bench: ${text}\n`);
const load = loadavg()[0];
if (load > 0.5) say(`the machine is busy (load ${load.toFixed(1)}): go by processor time, and by ratios`);

const measured = {};
async function section(name, text, measure) {
  if (!wanted.includes(name)) return;
  say(text);
  measured[name] = await measure();
}
await section("single", "one model after another ...", () => timeSingleModel(short ? 1000 : 4000));
await section("programs", "the suite by five programs ...", () => timePrograms(say, short));
await section("scaling", "one worker and two ...", () => timeScaling(short ? 1e5 : 1e6, short ? 1 : 3));
await section("derive", "a chain through derive ...", () => timeDerive(say, rows));
await section("kernels", "kernels ...", () => timeKernels(short ? 1 : 5));
const { single, programs, scaling, derive, kernels } = measured;

const ms = (value) => `${value < 10 ? value.toFixed(2) : value.toFixed(0)} ms`;
const seconds = (value) => `${value < 10 ? value.toPrecision(3) : value.toFixed(0)} s`;
const ratio = (value) => (value < 100 ? value.toFixed(2) : value.toFixed(0));
const rate = (value) => `${value < 1000 ? value.toPrecision(3) : Math.round(value)}/s`;
const megabytes = (value) => `${Math.round(value / 1e6)} MB`;

function print(table) {
  const widths = table[0].map((_, column) => Math.max(...table.map((row) => row[column].length)));
  for (const row of table) {
    const cells = row.map((cell, column) => (column === 0 ? cell.padEnd(widths[0]) : cell.padStart(widths[column])));
    process.stdout.write(`${cells.join("  ").trimEnd()}\n`);
  }
  process.stdout.write("\n");
}

if (programs !== undefined) {
  const { answers, times } = programTables(programs);
  print(answers);
  print(times);
}
if (scaling !== undefined) {
  print([
    ["engine alone, rows", "1 worker", "processor", "2 workers", "processor", "2 over 1", "by processor"],
    ...scaling.map((each) => [
      String(each.rows),
      seconds(each.one.wall),
      seconds(each.one.processor),
      seconds(each.two.wall),
      seconds(each.two.processor),
      ratio(each.speedup),
      ratio(each.speedupByProcessor),
    ]),
  ]);
}
if (derive !== undefined) {
  print([
    ["derive --fast, CSV to CSV", "rows", "columns", "workers", "wall", "processor", "rows", "peak memory"],
    [
      "",
      String(derive.rows),
      String(derive.columns),
      String(derive.workers),
      seconds(derive.wall),
      seconds(derive.processor),
      rate(derive.rows / derive.wall),
      megabytes(derive.memory),
    ],
  ]);
}
if (single !== undefined) {
  print([
    ["full computation, one model after another", "first", "later", "models"],
    ["", ms(single.first), ms(single.later), rate(single.perSecond)],
  ]);
}
if (kernels !== undefined) {
  const { own, stock } = kernels;
  print([
    ["kernel", "ours", "stock tslab", "ratio"],
    ["start to ready", ms(own.ready), ms(stock.ready), ratio(own.ready / stock.ready)],
    ["start to the first chart", ms(own.firstChart), "", ""],
    ["a later chart", ms(own.laterChart), "", ""],
    ["round trip of a trivial cell", ms(own.roundTrip), ms(stock.roundTrip), ratio(own.roundTrip / stock.roundTrip)],
  ]);
}

/** Each figure that is asked for, with what is to be reached, by the clock and by processor time. */
const goals = [];
const goal = (figure, reach, wall, processor = "") => goals.push([figure, reach, wall, processor]);
if (programs !== undefined) {
  const of = (key) => programs.timed.find((each) => each.key === key);
  const compared = (key, figure, reach) => {
    const program = of(key);
    if (program === undefined) goal(figure, reach, "skipped");
    else goal(figure, reach, ratio(program.overEngine.wall), ratio(program.overEngine.processor));
  };
  compared("gsl", "engine over C on GSL, its stepper at 1e-6", "200 or more");
  compared("gslExact", "engine over C on GSL, its answers to 1e-6", "200 or more");
  compared("scipy", "engine over Python on SciPy", "1000 or more");
  const c = of("c");
  if (c === undefined) goal("our time over the same algorithm in C", "1.5 or less", "skipped");
  else {
    const inverse = (pick) => ratio(1 / pick(c.overEngine));
    goal(
      "our time over the same algorithm in C",
      "1.5 or less",
      inverse((t) => t.wall),
      inverse((t) => t.processor),
    );
  }
  const { newPlan, samePlan } = programs.oneModel;
  goal("one model by the engine, later calls, a new plan each", "under 1 ms", ms(newPlan.wall), ms(newPlan.processor));
  goal("the same with one plan", "under 1 ms", ms(samePlan.wall), ms(samePlan.processor));
}
if (scaling !== undefined) {
  const last = scaling[scaling.length - 1];
  goal(`two workers over one, ${last.rows} rows`, "1.8 or more", ratio(last.speedup), ratio(last.speedupByProcessor));
}
if (derive !== undefined) {
  const reach = derive.rows === 1_000_000 ? "30 s or less" : "30 s for a million";
  // By processor time: what two cores that do nothing else would take at best.
  goal(`${derive.rows} rows through derive`, reach, seconds(derive.wall), seconds(derive.processor / 2));
  goal("its peak memory", "under 500 MB", megabytes(derive.memory));
  const gsl = programs?.timed.find((each) => each.key === "gsl");
  if (gsl !== undefined) {
    const { wall, processor } = gsl.microseconds;
    goal("a million models by C on GSL, the suite alone", "for comparison", seconds(wall), seconds(processor));
  }
}
if (single !== undefined) {
  goal("one model in full, first call", "60 ms", ms(single.first), ms(single.processor.first));
  goal("one model in full, later calls", "15 ms", ms(single.later), ms(single.processor.later));
}
if (goals.length > 0) print([["what it must reach", "reach", "by the clock", "by processor"], ...goals]);
process.stdout.write(
  `full suite: ${suite.join(", ")}; tier calibrated; ratios are medians of rounds, all programs in turn\n`,
);

const machine = {
  cpu: cpus()[0]?.model,
  cores: cpus().length,
  node: process.version,
  platform: process.platform,
  load: { before: load, after: loadavg()[0] },
};
mkdirSync(join(root, "out"), { recursive: true });
const result = { date: new Date().toISOString(), short, machine, suite, ...measured, goals };
writeFileSync(join(root, "out", "bench.json"), `${JSON.stringify(result, null, 2)}\n`);
