/** The planner as a person uses it: a known pair, picks by keyboard, limits, explanations, the address, without scripts, on a phone. */
import type { Browser, Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, describe, expect, inject, test } from "vitest";
import { axeFindings, openBrowser, sidewaysScroll, THEMES, type Visit, visit, WIDTHS } from "#tests/support/browser.ts";

const baseUrl = inject("baseUrl");

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
});

const plain = (text: string): string => text.replace(/[\u00a0\u202f]/g, " ");
/** The island answers to input once it has measured its figures: only one drawing is left of the two that were served. */
const alive = (page: Page): Promise<unknown> =>
  page.waitForFunction(() => document.querySelector(".phone-only svg.chart") === null);
/** Waits until nothing is stale and no ranking runs. */
const settled = (page: Page): Promise<unknown> =>
  page.waitForFunction(
    () => document.querySelector(".sec-body.chart-stale, .sec-body[aria-busy=true], .plan-state") === null,
  );
const verdict = async (page: Page): Promise<string> => plain(await page.locator(".verdict").innerText());
const lead = async (page: Page): Promise<string> =>
  plain((await page.locator("[data-answer] .lead").allInnerTexts()).join(" "));
const rows = (page: Page) => page.locator(".shortlist tbody tr");
const path = (fields: Record<string, string>): string => `/plan?${new URLSearchParams(fields)}`;

/** The pair of the reference values: one energy, one distance, every photon counted, no floor of counts. */
const PMMA = path({
  feature: "pmma",
  host: "water",
  setup: "own",
  size: "20 um",
  length: "100 um",
  source: "30 m",
  sourceSize: "50 um",
  blur: "2 um",
  pixel: "1 um",
  screen: "100 %",
  energies: "20 keV",
  distances: "0.3 m",
  counts: "0",
  use: "direct",
});

const visits: Visit[] = [];
async function open(address: string, options: Parameters<typeof visit>[3] = {}): Promise<Page> {
  const visited = await visit(browser, baseUrl, address, options);
  visits.push(visited);
  if (options.scripts !== false) await alive(visited.page);
  return visited.page;
}
afterEach(async () => {
  for (const { faults, close } of visits.splice(0)) {
    await close();
    expect(faults).toEqual([]);
  }
});

describe("a known pair", () => {
  // PHYSICS 9 (independent program): 0.007149 Gy with phase, 75.18 Gy by absorption, transmission 0.66703.
  test("PMMA in water shows its figures", async () => {
    const page = await open(PMMA);
    // The point is past the first reversal of contrast: the page says so, and keeping it gives its figures.
    expect(await verdict(page)).toMatch(/No point of the plane is allowed/);
    await page.getByRole("button", { name: "Keep this point as a pick" }).click();
    const row = rows(page).filter({ hasText: "picked from the plane" });
    await row.waitFor();
    const text = plain(await row.innerText());
    expect(text).toContain("20 keV, 0.3 m");
    expect(text).toContain("7.15 mGy");
    expect(text).toContain("67 %");
    expect(plain(await rows(page).filter({ hasText: "best by absorption" }).innerText())).toContain("75.1 Gy");
  });

  test("the default plan gives a verdict, a ruler, a pair of profiles and a working", async () => {
    const page = await open("/plan");
    expect(await verdict(page)).toMatch(/^Use phase contrast at [\d.]+ keV, [\d.]+ (m|mm)\.$/);
    expect(await lead(page)).toMatch(/It needs .* Absorption at its best, .* × the dose of phase\./);
    expect(await page.getByText(/× less dose/).count()).toBeGreaterThan(0);
    expect(await page.locator(".working tbody tr").count()).toBeGreaterThanOrEqual(5);
    expect(await page.locator(".holds li").count()).toBeGreaterThan(6);
    expect(await page.locator(".as-table table").count()).toBe(1);
  });
});

describe("picking", () => {
  test("on the plane by keyboard: arrows move the cross, Enter keeps the point", async () => {
    const page = await open("/plan");
    const before = await rows(page).count();
    const plane = page.getByRole("application");
    await plane.focus();
    const readout = page.locator(".plane-readout");
    const start = await readout.innerText();
    await page.keyboard.press("Shift+ArrowRight");
    await page.keyboard.press("ArrowUp");
    expect(await readout.innerText()).not.toBe(start);
    await page.keyboard.press("Enter");
    await expect.poll(() => rows(page).count()).toBe(before + 1);
    const kept = rows(page).filter({ hasText: "picked from the plane" });
    await expect.poll(() => kept.getAttribute("aria-selected")).toBe("true");
    await page.getByText(/^You chose pick A/).waitFor();
    // The cross stands at the point that was kept.
    await expect
      .poll(async () => plain(await kept.innerText()))
      .toContain(plain(await readout.innerText()).split(":")[0]!);
  });

  test("rows by arrows and numbers, and the list by time", async () => {
    const page = await open("/plan");
    await rows(page).first().focus();
    await page.keyboard.press("ArrowDown");
    await expect.poll(() => rows(page).nth(1).getAttribute("aria-selected")).toBe("true");
    await page.locator("h2", { hasText: "Working" }).click();
    await page.keyboard.press("3");
    await expect.poll(() => page.locator("tr[data-pick='3']").getAttribute("aria-selected")).toBe("true");
    await expect.poll(() => page.locator("#holds").innerText()).toContain("pick 3");
    await page.keyboard.press("t");
    await page.locator(".as-table[open] table").waitFor();
    await page.keyboard.press("d");
    await page.locator("details.draw[open]").waitFor();
    await page.getByRole("combobox", { name: "Order of the list" }).selectOption({ label: "Shortest time" });
    const times = await page.locator(".shortlist td[data-label=Time]").allInnerTexts();
    const seconds = times.map((text) => {
      const [value = "", unit = ""] = plain(text).split(" ");
      return Number(value) * ({ ms: 1e-3, µs: 1e-6, s: 1, min: 60, h: 3600 }[unit] ?? Number.NaN);
    });
    expect(seconds).toEqual([...seconds].sort((a, b) => a - b));
    expect(new Set(seconds).size).toBeGreaterThan(3);
  });

  test("by another quantity of the plane", async () => {
    const page = await open(path({ feature: "hydroxyapatite", shape: "sphere", size: "10 um", use: "retrieval" }));
    for (const label of ["gain over absorption", "gain by retrieval", "let through the sample", "dose needed"]) {
      await page.getByRole("combobox", { name: "Quantity of the plane" }).selectOption({ label });
      await expect
        .poll(() => page.getByRole("application").getAttribute("aria-label"))
        .toContain(`${label.charAt(0).toUpperCase()}${label.slice(1)} over`);
    }
  });
});

describe("changing the question", () => {
  test("a dose limit turns the verdict, and names what would let a point in", async () => {
    const page = await open("/plan");
    expect(await verdict(page)).toMatch(/^Use phase contrast/);
    await page.locator("[data-blank=dose]").click();
    await page.getByRole("textbox", { name: /dose/i }).first().fill("1 mGy");
    await page.keyboard.press("Enter");
    await expect.poll(() => verdict(page)).toBe("No choice stays within 1 mGy.");
    await settled(page);
    expect(await lead(page)).toMatch(/The nearest miss, .* needs [\d.]+ mGy/);
    expect(plain(await page.locator(".plain-list").innerText())).toMatch(/Allow [\d.]+ mGy\./);
    await expect.poll(() => new URL(page.url()).searchParams.get("dose")).toBe("1 mGy");
  });

  test("a size that cannot be read is told, and the answer stays for the question before", async () => {
    const page = await open("/plan?size=2,5%20um");
    await page.getByText("Write 2.5, with a point").first().waitFor();
    expect(await page.getByText("There is no answer yet").count()).toBe(1);
  });

  test("a link reproduces the plan, and a reload too", async () => {
    const address = path({
      feature: "hydroxyapatite",
      shape: "sphere",
      size: "10 um",
      host: "water",
      setup: "fine-parallel",
      use: "tomography",
      dose: "5 Gy",
    });
    const page = await open(address);
    const first = await page.locator(".verdict").innerText();
    await page.locator("[data-blank=dose]").click();
    await page.getByRole("textbox", { name: /dose/i }).first().fill("50 Gy");
    await page.keyboard.press("Enter");
    await expect.poll(() => new URL(page.url()).searchParams.get("dose")).toBe("50 Gy");
    await settled(page);
    const changed = await page.locator(".verdict").innerText();
    const list = await rows(page).allInnerTexts();
    await page.reload();
    await alive(page);
    expect(await page.locator(".verdict").innerText()).toBe(changed);
    expect(await rows(page).allInnerTexts()).toEqual(list);
    expect(first).toMatch(/^.*(Use|No choice)/s);
  });

  test("ranking leaves the page free: the longest task of the main thread is reported", async () => {
    const page = await open("/plan");
    await page.evaluate(() => {
      const tasks: number[] = [];
      (window as unknown as { tasks: number[] }).tasks = tasks;
      new PerformanceObserver((list) => tasks.push(...list.getEntries().map((entry) => entry.duration))).observe({
        type: "longtask",
      });
    });
    const before = await page.locator(".verdict").innerText();
    await page.locator("[data-blank=use]").click();
    await page.getByRole("radio", { name: /tomograph/i }).check();
    await page.keyboard.press("Enter");
    await page.waitForFunction((old) => document.querySelector<HTMLElement>(".verdict")?.innerText !== old, before);
    await settled(page);
    const tasks = await page.evaluate(() => (window as unknown as { tasks: number[] }).tasks);
    console.info(
      `Main thread while a plan was ranked: ${tasks.length} tasks over 50 ms, longest ${Math.max(0, ...tasks).toFixed(0)} ms.`,
    );
    expect(new URL(page.url()).searchParams.get("use")).toBe("tomography");
  });

  test("without a worker the server answers", async () => {
    const visited = await visit(browser, baseUrl, "about:blank".replace("about:blank", "/method"));
    visits.push(visited);
    const { page } = visited;
    await page.addInitScript(() => {
      (window as unknown as { Worker: unknown }).Worker = function noWorker() {
        throw new Error("no worker here");
      };
    });
    await page.goto(`${baseUrl}/plan`);
    await alive(page);
    await page.locator("[data-blank=dose]").click();
    await page.getByRole("textbox", { name: /dose/i }).first().fill("1 mGy");
    await page.keyboard.press("Enter");
    await expect.poll(() => verdict(page)).toBe("No choice stays within 1 mGy.");
  });
});

describe("pairs that need explaining", () => {
  test("an opposed pair and a nearly matched one explain themselves", async () => {
    const opposed = await open(path({ use: "retrieval" }));
    expect(plain(await opposed.locator(".holds").innerText())).toMatch(
      /Opposed pair \(γ −[\d ]+\).*use δ\/β of water/s,
    );
    const matched = await open(path({ feature: "C5H8O2", featureDensity: "1.04 g/cm3" }));
    expect(plain(await matched.locator(".holds").innerText())).toMatch(/Nearly matched.*Measure the density of water/s);
  });

  test("an edge in range brackets its energies", async () => {
    const page = await open(
      path({ feature: "KI", featureDensity: "3.12 g/cm3", use: "absorption", energies: "20 to 50 keV" }),
    );
    expect(await page.locator(".shortlist").innerText()).toContain("beside an edge");
    expect(await page.getByRole("application").textContent()).toContain("I K");
  });

  test("few energies stand as columns", async () => {
    const page = await open(path({ energies: "15, 20, 30 keV" }));
    expect(await page.getByRole("application").count()).toBe(1);
    expect(await rows(page).count()).toBeGreaterThan(2);
  });
});

describe("without scripts", () => {
  test("the form asks and the page answers", async () => {
    const page = await open("/plan", { scripts: false });
    expect(await page.locator(".verdict").innerText()).toMatch(/Use phase contrast/);
    expect(await rows(page).count()).toBeGreaterThan(5);
    await page.locator("input[name=size]").fill("10 um");
    await page.locator("select[name=use]").selectOption("tomography");
    await page.getByRole("button", { name: "Rank it" }).click();
    await page.waitForLoadState();
    expect(new URL(page.url()).searchParams.get("use")).toBe("tomography");
    expect(plain(await page.locator("[data-answer]").innerText())).toMatch(/for all projections/);
    expect(await page.locator(".verdict").innerText()).toMatch(/Use|Either/);
  });

  test("a fault stands by its field", async () => {
    const page = await open("/plan?thickness=5%20keV", { scripts: false });
    const described = await page.locator("input[name=thickness]").getAttribute("aria-describedby");
    const texts = await Promise.all((described ?? "").split(" ").map((id) => page.locator(`#${id}`).innerText()));
    expect(texts.join(" ")).toMatch(/unit of energy/);
  });
});

describe("for everyone", () => {
  test.each(WIDTHS.flatMap((width) => THEMES.map((theme) => ({ width, theme }))))(
    "nothing for axe to find and no sideways scrolling at $width in $theme",
    async ({ width, theme }) => {
      // Every state at the widest and the narrowest, the page itself everywhere.
      const more = [path({ use: "retrieval", dose: "1 mGy" }), "/plan?size=0", path({ energies: "15, 20 keV" })];
      const all = (width === 1440 && theme === "light") || (width === 390 && theme === "dark");
      for (const address of ["/plan", ...(all ? more : [])]) {
        const page = await open(address, { width, theme });
        expect(await axeFindings(page), address).toEqual([]);
        expect(await sidewaysScroll(page), address).toBe(0);
      }
    },
  );

  test("the first blank opens by keyboard, and every stop can be left", async () => {
    const page = await open("/plan");
    for (let step = 0; step < 60; step++) await page.keyboard.press("Tab");
    for (let step = 0; step < 60; step++) await page.keyboard.press("Shift+Tab");
    await page.locator("[data-blank=size]").focus();
    await page.keyboard.press("Enter");
    await page.getByRole("dialog").waitFor();
    expect(await axeFindings(page)).toEqual([]);
    await page.keyboard.press("Escape");
    expect(await page.evaluate(() => document.activeElement?.getAttribute("data-blank"))).toBe("size");
  });

  test("on a phone the bar at the foot goes through the picks", async () => {
    const page = await open("/plan", { width: 390 });
    const bar = page.getByRole("group", { name: "Chosen pick" });
    expect(await bar.innerText()).toContain("Pick 1");
    await bar.getByRole("button", { name: "Next pick" }).click();
    await expect.poll(() => bar.innerText()).toContain("Pick 2");
    await expect.poll(() => page.locator("tr[data-pick='2']").getAttribute("aria-selected")).toBe("true");
  });
});
