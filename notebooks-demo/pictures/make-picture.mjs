/**
 * Makes the picture of the README from a real run: the recombination cell of the second demo notebook, as the report shows it.
 *
 *   npm start && node notebooks-demo/pictures/make-picture.mjs
 *
 * Needs Chromium as Debian installs it.
 */
import { dirname, join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { chromium } from "playwright-core";

const here = dirname(fileURLToPath(import.meta.url));
const report = join(here, "..", "..", "out", "report.html");

const browser = await chromium.launch({
  executablePath: "/usr/bin/chromium",
  args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking"],
});
try {
  const page = await browser.newPage({ viewport: { width: 860, height: 1000 }, deviceScaleFactor: 1.25 });
  await page.goto(pathToFileURL(report).href);
  const clip = await page.evaluate(() => {
    const cell = [...document.querySelectorAll(".cell-code")].find((each) =>
      each.textContent.includes("recombinationCell("),
    );
    const top = cell.getBoundingClientRect().top + window.scrollY;
    const table = cell.querySelector(".cell-output table").getBoundingClientRect();
    return {
      x: 0,
      y: top,
      width: document.documentElement.clientWidth,
      height: table.bottom + window.scrollY - top + 12,
    };
  });
  await page.screenshot({ path: join(here, "recombination-cell.png"), clip, fullPage: true });
} finally {
  await browser.close();
}
