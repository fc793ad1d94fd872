/** Preloaded into a program that is measured: writes what its process used, all threads together, to the file that is named. */
"use strict";

const { writeFileSync } = require("node:fs");
const { isMainThread } = require("node:worker_threads");

if (isMainThread) {
  process.on("exit", () => {
    const { maxRSS, userCPUTime, systemCPUTime } = process.resourceUsage();
    const used = { memory: maxRSS * 1024, processor: (userCPUTime + systemCPUTime) / 1e6 };
    writeFileSync(process.env.BENCH_USAGE_FILE, JSON.stringify(used));
  });
}
