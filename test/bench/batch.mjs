/** How fast many models get the same full suite on one core, by the batch engine. */
import { Bench } from "tinybench";
import { built, modelNumber, suite } from "./suite.mjs";

const rows = 2000;

export async function timeBatch() {
  const { prepareBatch } = built("cosmo/batch/index.js");
  const { closeModel } = built("cosmo/index.js");
  const plan = prepareBatch({ outputs: suite, closeModel });
  const models = Array.from({ length: rows }, (_, i) => modelNumber(i));
  const columns = Object.fromEntries(
    Object.keys(models[0]).map((name) => [name, Float64Array.from(models, (model) => model[name])]),
  );
  const out = Object.fromEntries(suite.map((name) => [name, new Float64Array(rows)]));
  let counts;
  const allRows = () => {
    counts = plan.run(columns, { from: 0, to: rows }, out);
  };
  const bench = new Bench({ time: 3000, warmupTime: 2000 });
  bench.add("batch", allRows);
  await bench.run();
  if (counts.engine !== rows) throw new Error(`not all rows took the engine: ${JSON.stringify(counts)}`);
  for (const name of suite) if (!out[name].every(Number.isFinite)) throw new Error(`${name} has an empty cell`);
  const { latency } = bench.tasks[0].result;
  return { rows, perSecond: (1000 * rows) / latency.mean, microseconds: (1000 * latency.p50) / rows };
}
