/** The demo notebooks in a real Jupyter front end, as a user opens them: Debian's Notebook 6 in Chromium. */
import { existsSync } from "node:fs";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { demoFolder, demoNames } from "../notebooks-demo/demoNotebooks";
import { axisTitles, type ChartPlaces, measureCharts, smallPlots } from "./chartPlaces";
import { launchChromium, missing, screenshot, watchRequests, withoutChromium } from "./chromium";
import { NotebookServer, notebookProgram } from "./notebookServer";

/** Runs in the page: the state of every code cell that has code. */
const cellStates = `Jupyter.notebook.get_cells().filter((cell) => cell.cell_type === "code" && cell.get_text().trim() !== "").map((cell) => ({
  prompt: String(cell.input_prompt_number ?? ""),
  outputs: cell.output_area.outputs.map((output) => ({ type: output.output_type, stream: output.name ?? "", media: Object.keys(output.data ?? {}) })),
}))`;

interface CellState {
  prompt: string;
  outputs: { type: string; stream: string; media: string[] }[];
}

/** Milliseconds for a whole notebook on a machine that is busy with other things. */
const patience = 300_000;

describe.skipIf(withoutChromium() || missing(notebookProgram))("the demo notebooks in Notebook 6", () => {
  let server: NotebookServer;
  let browser: Browser;
  let page: Page;
  let asked: string[];

  beforeAll(async () => {
    server = await NotebookServer.start(demoFolder);
    browser = await launchChromium();
    page = await browser.newPage({ viewport: { width: 1100, height: 900 } });
    asked = await watchRequests(page);
  }, patience);
  afterAll(async () => {
    await browser?.close();
    await server?.stop();
  });

  it("install says where it wrote the kernel, and the server offers it", async () => {
    expect(server.installed).toMatch(/share\/jupyter\/kernels\/cosmology-cells/);
    expect(await server.kernelNames()).toContain("cosmology-cells");
  });

  for (const name of demoNames) {
    describe(name, () => {
      let states: CellState[];
      let charts: ChartPlaces[];
      beforeAll(async () => {
        await page.goto(server.address(`/notebooks/${name}`));
        await page.waitForFunction("window.Jupyter?.notebook?.kernel?.is_connected?.() === true", undefined, {
          timeout: 60_000,
        });
        await page.click("#celllink");
        await page.click("#run_all_cells");
        await page.waitForFunction(`${cellStates}.every((cell) => /^[0-9]+$/.test(cell.prompt))`, undefined, {
          timeout: 200_000,
        });
        await page.waitForFunction("!document.querySelector('.kernel_busy_icon')", undefined, { timeout: 30_000 });
        states = (await page.evaluate(cellStates)) as CellState[];
        charts = (await page.evaluate(measureCharts(".output_area .output_svg svg"))) as ChartPlaces[];
        // The notebook scrolls inside the page: the page is made as high as its content, so that one picture holds all.
        const height = Number(await page.evaluate("document.querySelector('#notebook-container').scrollHeight"));
        await page.setViewportSize({ width: 1100, height: Math.min(height + 300, 16_000) });
        await page.screenshot({ path: screenshot(`notebook6-${name.replace(".ipynb", "")}`) });
        await page.setViewportSize({ width: 1100, height: 900 });
      }, patience);
      afterAll(async () => {
        await page.evaluate("Jupyter.notebook.save_notebook()");
        await page.evaluate("window.onbeforeunload = null");
      });

      it("every cell has run, in order, and none shows an error", () => {
        expect(states.map((cell) => cell.prompt)).toEqual(states.map((_, index) => String(index + 1)));
        const outputs = states.flatMap((cell) => cell.outputs);
        expect(outputs.filter(({ type, stream }) => type === "error" || stream === "stderr")).toEqual([]);
        expect(states.every((cell) => cell.outputs.length > 0)).toBe(true);
      });

      it("every chart is drawn, with its plot area, its marks and the titles of its axes", () => {
        expect(charts.length).toBe(axisTitles[name]!.length);
        for (const [index, chart] of charts.entries()) {
          const small = smallPlots.has(name);
          expect(chart.width).toBeGreaterThan(small ? 180 : 400);
          expect(chart.height).toBeGreaterThan(small ? 120 : 250);
          expect(chart.plotWidth).toBeGreaterThan(small ? 60 : 300);
          expect(chart.plotHeight).toBeGreaterThan(small ? 40 : 150);
          expect(chart.marks).toBeGreaterThan(small ? 2 : 5);
          for (const title of axisTitles[name]![index]!) {
            expect(
              chart.texts.some((text) => text.includes(title)),
              `${title} in ${chart.texts}`,
            ).toBe(true);
          }
        }
      });

      it("every table stands there as a table, with heads and rows of some height", async () => {
        const tables = (await page.evaluate(
          `[...document.querySelectorAll(".output_area .output_html table")].map((table) => ({
            heads: table.querySelectorAll("th").length,
            rows: table.querySelectorAll("tbody tr").length,
            height: table.getBoundingClientRect().height,
          }))`,
        )) as { heads: number; rows: number; height: number }[];
        expect(tables.length).toBeGreaterThanOrEqual(5);
        for (const table of tables) {
          expect(table.heads).toBeGreaterThan(1);
          expect(table.rows).toBeGreaterThan(0);
          expect(table.height).toBeGreaterThan(15 * (table.rows + 1));
        }
      });
    });
  }

  it("the outputs ask for nothing outside the server", () => {
    expect(asked.filter((url) => !/^https?:\/\/127\.0\.0\.1:|^wss?:\/\/127\.0\.0\.1:/.test(url))).toEqual([]);
    expect(asked.length).toBeGreaterThan(0);
  });

  it("no kernel is left when the server has gone", async () => {
    const kernels = server.children();
    expect(kernels.length).toBeGreaterThanOrEqual(1);
    await server.stop();
    const left = (): number[] => kernels.filter((id) => existsSync(`/proc/${id}`));
    for (let attempt = 0; attempt < 100 && left().length > 0; attempt++) {
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    expect(left()).toEqual([]);
  });
});
