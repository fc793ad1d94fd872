/**
 * The batch engine as a program of its own, timed as the C programs time themselves:
 *
 *   node test/bench/engine.mjs MODELS COUNT ROUNDS
 *
 * MODELS and the output are those of gsl/suite.c. One core, no workers. The first rounds, in which the compiler warms up, do not count.
 */
import { readFileSync } from "node:fs";
import { columnsOf } from "./models.mjs";
import { built, median, suite } from "./suite.mjs";

/** Models computed before the clock starts. */
const warmUp = 40_000;

const [path, count, rounds] = process.argv.slice(2);
const lines = readFileSync(path, "utf8").trim().split("\n");
const models = lines.slice(0, Number(count)).map((line) => line.split(" ").map(Number));
const { prepareBatch } = built("cosmo/batch/index.js");
const { closeModel } = built("cosmo/index.js");
const rows = models.length;
const columns = columnsOf(models);
const out = Object.fromEntries(suite.map((name) => [name, new Float64Array(rows)]));

/** Milliseconds by the clock and of the processor. */
function time(work) {
  const processorBefore = process.cpuUsage();
  const before = performance.now();
  work();
  const wall = performance.now() - before;
  const { user, system } = process.cpuUsage(processorBefore);
  return [wall, (user + system) / 1000];
}

// What a cell waits for when it asks the engine for one model: at the very first call, with a new plan each time, with the same plan.
let plan;
const first = time(() => {
  plan = prepareBatch({ outputs: suite, closeModel });
  plan.run(columns, { from: 0, to: 1 }, out);
});
const later = Array.from({ length: 50 }, (_, i) =>
  time(() => {
    const at = i % rows;
    prepareBatch({ outputs: suite, closeModel }).run(columns, { from: at, to: at + 1 }, out);
  }),
);
const kept = Array.from({ length: 50 }, (_, i) =>
  time(() => plan.run(columns, { from: i % rows, to: (i % rows) + 1 }, out)),
);
const middle = (times) => [median(times.map(([wall]) => wall)), median(times.map(([, processor]) => processor))];
const one = [...first, ...middle(later), ...middle(kept)];

for (let done = 0; done < warmUp; done += rows) plan.run(columns, { from: 0, to: rows }, out);
const wallStart = performance.now();
const processorStart = process.cpuUsage();
let counts;
for (let k = 0; k < Number(rounds); k++) counts = plan.run(columns, { from: 0, to: rows }, out);
const wall = (performance.now() - wallStart) / 1000;
const { user, system } = process.cpuUsage(processorStart);
if (counts.engine !== rows) throw new Error(`not all rows took the engine: ${JSON.stringify(counts)}`);
for (let i = 0; i < rows; i++) process.stdout.write(`${suite.map((name) => out[name][i]).join(" ")}\n`);
process.stdout.write(`one ${one.join(" ")}\nseconds ${wall} ${(user + system) / 1e6}\n`);
