/**
 * The pictures in a real browser: the only judge of how wide a text really is. Runs where Chromium is installed.
 */
import { existsSync } from "node:fs";
import { type Browser, chromium, type Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { lineChart } from "../../../kernel-ext/display";
import { sampleCharts } from "./charts/sampleCharts";

const executablePath = "/usr/bin/chromium";

/** Runs in the page: texts that stick out of their picture, and pairs of texts that overlap. */
const inspect = `(() => {
  const frame = document.querySelector("svg").getBoundingClientRect();
  const texts = [...document.querySelectorAll("svg text")].map((node) => ({ words: node.textContent, box: node.getBoundingClientRect() }));
  const out = texts.filter(({ box }) => box.left < frame.left - 0.5 || box.right > frame.right + 0.5 || box.top < frame.top - 0.5 || box.bottom > frame.bottom + 0.5);
  const over = [];
  for (const [i, one] of texts.entries()) for (const other of texts.slice(i + 1)) {
    const wide = Math.min(one.box.right, other.box.right) - Math.max(one.box.left, other.box.left);
    const high = Math.min(one.box.bottom, other.box.bottom) - Math.max(one.box.top, other.box.top);
    if (wide > 1 && high > 4) over.push(one.words + " / " + other.words);
  }
  return { count: texts.length, out: out.map(({ words }) => words), over };
})()`;

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
        const seen = (await page.evaluate(inspect)) as { count: number; out: string[]; over: string[] };
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
    const seen = (await page.evaluate(inspect)) as { out: string[]; over: string[] };
    expect(seen).toMatchObject({ out: [], over: [] });
  });

  it("a text that does stick out is noticed", async () => {
    await page.setContent('<svg width="50" height="20"><text x="30" y="15">too long for this</text></svg>');
    expect(await page.evaluate(inspect)).toMatchObject({ out: ["too long for this"] });
  });
});
