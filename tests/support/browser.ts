/** Real Chromium for the browser tests: a page that notes every console error and every request to another host. */
import { existsSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { type Browser, type BrowserContextOptions, chromium, type Page } from "playwright-core";

const PLACES = ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];
const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];
const AXE = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");
const WCAG = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];

export const WIDTHS = [1440, 1024, 390] as const;
export const THEMES = ["light", "dark"] as const;

export async function openBrowser(): Promise<Browser> {
  const executablePath = PLACES.find((place) => existsSync(place));
  if (executablePath === undefined) throw new Error(`No Chromium at ${PLACES.join(", ")}. npm test installs it.`);
  return chromium.launch({ executablePath, args: FLAGS });
}

export interface Visit {
  readonly page: Page;
  /** Console errors, uncaught exceptions, requests to other hosts. Empty is right. */
  readonly faults: string[];
  close(): Promise<void>;
}

export interface VisitOptions {
  width?: number;
  theme?: "light" | "dark";
  scripts?: boolean;
  context?: BrowserContextOptions;
}

/** A fresh context (no storage) at `baseUrl + path`, loaded with everything it needs. */
export async function visit(
  browser: Browser,
  baseUrl: string,
  path: string,
  options: VisitOptions = {},
): Promise<Visit> {
  const { width = 1440, theme = "light", scripts = true } = options;
  const context = await browser.newContext({
    viewport: { width, height: width < 500 ? 844 : 900 },
    colorScheme: theme,
    javaScriptEnabled: scripts,
    ...options.context,
  });
  const page = await context.newPage();
  const faults: string[] = [];
  page.on("console", (message) => {
    if (message.type() === "error") faults.push(message.text());
  });
  page.on("pageerror", (error) => faults.push(String(error)));
  page.on("request", (request) => {
    const url = request.url();
    if (!url.startsWith(baseUrl) && !/^(data|blob):/.test(url)) faults.push(`asked another host: ${url}`);
  });
  await page.goto(baseUrl + path, { waitUntil: "load" });
  return { page, faults, close: () => context.close() };
}

/** What axe finds against WCAG 2.2 AA, one line each with the first element at fault. */
export async function axeFindings(page: Page): Promise<string[]> {
  // A script element would be stopped by the site's own policy; evaluation is not.
  await page.evaluate(AXE);
  return page.evaluate(async (runOnly) => {
    const { axe } = window as unknown as {
      axe: {
        run(root: Document, options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }>;
      };
    };
    const { violations } = await axe.run(document, { runOnly });
    return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html ?? ""}`);
  }, WCAG);
}

/** Pixels by which the page can be scrolled sideways. */
export async function sidewaysScroll(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}
