/**
 * How the engine's cost grows with the number of rows, and what a second worker gives: columns in memory, no files.
 *
 *   node test/bench/scaling.mjs LARGEST ROUNDS      prints JSON
 */

import { spawnSync } from "node:child_process";
import { fileURLToPath, pathToFileURL } from "node:url";
import { chainModels, columnsOf } from "./models.mjs";
import { built, median, suite } from "./suite.mjs";

/** Columns of many rows in shared memory, from seeded chunks. */
function chainColumns(rows) {
  const chunk = 20_000;
  const names = ["hubble", "baryonDensity", "coldMatterDensity"];
  const { sharedDoubles } = built("kernel-ext/workers/index.js");
  const columns = Object.fromEntries(names.map((name) => [name, sharedDoubles(rows)]));
  for (let start = 0; start < rows; start += chunk) {
    const part = columnsOf(chainModels(Math.min(chunk, rows - start), 1000 + start / chunk));
    for (const name of names) columns[name].set(part[name], start);
  }
  return columns;
}

async function measure(largest, rounds) {
  const { runBatch, workerPool } = built("kernel-ext/workers/index.js");
  const request = { outputs: suite };
  const once = async (columns, workers) => {
    const before = performance.now();
    const processorBefore = process.cpuUsage();
    const run = await runBatch(request, columns, { workers });
    const { user, system } = process.cpuUsage(processorBefore);
    if (run.counts.engine !== run.rows) throw new Error(`not all rows took the engine: ${JSON.stringify(run.counts)}`);
    return { wall: (performance.now() - before) / 1000, processor: (user + system) / 1e6, columns: run.columns };
  };
  // Threads are started and the compiler is warm before anything counts.
  const warm = chainColumns(50_000);
  await once(warm, 2);
  await once(warm, 1);
  const result = [];
  for (let rows = 1000; rows <= largest; rows *= 10) {
    const columns = chainColumns(rows);
    const times = { 1: [], 2: [] };
    const repeats = rows < 1e6 ? rounds + 2 : rounds;
    for (let round = 0; round < repeats; round++) {
      const answers = {};
      for (const workers of round % 2 === 0 ? [1, 2] : [2, 1]) {
        const { wall, processor, columns: values } = await once(columns, workers);
        times[workers].push({ wall, processor });
        answers[workers] = values;
      }
      for (const name of suite) {
        if (!answers[1][name].every((value, i) => Object.is(value, answers[2][name][i]))) {
          throw new Error(`${name} has other digits with two workers`);
        }
      }
    }
    const of = (workers, pick) => median(times[workers].map(pick));
    result.push({
      rows,
      one: { wall: of(1, (t) => t.wall), processor: of(1, (t) => t.processor) },
      two: { wall: of(2, (t) => t.wall), processor: of(2, (t) => t.processor) },
      speedup: median(times[1].map((t, i) => t.wall / times[2][i].wall)),
      // What two free cores would give: the work that two workers do together, against one's.
      speedupByProcessor: median(times[1].map((t, i) => (2 * t.processor) / times[2][i].processor)),
      samples: times,
    });
  }
  await workerPool().close();
  return result;
}

/** Measures in a process of its own, so that nothing else has shaped the compiled code. */
export function timeScaling(largest, rounds) {
  const file = fileURLToPath(import.meta.url);
  const result = spawnSync(process.execPath, [file, String(largest), String(rounds)], {
    encoding: "utf8",
    maxBuffer: 1 << 26,
  });
  if (result.status !== 0) throw new Error(`scaling ended with ${result.status}: ${result.stderr.slice(-2000)}`);
  return JSON.parse(result.stdout);
}

if (import.meta.url === pathToFileURL(process.argv[1]).href) {
  process.stdout.write(`${JSON.stringify(await measure(Number(process.argv[2]), Number(process.argv[3])))}\n`);
}
