import { existsSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { type Browser, chromium } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { notebooksToHtml, notebookToHtml } from "../../../kernel-ext/command/htmlReport";
import { outputLimits } from "../../../kernel-ext/command/htmlReport/outputs";
import type { NotebookCell, NotebookFile, NotebookOutput } from "../../../kernel-ext/command/notebookFile";
import { cellOutput, displaySymbol, table } from "../../../kernel-ext/display";
import { sampleCharts } from "../display/charts/sampleCharts";

/** Invented notebooks. */
function notebook(...cells: NotebookCell[]): NotebookFile {
  return { nbformat: 4, nbformat_minor: 5, metadata: {}, cells };
}
const prose = (source: string): NotebookCell => ({ cell_type: "markdown", metadata: {}, source });
const code = (source: string, ...outputs: NotebookOutput[]): NotebookCell => ({
  cell_type: "code",
  metadata: {},
  source,
  execution_count: 3,
  outputs,
});
const result = (data: Record<string, unknown>): NotebookOutput => ({
  output_type: "execute_result",
  execution_count: 3,
  data,
  metadata: {},
});
/** The part of a page that comes from the notebook. */
const content = (html: string): string => /<main[^>]*>([\s\S]*)<\/main>/.exec(html)?.[1] ?? "";

const sample = cellOutput({
  title: "Bins",
  tables: [
    table({
      title: "Bins of an invented survey",
      columns: [{ key: "z", label: "redshift", symbol: "z", digits: 3 }],
      rows: [{ z: 0.5 }, { z: 12.25 }],
    }),
  ],
  notes: ["A note."],
  values: 1,
});

const payloads = [
  "<script>document.title='taken'</script>",
  "<img src=x onerror=\"document.title='taken'\">",
  "<svg onload=\"document.title='taken'\"><script>document.title='taken'</script></svg>",
  "<iframe srcdoc=\"<script>parent.document.title='taken'</script>\"></iframe>",
  "<a href=\"javascript:document.title='taken'\">x</a>",
  "<a href=\"java\nscript:document.title='taken'\">x</a>",
  "<math><mtext><table><mglyph><style><!--</style><img title=\"--&gt;&lt;img src=1 onerror=document.title='taken'&gt;\">",
  "<noscript><p title=\"</noscript><img src=x onerror=document.title='taken'>\">",
  '<form action="http://127.0.0.1:9/"><input name=a></form>',
  '<link rel=stylesheet href="http://127.0.0.1:9/a.css"><style>@import "http://127.0.0.1:9/b.css";body{display:none}</style>',
  '<img src="http://127.0.0.1:9/x.png"><img src="//127.0.0.1:9/y.png"><video src="http://127.0.0.1:9/v.mp4">',
  '<p style="position:fixed;inset:0;background:url(http://127.0.0.1:9/z.png)">cover</p>',
  '<meta http-equiv="refresh" content="0;url=http://127.0.0.1:9/"><base href="http://127.0.0.1:9/">',
  '<div id="content" class="skip cell-output evil">y</div>',
];

/** A notebook that tries everything everywhere. */
const hostile = notebook(
  prose(`# Title <script>document.title='taken'</script>\n\n${payloads.join("\n\n")}`),
  prose(
    "[x](javascript:alert(1)) ![y](http://127.0.0.1:9/m.png) <http://example.org> $\\href{javascript:alert(1)}{x}$",
  ),
  ...payloads.map((payload) =>
    code(
      `const text = ${JSON.stringify(payload)}; // ${payload.replaceAll("\n", " ")}`,
      result({ "text/html": payload, "text/plain": payload }),
      result({ "image/svg+xml": `<svg xmlns="http://www.w3.org/2000/svg">${payload}</svg>`, "text/plain": payload }),
      result({ "text/markdown": payload }),
      result({ "text/latex": payload }),
      result({ "image/png": `"><script>document.title='taken'</script>` }),
      { output_type: "stream", name: payload, text: payload },
      { output_type: "error", ename: payload, evalue: payload, traceback: [payload, "\u001b[31mred\u001b[0m"] },
    ),
  ),
  { cell_type: "raw", metadata: {}, source: payloads.join("\n") },
);

describe("notebookToHtml", () => {
  it("is a page with a language, landmarks, a title and one main heading", () => {
    const html = notebookToHtml(notebook(prose("# Plan\n\ntext\n\n## One\n\n## Two")));
    expect(html).toMatch(/^<!DOCTYPE html>\n<html lang="en">/);
    expect(html).toContain("<title>Plan</title>");
    expect(html.match(/<h1/g)).toHaveLength(1);
    expect(html).toMatch(/<header><h1 id="n1-c1-1">Plan<\/h1><\/header>\n<nav aria-label="Contents">/);
    expect(html).toContain('<main id="content"');
    expect(html).toContain('<a href="#n1-c1-2">One</a>');
    expect(html).toContain('<h2 id="n1-c1-2">One</h2>');
  });

  it("puts a title that was asked for above the notebook's own heading", () => {
    const html = notebookToHtml(notebook(prose("# Plan")), { title: "Report <1>" });
    expect(html).toContain("<title>Report &lt;1&gt;</title>");
    expect(html).toContain("<header><h1>Report &lt;1&gt;</h1></header>");
    expect(html).toContain('<h2 id="n1-c1-1">Plan</h2>');
  });

  it("sets formulas as MathML and leaves prices alone", () => {
    const html = notebookToHtml(
      notebook(prose("$r_s$ costs $5 and $6.\n\n$$\\theta_* = \\frac{r_*}{D_M}$$\n\n$\\nonsense{$")),
    );
    expect(html.match(/<math /g)).toHaveLength(2);
    expect(html).toContain("costs $5 and $6.");
    expect(html).toContain('<p class="formula">');
    expect(html).toContain("<mfrac>");
    expect(html).toContain("$\\nonsense{$</code>");
  });

  it("reads a formula over several lines and an environment", () => {
    const html = notebookToHtml(
      notebook(prose("$$\na = b\n$$\n\n\\begin{aligned}\na &= b \\\\\nc &= d\n\\end{aligned}\n\nend")),
    );
    expect(html.match(/<p class="formula">/g)).toHaveLength(2);
    expect(html).toContain("<p>end</p>");
  });

  it("shows code with its parts told apart and its count", () => {
    const html = notebookToHtml(notebook(code('// why\nconst a = "x<y" + 12; return `t`')));
    expect(html).toContain('<p class="count">[3]</p>');
    expect(html).toContain(
      '<span class="code-comment">// why</span>\n<span class="code-keyword">const</span> a = <span class="code-string">&quot;x&lt;y&quot;</span> + <span class="code-number">12</span>',
    );
  });

  it("keeps the tables of this program, with heads and alignment", async () => {
    const html = content(notebookToHtml(notebook(code("bins", result({ ...(await sample[displaySymbol]()) })))));
    expect(html).toContain('<table class="cell-table">');
    expect(html).toContain("<caption>Bins of an invented survey</caption>");
    expect(html).toContain('<th scope="col" class="cell-point">redshift <span class="cell-symbol">z</span></th>');
    expect(html).toContain(
      '<div class="cell-scroll" tabindex="0" role="group" aria-label="Bins of an invented survey">',
    );
    expect(html).not.toContain("<style");
  });

  it("shows a chart as a picture with its title and description as alternative text", async () => {
    const chart = (sampleCharts["measured"] as NonNullable<(typeof sampleCharts)[string]>)();
    const html = notebookToHtml(notebook(code("chart", result({ ...(await chart.bundle()) }))));
    const [, data, alt] =
      /<img class="cell-chart" src="data:image\/svg\+xml;base64,([^"]*)" alt="([^"]*)">/.exec(html) ?? [];
    expect(alt).toBe(`${chart.title} ${chart.description}`);
    const svg = Buffer.from(String(data), "base64").toString("utf8");
    expect(svg).toMatch(/^<svg[^>]*><style>/);
    expect(svg).toContain("prefers-color-scheme:dark");
  });

  it("shows an error with its text, without terminal colors", () => {
    const error: NotebookOutput = {
      output_type: "error",
      ename: "OutOfDomainError",
      evalue: "hubble must be positive, got -1",
      traceback: ["\u001b[31mat\u001b[0m cell 2, line 1"],
    };
    const html = content(notebookToHtml(notebook(code("x", error))));
    expect(html).toContain('<p class="error-head">OutOfDomainError: hubble must be positive, got -1</p>');
    expect(html).toContain(">at cell 2, line 1</pre>");
  });

  it("of a line that was overwritten shows the last state", () => {
    const html = content(
      notebookToHtml(
        notebook(code("x", { output_type: "stream", name: "stdout", text: "10 %\r50 %\r100 %\nend\r\n" })),
      ),
    );
    expect(html).toContain(">100 %\nend</pre>");
  });

  it("puts pictures that a cell carries into the page, and names those that would be fetched", () => {
    const cell: NotebookCell = {
      cell_type: "markdown",
      metadata: {},
      source: "![own](attachment:a%20b.png) ![far](http://127.0.0.1:9/x.png)",
      attachments: { "a b.png": { "image/png": "iVBORw0KGgo=" } },
    };
    const html = content(notebookToHtml(notebook(cell)));
    expect(html).toContain('<img src="data:image/png;base64,iVBORw0KGgo=" alt="own">');
    expect(html).toContain("[picture not included: far]");
  });

  it("cuts what is too large and says so", () => {
    const long = "x".repeat(outputLimits.text + 12_345);
    const many = Array.from({ length: outputLimits.count + 7 }, () => result({ "text/plain": "1" }));
    const html = notebookToHtml(
      notebook(
        code("a", { output_type: "stream", name: "stdout", text: long }),
        code("b", ...many),
        code("c", result({ "text/html": `<p>${"y".repeat(outputLimits.html)}</p>`, "text/plain": "short" })),
        code("d", result({ "image/png": "A".repeat(outputLimits.picture + 4), "text/plain": "A large picture" })),
      ),
    );
    expect(html).toContain("12\u202f345 more characters are not shown.");
    expect(html).toContain("7 more outputs of this cell are not shown.");
    expect(html).toContain(">short</pre>");
    expect(html).toContain("is not shown: A large picture");
    expect(html.length).toBeLessThan(outputLimits.text + 100_000);
  });

  it("leaves nothing of a hostile notebook that could run, fetch or restyle", () => {
    const html = content(notebookToHtml(hostile));
    const tags = [...html.matchAll(/<([a-z][a-z0-9]*)((?:\s+[\w:-]+(?:="[^"]*")?)*)\s*\/?>/g)];
    const names = new Set(tags.map(([, name]) => name));
    for (const name of [
      "script",
      "style",
      "svg",
      "iframe",
      "form",
      "input",
      "link",
      "meta",
      "base",
      "video",
      "object",
    ]) {
      expect(names.has(name as string), name).toBe(false);
    }
    for (const [tag, , attributes] of tags) {
      const keys = [...(attributes ?? "").matchAll(/\s([\w:-]+)(?:="[^"]*")?/g)].map(([, key]) => key);
      for (const key of keys) expect(key, tag).not.toMatch(/^on|^style$|^srcdoc$/);
      expect(attributes, tag).not.toMatch(/^ id="content"/);
      const source = /\ssrc="([^"]*)"/.exec(attributes ?? "")?.[1];
      if (source !== undefined) expect(source).toMatch(/^data:image\//);
      const address = /\shref="([^"]*)"/.exec(attributes ?? "")?.[1];
      if (address !== undefined) expect(address).toMatch(/^(https?:|#)/);
    }
    // Whatever is left of angle brackets belongs to a tag that was looked at above.
    expect(html.replace(/<\/?[a-z][a-z0-9]*(?:\s+[\w:-]+(?:="[^"]*")?)*\s*\/?>/g, "")).not.toContain("<");
    for (const [, , attributes] of tags) expect(attributes).not.toMatch(/ class="[^"]*(evil|skip)/);
    expect(html).not.toContain("\u001b");
  });

  it("survives outputs that are not what the format says", () => {
    const odd = [
      null,
      1,
      {},
      { output_type: "display_data" },
      { output_type: "stream" },
      { output_type: "error" },
      { output_type: "display_data", data: { "text/html": { a: 1 } } },
    ];
    expect(() => notebookToHtml(notebook(code("x", ...(odd as NotebookOutput[]))))).not.toThrow();
  });
});

describe("notebooksToHtml", () => {
  it("has an article a notebook, with headings one level down and links to each", () => {
    const html = notebooksToHtml([
      { name: "first", notebook: notebook(prose("# One")) },
      { name: "second", notebook: notebook(code("1")) },
    ]);
    expect(html).toContain("<h1>first, second</h1>");
    expect(html).toContain('<h2 id="n1-c1-1">One</h2>');
    expect(html).toContain('<h2 id="n2">second</h2>');
    expect(html).toContain('<li><a href="#n1-c1-1">One</a></li>\n<li><a href="#n2">second</a></li>');
  });

  it("of a single notebook is that notebook's page", () => {
    const only = notebook(prose("# One"));
    expect(notebooksToHtml([{ name: "only", notebook: only }])).toBe(notebookToHtml(only));
  });
});

const executablePath = "/usr/bin/chromium";

describe.skipIf(!existsSync(executablePath))("the page in Chromium", () => {
  let browser: Browser;
  let folder: string;
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath, args: ["--no-sandbox", "--disable-gpu", "--disable-quic"] });
    folder = mkdtempSync(join(tmpdir(), "report-"));
  });
  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  const open = async (html: string, width: number, colorScheme: "light" | "dark") => {
    const file = join(folder, `${width}-${colorScheme}.html`);
    writeFileSync(file, html);
    const page = await browser.newPage({ viewport: { width, height: 800 }, colorScheme });
    const asked: string[] = [];
    const said: string[] = [];
    page.on("request", (request) => {
      if (!request.url().startsWith("data:")) asked.push(request.url());
    });
    page.on("console", (message) => said.push(message.text()));
    page.on("dialog", () => said.push("dialog"));
    await page.goto(`file://${file}`);
    await page.waitForLoadState("networkidle");
    return { page, asked, said };
  };

  it("runs nothing and asks for nothing, whatever the notebook tries", async () => {
    const { page, asked, said } = await open(notebookToHtml(hostile), 1000, "light");
    expect(asked).toHaveLength(1);
    expect(said).toEqual([]);
    expect(await page.title()).toBe("Title <script>document.title='taken'</script>");
    expect(await page.evaluate("document.querySelectorAll('main, [id=content]').length")).toBe(1);
    await page.close();
  });

  for (const colorScheme of ["light", "dark"] as const) {
    it(`fits a narrow window, and its text stands out from the page when that is ${colorScheme}`, async () => {
      const chart = (sampleCharts["distances"] as NonNullable<(typeof sampleCharts)[string]>)();
      const html = notebookToHtml(
        notebook(
          prose("# A rather long title of a report\n\n## Part\n\n[link](https://example.org) `code`"),
          code(
            'const a = "b"; // a comment that is long enough to be wider than the window by far, and then some\n12',
            result({ ...(await sample[displaySymbol]()) }),
            result({ ...(await chart.bundle()) }),
          ),
          code("x", { output_type: "error", ename: "E", evalue: "v", traceback: ["t"] }),
        ),
      );
      const { page, asked, said } = await open(html, 360, colorScheme);
      expect(asked).toHaveLength(1);
      expect(said).toEqual([]);
      expect(await page.evaluate("document.documentElement.scrollWidth")).toBe(360);
      expect(await page.evaluate("document.querySelector('img').naturalWidth")).toBeGreaterThan(500);
      // Contrast ratio of WCAG 2.1, 1.4.3: at least 4.5 for text.
      const lowest = (await page.evaluate(`(() => {
        const light = (rgb) => { const [r, g, b] = rgb.map((v) => { const s = v / 255; return s <= 0.04045 ? s / 12.92 : ((s + 0.055) / 1.055) ** 2.4; }); return 0.2126 * r + 0.7152 * g + 0.0722 * b; };
        const numbers = (color) => color.match(/[\\d.]+/g).map(Number);
        const behind = (node) => { for (let at = node; at; at = at.parentElement) { const color = numbers(getComputedStyle(at).backgroundColor); if (color[3] !== 0) return color.slice(0, 3); } return [255, 255, 255]; };
        let worst = [99, ""];
        for (const node of document.querySelectorAll("body *")) {
          if (![...node.childNodes].some((child) => child.nodeType === 3 && child.data.trim() !== "")) continue;
          const [a, b] = [light(numbers(getComputedStyle(node).color).slice(0, 3)), light(behind(node))];
          const ratio = (Math.max(a, b) + 0.05) / (Math.min(a, b) + 0.05);
          if (ratio < worst[0]) worst = [ratio, node.className + " " + node.tagName];
        }
        return worst;
      })()`)) as [number, string];
      expect(lowest[0], lowest[1]).toBeGreaterThanOrEqual(4.5);
      expect(lowest[0]).toBeLessThan(21);
      await page.close();
    });
  }

  it("can be gone through by keyboard: the skip link first, then links, code and tables", async () => {
    const html = notebookToHtml(
      notebook(prose("# T\n\n## A\n\n## B"), code("x", result({ ...(await sample[displaySymbol]()) }))),
    );
    const { page } = await open(html, 1000, "light");
    const stops: string[] = [];
    for (let press = 0; press < 5; press++) {
      await page.keyboard.press("Tab");
      stops.push(
        (await page.evaluate("document.activeElement.className || document.activeElement.textContent")) as string,
      );
    }
    expect(stops).toEqual(["skip", "A", "B", "source", "cell-scroll"]);
    await page.close();
  });
});
