/** The look-up as a person uses it: blanks by keyboard, mixtures, the curve's line, the address, files, without scripts. */
import { readFileSync } from "node:fs";
import type { Browser, Page } from "playwright-core";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, test } from "vitest";
import { axeFindings, openBrowser, sidewaysScroll, THEMES, type Visit, visit, WIDTHS } from "#tests/support/browser.ts";

const baseUrl = inject("baseUrl");

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
});

/** The value beside a name in the value lists, as shown. */
const shown = (page: Page, name: string): Promise<string> =>
  page
    .locator(".values > div", { has: page.getByRole("link", { name, exact: true }) })
    .first()
    .locator("dd")
    .innerText();
/** The island answers to input once it has measured its chart: only one drawing is left of the two that were served. */
const alive = (page: Page): Promise<unknown> =>
  page.waitForFunction(() => document.querySelector(".phone-only svg.chart") === null);
const blank = (page: Page, field: string) => page.locator(`.ask [data-blank=${field}]`);
/** Waits until the answer is for the question asked: nothing is stale any more. */
const settled = (page: Page): Promise<void> =>
  page.waitForFunction(() => document.querySelector(".sec-body[aria-busy=true]") === null).then(() => undefined);

describe("a look-up", () => {
  let visited: Visit;
  let page: Page;
  beforeEach(async () => {
    visited = await visit(browser, baseUrl, "/constants");
    page = visited.page;
    await alive(page);
  });
  afterEach(async () => {
    expect(visited.faults).toEqual([]);
    await visited.close();
  });

  async function choose(text: string, pick: RegExp): Promise<void> {
    await blank(page, "material").click();
    await page.keyboard.type(text);
    const option = page.getByRole("option", { name: pick }).first();
    await option.waitFor();
    // To the option by arrows alone.
    for (let step = 0; step < 8; step++) {
      await page.keyboard.press("ArrowDown");
      if ((await option.getAttribute("aria-selected")) === "true") break;
    }
    await page.keyboard.press("Enter");
  }

  test("by name gives the handbook's material and its values", async () => {
    await choose("water", /^Water/);
    await page.waitForFunction(() => document.querySelector(".ask")?.textContent?.includes("Water"));
    await settled(page);
    // From PHYSICS 9 (independent program): δ of water at 20 keV 5.7663e-7, μ 0.80983 1/cm.
    await page.waitForFunction(() => document.querySelector(".values dd")?.textContent?.includes("5.76"));
    expect(await shown(page, "Refractive-index decrement")).toMatch(/^5\.76\d\s×\s10/);
    expect(Number.parseFloat(await shown(page, "Attenuation, total"))).toBeCloseTo(0.8098, 2);
  });

  test("by misspelt name finds it all the same", async () => {
    await choose("kaptn", /Polyimide/);
    await expect.poll(() => blank(page, "material").innerText()).toContain("Polyimide");
  });

  test("by formula asks for the density, then answers", async () => {
    await blank(page, "material").click();
    await page.keyboard.type("SiO2");
    await page.getByText("As a formula:").waitFor();
    await page.keyboard.press("Enter");
    await page.getByRole("dialog", { name: "Density" }).waitFor();
    await page.keyboard.type("2.2");
    await page.keyboard.press("Enter");
    await page.getByRole("dialog", { name: "Photon energy or wavelength" }).waitFor();
    await page.keyboard.type("8.048 keV");
    await page.keyboard.press("Enter");
    await settled(page);
    await expect.poll(() => shown(page, "Refractive-index decrement")).toMatch(/^7\.1\d\d\s×\s10/);
    await expect.poll(() => new URL(page.url()).search).toContain("SiO2");
  });

  test("with a faulty formula says where and what, and one press mends it", async () => {
    await blank(page, "material").click();
    await page.keyboard.type("Hx2O");
    await page.getByText("Unknown element 'Hx' at 1; did you mean He or Hg?").waitFor();
    await page.getByRole("button", { name: "He2O" }).click();
    expect(await page.getByRole("combobox", { name: "Name or formula" }).inputValue()).toBe("He2O");
  });

  test("refuses a decimal comma in the field, and Escape keeps the old value", async () => {
    await blank(page, "energy").click();
    await page.keyboard.type("2,7");
    await page.getByText("Write 2.7 with a point").waitFor();
    expect(await page.getByRole("button", { name: "Take this energy" }).isDisabled()).toBe(true);
    await page.keyboard.press("Escape");
    expect(await blank(page, "energy").innerText()).toContain("20");
    expect(await page.evaluate(() => document.activeElement?.getAttribute("data-blank"))).toBe("energy");
  });

  test("of a mixture by mass, with the rest given to the first part", async () => {
    await page.getByRole("button", { name: "Compose a mixture" }).click();
    const dialog = page.getByRole("dialog", { name: "Mixture" });
    await dialog.getByRole("combobox", { name: "Material of part 1" }).fill("water");
    await dialog.getByRole("textbox", { name: "Share of water" }).fill("");
    await dialog.getByRole("combobox", { name: "Material of part 2" }).fill("NaCl");
    await dialog.getByRole("textbox", { name: "Share of NaCl" }).fill("5");
    await dialog.getByRole("textbox", { name: /Density of NaCl/ }).fill("2.165");
    await dialog.getByRole("button", { name: "Give it to water" }).click();
    await dialog.getByRole("button", { name: "Take this mixture" }).click();
    await settled(page);
    await expect.poll(() => blank(page, "parts").innerText()).toMatch(/0\.95 Water \+ 0\.05 NaCl by mass/);
    await expect.poll(() => blank(page, "density").innerText()).toContain("estimate");
    // Additive volumes: 1 / (0.95/ρ_water + 0.05/2.165) with the handbook's water.
    expect(Number.parseFloat((await blank(page, "density").innerText()).replace(/^[^\d]*/, ""))).toBeCloseTo(
      1 / (0.95 / 1 + 0.05 / 2.165),
      2,
    );
  });

  test("of a solution in mg/mL", async () => {
    await page.getByRole("button", { name: "Compose a mixture" }).click();
    const dialog = page.getByRole("dialog", { name: "Mixture" });
    await dialog.getByRole("radio", { name: "mg/mL" }).check();
    await dialog.getByRole("combobox", { name: "Material of part 1" }).fill("water");
    await dialog.getByRole("combobox", { name: "Material of part 2" }).fill("KI");
    await dialog.getByRole("textbox", { name: "Share of KI" }).fill("50");
    await dialog.getByRole("textbox", { name: /Density of KI/ }).fill("3.12");
    await dialog.getByRole("button", { name: "Take this mixture" }).click();
    await settled(page);
    await expect.poll(() => blank(page, "parts").innerText()).toMatch(/Water with 50 mg\/mL/);
    // Iodine's K edge is now drawn, and named.
    await page
      .getByText(/^I K 33\.1/)
      .first()
      .waitFor();
  });

  test("is read off the curve by keyboard, and the address follows", async () => {
    const line = page.getByRole("slider", { name: "Photon energy" });
    await line.focus();
    await page.keyboard.press("Home");
    await expect.poll(() => line.getAttribute("aria-valuenow")).toBe("5");
    await page.keyboard.press("Shift+ArrowRight");
    await expect.poll(() => line.getAttribute("aria-valuenow")).toBe("5.523");
    expect(await line.getAttribute("aria-valuetext")).toMatch(/^5\.523 keV; δ 8\.\d+\s×\s10⁻⁶; β/);
    await expect.poll(() => page.locator(".readout").innerText()).toContain("5.523");
    await expect.poll(() => new URL(page.url()).searchParams.get("energy")).toBe("5.523 keV");
    await page.keyboard.press("End");
    await expect.poll(() => line.getAttribute("aria-valuenow")).toBe("100");
  });

  test("beside another material gives Δδ, Δμ and γ, and the pair's curves", async () => {
    const field = page.getByRole("combobox", { name: /Add a material/ });
    await field.fill("water");
    await page.getByRole("option", { name: /^Water/ }).click();
    await page.getByText(/PMMA less Water/).waitFor();
    await page.getByRole("radio", { name: "γ of the pair" }).check();
    await page.getByRole("group", { name: /γ of the pair over photon energy/ }).waitFor();
    await expect.poll(() => new URL(page.url()).searchParams.get("with")).toBe("Water");
  });

  test("comes back from its address after a reload", async () => {
    await choose("water", /^Water/);
    await blank(page, "energy").click();
    await page.keyboard.type("0.62 Å");
    await page.keyboard.press("Enter");
    await settled(page);
    await expect.poll(() => new URL(page.url()).search).toMatch(/energy=0\.62/);
    const before = await page.locator(".values").first().innerText();
    const address = page.url();
    await page.goto(address);
    expect(await page.locator(".values").first().innerText()).toBe(before);
    expect(await blank(page, "material").innerText()).toContain("Water");
  });

  test("is saved as CSV with its citation", async () => {
    const [download] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("link", { name: "Save CSV", exact: true }).click(),
    ]);
    expect(download.suggestedFilename()).toBe("rimelight-constants.csv");
    const lines = readFileSync((await download.path())!, "utf8").split("\r\n");
    expect(lines[0]).toContain("PMMA");
    expect(lines[1]).toMatch(/Rimelight tables .*EPDL97/);
    expect(lines.length).toBeGreaterThan(8);
  });

  test("is saved as a picture, and as an SVG that stands alone", async () => {
    const [png] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("button", { name: "Save PNG" }).click(),
    ]);
    const bytes = readFileSync((await png.path())!);
    expect([...bytes.subarray(0, 4)]).toEqual([0x89, 0x50, 0x4e, 0x47]);
    expect(bytes.length).toBeGreaterThan(10_000);
    const [svg] = await Promise.all([
      page.waitForEvent("download"),
      page.getByRole("link", { name: "Save SVG" }).click(),
    ]);
    const text = readFileSync((await svg.path())!, "utf8");
    expect(text).toMatch(/^<svg xmlns="http:\/\/www.w3.org\/2000\/svg"/);
    expect(text).toContain("Rimelight tables");
    expect(text).not.toMatch(/var\(--|<script|href=/);
  });

  test("keeps the focus inside an open blank, and gives it back", async () => {
    await blank(page, "density").click();
    for (let step = 0; step < 12; step++) {
      await page.keyboard.press("Tab");
      expect(await page.evaluate(() => document.activeElement?.closest("[role=dialog]") !== null)).toBe(true);
    }
    await page.getByRole("button", { name: "Close" }).click();
    expect(await page.evaluate(() => document.activeElement?.getAttribute("data-blank"))).toBe("density");
  });

  test("says so when the tables cannot be reached, and keeps the answer", async () => {
    await page.route("**/api/v1/elements/**", (route) => route.abort());
    const before = await shown(page, "Refractive-index decrement");
    await choose("aluminium", /^Aluminium/);
    await page.getByText("The tables did not arrive.").waitFor();
    expect(await shown(page, "Refractive-index decrement")).toBe(before);
    // The failed requests themselves are the browser's to report.
    visited.faults.splice(
      0,
      visited.faults.length,
      ...visited.faults.filter((fault) => !/Failed to load resource/.test(fault)),
    );
  });
});

describe("without scripts", () => {
  test("the question is a plain form, and its answer stands in the page", async () => {
    const { page, close } = await visit(browser, baseUrl, "/constants", { scripts: false });
    await page.getByRole("textbox", { name: /Material/ }).fill("SiO2");
    await page.getByRole("textbox", { name: /Density/ }).fill("2.2");
    await page.getByRole("textbox", { name: /Photon energy/ }).fill("8.048 keV");
    await page.getByRole("button", { name: "Show" }).first().click();
    await page.waitForLoadState();
    expect(new URL(page.url()).searchParams.get("material")).toBe("SiO2");
    expect(await shown(page, "Refractive-index decrement")).toMatch(/^7\.1/);
    expect(await page.locator("svg.chart .curve-phase:visible").count()).toBeGreaterThan(0);
    await close();
  });

  test("a fault is told with what would be accepted", async () => {
    const { page, close } = await visit(browser, baseUrl, "/constants?material=kaptn", { scripts: false });
    expect(await page.getByRole("alert").innerText()).toMatch(/No material is called “kaptn”[\s\S]*Polyimide/);
    await close();
  });

  test("a mixture is written as lines", async () => {
    const { page, close } = await visit(browser, baseUrl, "/constants", { scripts: false });
    await page.locator("summary", { hasText: "Compose a mixture" }).click();
    await page.getByRole("textbox", { name: /One part a line/ }).fill("95; water\n5; NaCl; 2.165");
    await page.getByRole("button", { name: "Show" }).first().click();
    await page.waitForLoadState();
    expect(await page.getByRole("heading", { name: "Answer" }).isVisible()).toBe(true);
    expect(await shown(page, "Refractive-index decrement")).toMatch(/^5\.\d+\s×\s10/);
    await close();
  });
});

describe("every state", () => {
  const STATES = [
    "/",
    "/constants",
    "/constants?material=kaptn",
    "/constants?parts=90%3B+water%0A10%3B+KI%3B+3.12",
    "/constants?material=water&with=pmma%0Aaluminium&curve=pair-contrast",
  ];
  test.each(STATES)("%s stands in both themes and three widths", async (path) => {
    const { page, faults, close } = await visit(browser, baseUrl, path);
    await alive(page);
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: 844 });
      for (const colorScheme of THEMES) {
        await page.emulateMedia({ colorScheme });
        const where = `${path} ${width} ${colorScheme}`;
        expect(await axeFindings(page), where).toEqual([]);
        expect(await sidewaysScroll(page), where).toBe(0);
      }
    }
    expect(faults).toEqual([]);
    await close();
  });

  test.each(["material", "density", "energy", "parts"])("with the %s blank open", async (field) => {
    for (const width of [1440, 390]) {
      const { page, faults, close } = await visit(browser, baseUrl, "/constants", { width });
      await alive(page);
      await page.locator(`[data-blank=${field}]`).click();
      await page.getByRole("dialog").waitFor();
      expect(await axeFindings(page), `${field} ${width}`).toEqual([]);
      expect(await sidewaysScroll(page), `${field} ${width}`).toBe(0);
      expect(faults).toEqual([]);
      await close();
    }
  });
});
