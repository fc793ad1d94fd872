/** The cells' pictures in a real browser, the only judge of how wide a text really is. Runs where Chromium is installed. */
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { type Browser, chromium, type Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { inspect, type TextPlaces } from "../display/charts/textPlaces";

const executablePath = "/usr/bin/chromium";
const folder = join(__dirname, "charts");
// Each is held to what its cell draws by the cell's own test.
const pictures = readdirSync(folder).filter((name) => name.endsWith(".svg") && !name.endsWith(".new.svg"));

describe.skipIf(!existsSync(executablePath))("pictures of cells in Chromium", () => {
  let browser: Browser;
  let page: Page;
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath, args: ["--no-sandbox", "--disable-gpu", "--disable-quic"] });
    page = await browser.newPage({ viewport: { width: 1000, height: 800 } });
  });
  afterAll(async () => {
    await browser?.close();
  });

  for (const name of pictures) {
    it(`${name}: no text is cut off or lies on another, whatever the face`, async () => {
      for (const face of ["Liberation Sans", "DejaVu Sans"]) {
        const svg = readFileSync(join(folder, name), "utf8").replace(/font-family="[^"]*"/g, `font-family="${face}"`);
        await page.setContent(`<body style="margin:40px">${svg}</body>`);
        const seen = (await page.evaluate(inspect)) as TextPlaces;
        expect(seen.count, face).toBeGreaterThan(5);
        expect(seen, face).toMatchObject({ out: [], over: [] });
      }
    });
  }
});
