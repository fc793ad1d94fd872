/** Debian's Chromium, which loads nothing but what a test serves or wrote. */
import { existsSync, mkdirSync } from "node:fs";
import { join } from "node:path";
import { type Browser, chromium, type Page } from "playwright-core";
import { root } from "../notebooks-demo/demoNotebooks";

const executablePath = "/usr/bin/chromium";

/** In .ci/run nothing is skipped for want of a Debian package: there a missing one fails. */
const required = process.env["COSMOLOGY_CELLS_REQUIRE_DEBIAN"] === "1";

/** Whether tests that need these files are to be skipped, because one of them is not installed. */
export function missing(...files: string[]): boolean {
  return !required && !files.every((file) => existsSync(file));
}

export const withoutChromium = (): boolean => missing(executablePath);

/** Where screenshots go, to be looked at; not kept in the repository. */
export function screenshot(name: string): string {
  const folder = join(root, "out", "browser");
  mkdirSync(folder, { recursive: true });
  return join(folder, `${name}.png`);
}

export function launchChromium(): Promise<Browser> {
  return chromium.launch({
    executablePath,
    args: [
      ...["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"],
      ...["--disable-background-networking", "--disable-component-update", "--disable-sync"],
    ],
  });
}

/** Writes down every request of a page that leaves the page itself, and refuses those that would leave the machine. */
export async function watchRequests(page: Page): Promise<string[]> {
  const asked: string[] = [];
  page.on("request", (request) => {
    if (!/^(data|blob|about):/.test(request.url())) asked.push(request.url());
  });
  await page.route(
    (url) => !/^(data|blob|about|file):/.test(url.protocol) && url.hostname !== "127.0.0.1",
    (route) => route.abort(),
  );
  return asked;
}
