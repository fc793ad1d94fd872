/** How fast one model after another gets its full suite on one core, by the path that cells take. */
import { Bench } from "tinybench";
import { built, median, modelNumber, suite } from "./suite.mjs";

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
  const processorTime = (work) => {
    const before = process.cpuUsage();
    work();
    const { user, system } = process.cpuUsage(before);
    return (user + system) / 1000;
  };
  const beforeFirst = performance.now();
  const firstProcessor = processorTime(oneModel);
  const first = performance.now() - beforeFirst;
  const bench = new Bench({ time, warmupTime: time / 2 });
  bench.add("full suite", oneModel);
  await bench.run();
  const { latency } = bench.tasks[0].result;
  const processor = {
    first: firstProcessor,
    later: median(Array.from({ length: 30 }, () => processorTime(oneModel))),
  };
  return { load, first, processor, later: latency.p50, models: latency.samplesCount, perSecond: 1000 / latency.mean };
}
