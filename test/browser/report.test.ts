/** The HTML report in Chromium with the network cut. */
import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { notebooksToHtml } from "../../kernel-ext/command/htmlReport";
import { demoNames, root, runDemo } from "../notebooks-demo/demoNotebooks";
import { axisTitles, type ChartPlaces, measureCharts, smallPlots } from "./chartPlaces";
import { launchChromium, screenshot, watchRequests, withoutChromium } from "./chromium";

describe.skipIf(withoutChromium())("the report of the demo notebooks, opened without a network", () => {
  let browser: Browser;
  let page: Page;
  let asked: string[];
  const complaints: string[] = [];
  const file = join(root, "out", "browser", "report.html");

  beforeAll(async () => {
    const notebooks = [];
    for (const name of demoNames) notebooks.push({ name, notebook: (await runDemo(name)).notebook });
    mkdirSync(join(root, "out", "browser"), { recursive: true });
    writeFileSync(file, notebooksToHtml(notebooks));
    browser = await launchChromium();
    page = await browser.newPage({ viewport: { width: 1000, height: 900 } });
    await page.context().setOffline(true);
    asked = await watchRequests(page);
    page.on("console", (message) => complaints.push(message.text()));
    page.on("pageerror", (error) => complaints.push(error.message));
    await page.goto(pathToFileURL(file).href, { waitUntil: "load" });
  }, 300_000);
  afterAll(async () => {
    await browser?.close();
  });

  it("asks for the file itself and for nothing else, and the browser has nothing to complain about", () => {
    expect(asked).toEqual([pathToFileURL(file).href]);
    expect(complaints).toEqual([]);
  });

  it("shows every chart as a picture of its natural size", async () => {
    const pictures = (await page.evaluate(
      `[...document.images].map((image) => ({
        complete: image.complete, width: image.naturalWidth, height: image.naturalHeight,
        shown: image.getBoundingClientRect().width, words: image.alt, data: image.currentSrc,
      }))`,
    )) as { complete: boolean; width: number; height: number; shown: number; words: string; data: string }[];
    expect(pictures.length).toBe(demoNames.reduce((sum, name) => sum + axisTitles[name]!.length, 0));
    const small = demoNames.flatMap((name) => axisTitles[name]!.map(() => smallPlots.has(name)));
    for (const [index, picture] of pictures.entries()) {
      expect(picture.complete).toBe(true);
      expect(picture.width).toBeGreaterThan(small[index] ? 180 : 400);
      expect(picture.height).toBeGreaterThan(small[index] ? 120 : 250);
      expect(picture.shown).toBeGreaterThan(small[index] ? 180 : 400);
      expect(picture.words).not.toBe("");
      expect(picture.data).toMatch(/^data:image\/svg\+xml/);
    }
  });

  it("the pictures hold plots with marks and the titles of their axes", async () => {
    const sources = (await page.evaluate("[...document.images].map((image) => image.currentSrc)")) as string[];
    const svg = sources.map((source) => Buffer.from(source.split("base64,")[1]!, "base64").toString("utf8"));
    const inspection = await browser.newPage();
    await inspection.setContent(svg.map((each) => `<div class="one">${each}</div>`).join(""));
    const charts = (await inspection.evaluate(measureCharts(".one > svg"))) as ChartPlaces[];
    const titles = demoNames.flatMap((name) => axisTitles[name]!);
    expect(charts.length).toBe(titles.length);
    const small = demoNames.flatMap((name) => axisTitles[name]!.map(() => smallPlots.has(name)));
    for (const [index, chart] of charts.entries()) {
      expect(chart.plotWidth).toBeGreaterThan(small[index] ? 60 : 300);
      expect(chart.plotHeight).toBeGreaterThan(small[index] ? 40 : 150);
      expect(chart.marks).toBeGreaterThan(small[index] ? 2 : 5);
      for (const title of titles[index]!) {
        expect(
          chart.texts.some((text) => text.includes(title)),
          `${title} in ${chart.texts}`,
        ).toBe(true);
      }
    }
    await inspection.close();
  });

  for (const scheme of ["light", "dark"] as const) {
    it(`text stands out from the ground in the ${scheme} scheme`, async () => {
      await page.emulateMedia({ colorScheme: scheme });
      const [ground, text] = (await page.evaluate(
        `[getComputedStyle(document.body).backgroundColor, getComputedStyle(document.body).color]`,
      )) as [string, string];
      // WCAG 2.1, success criterion 1.4.3: 4.5 to 1 for text.
      expect(contrast(ground, text)).toBeGreaterThan(4.5);
      await page.screenshot({ path: screenshot(`report-${scheme}`), fullPage: true });
    });
  }
});

/** Contrast ratio of two colours as WCAG 2.1 defines it, from the relative luminance of sRGB. */
function contrast(one: string, other: string): number {
  const luminance = (color: string): number => {
    const channels = color
      .match(/[\d.]+/g)!
      .slice(0, 3)
      .map((each) => Number(each) / 255);
    const [red, green, blue] = channels.map((each) =>
      each <= 0.03928 ? each / 12.92 : ((each + 0.055) / 1.055) ** 2.4,
    );
    return 0.2126 * red! + 0.7152 * green! + 0.0722 * blue!;
  };
  const [low, high] = [luminance(one), luminance(other)].sort((a, b) => a - b) as [number, number];
  return (high + 0.05) / (low + 0.05);
}
