/**
 * The pictures in a real browser: the only judge of how wide a text really is. Runs where Chromium is installed.
 */
import { existsSync } from "node:fs";
import { type Browser, chromium, type Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { lineChart } from "../../../kernel-ext/display";
import { sampleCharts } from "./charts/sampleCharts";
import { inspect, type TextPlaces } from "./charts/textPlaces";

const executablePath = "/usr/bin/chromium";

describe.skipIf(!existsSync(executablePath))("pictures in Chromium", () => {
  let browser: Browser;
  let page: Page;
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath, args: ["--no-sandbox", "--disable-gpu", "--disable-quic"] });
    page = await browser.newPage({ viewport: { width: 1000, height: 800 } });
  });
  afterAll(async () => {
    await browser?.close();
  });

  const faces = ["Liberation Sans", "DejaVu Sans"];
  for (const face of faces) {
    for (const [name, make] of Object.entries(sampleCharts)) {
      it(`${name}: no text is cut off or lies on another in ${face}`, async () => {
        const svg = (await make().toSvg()).replace(/font-family="[^"]*"/g, `font-family="${face}"`);
        await page.setContent(`<body style="margin:40px">${svg}</body>`);
        const seen = (await page.evaluate(inspect)) as TextPlaces;
        expect(seen.count).toBeGreaterThan(5);
        expect(seen.out).toEqual([]);
        expect(seen.over).toEqual([]);
      });
    }
  }

  it("a long title and long names of series are not cut off", async () => {
    const long = "A name that is much longer than names of series ought to be, with W and M";
    const chart = lineChart({
      title: `${long}; ${long}; ${long}`,
      description: "Invented.",
      x: { label: "x" },
      y: { label: "y" },
      series: [1, 2, 3].map((number) => ({ label: `${long} ${number}`, x: [0, 1], y: [0, number] })),
      rules: [{ axis: "x", at: 0.97, label: "a long name near the edge of the plot" }],
    });
    await page.setContent(`<body style="margin:40px">${await chart.toSvg()}</body>`);
    const seen = (await page.evaluate(inspect)) as TextPlaces;
    expect(seen).toMatchObject({ out: [], over: [] });
  });

  it("a text that does stick out is noticed", async () => {
    await page.setContent('<svg width="50" height="20"><text x="30" y="15">too long for this</text></svg>');
    expect(await page.evaluate(inspect)).toMatchObject({ out: ["too long for this"] });
  });
});
