#!/usr/bin/env node
"use strict";

const { existsSync } = require("node:fs");
const { join } = require("node:path");

const main = join(__dirname, "dist", "kernel-ext", "command", "main.js");
if (!existsSync(main)) {
  process.stderr.write("cosmology-cells: not built yet; run `npm run build` in the project folder first\n");
  process.exit(1);
}
require(main)
  .main(process.argv.slice(2))
  .then(
    (code) => {
      process.exitCode = code;
    },
    (error) => {
      process.stderr.write(`cosmology-cells: ${error?.stack ?? error}\n`);
      process.exitCode = 70;
    },
  );
