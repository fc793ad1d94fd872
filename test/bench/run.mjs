/**
 * npm run bench: how fast the program is on this machine, as one table, and as JSON in out/bench.json.
 *
 * No bound is set: the numbers belong to the machine. What carries over to another one are the ratios, each taken in one
 * run. Run it on a machine that has nothing else to do.
 */
import { mkdirSync, writeFileSync } from "node:fs";
import { cpus, loadavg } from "node:os";
import { join } from "node:path";
import { timeBatch } from "./batch.mjs";
import { timeKernels } from "./kernels.mjs";
import { timeSingleModel } from "./singleModel.mjs";
import { root, suite } from "./suite.mjs";

const say = (text) => process.stderr.write(`bench: ${text}\n`);
const load = loadavg()[0];
if (load > 0.5) say(`the machine is busy (load ${load.toFixed(1)}); the numbers will be too slow`);

say("one model after another ...");
const single = await timeSingleModel();
say("many models at once ...");
const batch = await timeBatch();
say("kernels ...");
const kernels = await timeKernels();

const ms = (value) => `${value < 10 ? value.toFixed(2) : value.toFixed(0)} ms`;
const ratio = (value, other) => (value / other).toFixed(2);
const rate = (value) => `${value < 1000 ? value.toPrecision(3) : Math.round(value)} models/s`;
const { own, stock } = kernels;
const rows = [
  ["", "ours", "stock tslab", "ratio"],
  ["full suite, first model", ms(single.first), "", ""],
  ["full suite, later models (median)", ms(single.later), "", ""],
  ["full suite, one model after another", rate(single.perSecond), "", ""],
  ["full suite, batch engine", rate(batch.perSecond), "", ""],
  ["batch engine over one after another", ratio(batch.perSecond, single.perSecond), "", ""],
  ["kernel start to ready", ms(own.ready), ms(stock.ready), ratio(own.ready, stock.ready)],
  ["kernel start to the first chart", ms(own.firstChart), "", ""],
  ["a later chart", ms(own.laterChart), "", ""],
  ["round trip of a trivial cell", ms(own.roundTrip), ms(stock.roundTrip), ratio(own.roundTrip, stock.roundTrip)],
];
const widths = rows[0].map((_, column) => Math.max(...rows.map((row) => row[column].length)));
for (const row of rows) {
  const cells = row.map((cell, column) => (column === 0 ? cell.padEnd(widths[0]) : cell.padStart(widths[column])));
  process.stdout.write(`${cells.join("  ").trimEnd()}\n`);
}
process.stdout.write(`\nfull suite: ${suite.join(", ")}; one core, tier calibrated\n`);
process.stdout.write(`kernels: medians of ${kernels.starts} starts each, in turn\n`);

const machine = {
  cpu: cpus()[0]?.model,
  cores: cpus().length,
  node: process.version,
  platform: process.platform,
  load,
};
mkdirSync(join(root, "out"), { recursive: true });
const result = { date: new Date().toISOString(), machine, suite, single, batch, kernels };
writeFileSync(join(root, "out", "bench.json"), `${JSON.stringify(result, null, 2)}\n`);
