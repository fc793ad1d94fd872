/** How fast one model after another gets its full suite on one core, by the path that cells take. */
import { Bench } from "tinybench";
import { built, modelNumber, suite } from "./suite.mjs";

/** @param time milliseconds of measuring. */
export async function timeSingleModel(time) {
  const beforeLoad = performance.now();
  const { evaluateModel } = built("cosmo/index.js");
  const load = performance.now() - beforeLoad;
  let i = 0;
  const oneModel = () => {
    const numbers = evaluateModel(modelNumber(i++));
    for (const name of suite) {
      if (!Number.isFinite(numbers.value(name))) throw new Error(`${name} is not finite`);
    }
  };
  const beforeFirst = performance.now();
  oneModel();
  const first = performance.now() - beforeFirst;
  const bench = new Bench({ time, warmupTime: time / 2 });
  bench.add("full suite", oneModel);
  await bench.run();
  const { latency } = bench.tasks[0].result;
  return { load, first, later: latency.p50, models: latency.samplesCount, perSecond: 1000 / latency.mean };
}
