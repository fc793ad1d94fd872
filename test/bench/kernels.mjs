/** How long our kernel takes to be ready, to show a chart and to answer a trivial cell, beside the stock tslab of the same run. */
import { join } from "node:path";
import { built, median, root } from "./suite.mjs";

const { KernelClient, ownKernelArguments } = built("kernel-ext/command/kernelClient.js");

const stockArguments = [
  process.execPath,
  join(root, "node_modules", "tslab", "bin", "tslab"),
  "kernel",
  "--config-path={connection_file}",
];

const chartCell = `distanceCell(
  { hubble: 67.4, baryonDensity: 0.0224, coldMatterDensity: 0.12 },
  { redshifts: [0.3, 0.5, 1.1] },
)`;

async function okay(client, code) {
  const { reply } = await client.execute(code, { timeout: 60_000 });
  if (reply.content.status !== "ok") throw new Error(`the cell ${code} failed: ${JSON.stringify(reply.content)}`);
}

/** Milliseconds of one kernel from its start on. */
async function timeKernel(argv, withChart) {
  const started = performance.now();
  const client = await KernelClient.start({ argv, cwd: root });
  const times = { ready: performance.now() - started };
  try {
    if (withChart) {
      let chart;
      const stop = client.onPublished(({ header, content }) => {
        if (header.msg_type === "display_data" && content.data["image/svg+xml"] !== undefined)
          chart ??= performance.now();
      });
      await okay(client, chartCell);
      if (chart === undefined) throw new Error("the kernel published no chart");
      times.firstChart = chart - started;
      const again = performance.now();
      chart = undefined;
      await okay(client, chartCell);
      times.laterChart = chart - again;
      stop();
    }
    const roundTrips = [];
    for (let i = 0; i < 40; i++) {
      const sent = performance.now();
      await okay(client, `${i} + 1`);
      if (i >= 10) roundTrips.push(performance.now() - sent);
    }
    times.roundTrip = median(roundTrips);
    return times;
  } finally {
    await client.shutdown();
  }
}

/** Medians of a few starts, ours and stock in turn, so that a slow minute of the machine falls on both. */
export async function timeKernels(starts = 5) {
  const own = [];
  const stock = [];
  for (let i = 0; i < starts; i++) {
    own.push(await timeKernel(ownKernelArguments(), true));
    stock.push(await timeKernel(stockArguments, false));
  }
  const medians = (runs) =>
    Object.fromEntries(Object.keys(runs[0]).map((key) => [key, median(runs.map((run) => run[key]))]));
  return { starts, own: medians(own), stock: medians(stock) };
}
