/** The frame and the reading pages in a real browser: themes, menus, keys, search, without scripts, and what axe says. */
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, inject, test } from "vitest";
import { axeFindings, openBrowser, sidewaysScroll, THEMES, visit, WIDTHS } from "#tests/support/browser.ts";

const baseUrl = inject("baseUrl");
const PAGES = ["/method", "/method/errors", "/materials", "/materials?query=pmma", "/materials/water"];

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(async () => {
  await browser.close();
});

/** Where nothing stands. Its own status is the one thing that the browser may note on the console. */
const LOST = ["/nowhere", "/materials/hydroxiapatite"];

describe("every reading page", () => {
  test.each([...PAGES, ...LOST])("%s stands in both themes and three widths", async (path) => {
    const { page, faults, close } = await visit(browser, baseUrl, path);
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: 844 });
      for (const colorScheme of THEMES) {
        await page.emulateMedia({ colorScheme });
        const where = `${path} ${width} ${colorScheme}`;
        expect(await axeFindings(page), where).toEqual([]);
        expect(await sidewaysScroll(page), where).toBe(0);
      }
    }
    expect(faults.filter((fault) => !(LOST.includes(path) && fault.includes("status of 404")))).toEqual([]);
    await close();
  });

  test.each(PAGES)("%s is complete without scripts", async (path) => {
    const { page, close } = await visit(browser, baseUrl, path, { scripts: false });
    expect(await page.locator("main").innerText()).not.toBe("");
    expect(await page.locator(".needs-script:visible").count()).toBe(0);
    await close();
  });
});

describe("the theme", () => {
  test("is chosen by keyboard, kept over pages, and follows the device again", async () => {
    const { page, faults, close } = await visit(browser, baseUrl, "/materials");
    const ground = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor);
    const light = await ground();
    await page.locator("menu-button button[aria-haspopup]").focus();
    await page.keyboard.press("ArrowDown");
    await page.keyboard.press("End");
    expect(await page.evaluate(() => document.activeElement?.textContent?.trim())).toBe("Dark");
    await page.keyboard.press("Enter");
    expect(await ground()).not.toBe(light);
    expect(await page.evaluate(() => document.activeElement?.getAttribute("aria-haspopup"))).toBe("menu");
    await page.goto(`${baseUrl}/method`);
    expect(await page.evaluate(() => document.documentElement.dataset["theme"])).toBe("dark");
    await page.getByRole("button", { name: "Theme: Dark" }).click();
    await page.getByRole("menuitemradio", { name: "As the device" }).click();
    expect(await ground()).toBe(light);
    expect(faults).toEqual([]);
    await close();
  });

  test("Escape closes the menu and gives the focus back", async () => {
    const { page, close } = await visit(browser, baseUrl, "/method");
    await page.getByRole("button", { name: /^Theme/ }).click();
    await page.keyboard.press("ArrowDown");
    await page.keyboard.press("Escape");
    expect(await page.getByRole("menu").count()).toBe(0);
    expect(await page.evaluate(() => document.activeElement?.getAttribute("aria-expanded"))).toBe("false");
    await close();
  });
});

describe("keys", () => {
  test("the first Tab offers the way past the header", async () => {
    const { page, close } = await visit(browser, baseUrl, "/materials");
    await page.keyboard.press("Tab");
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe("Skip to content");
    await page.keyboard.press("Enter");
    expect(await page.evaluate(() => document.activeElement?.id)).toBe("main");
    await close();
  });

  test("/ goes to the search, ? to the list of keys, and both can be switched off", async () => {
    const { page, close } = await visit(browser, baseUrl, "/materials");
    await page.keyboard.press("/");
    expect(await page.evaluate(() => document.activeElement?.id)).toBe("find");
    await page.keyboard.press("?");
    expect(await page.locator("#find").inputValue()).toBe("?");
    await page.locator("h1").click();
    await page.keyboard.press("?");
    await page.waitForURL(`${baseUrl}/method#keyboard`);
    await page.locator("[data-shortcuts]").uncheck();
    await page.goto(`${baseUrl}/materials`);
    await page.keyboard.press("/");
    expect(await page.evaluate(() => document.activeElement?.tagName)).toBe("BODY");
    await close();
  });
});

describe("materials", () => {
  test("are found while typing, the address follows, and the count is said", async () => {
    const { page, faults, close } = await visit(browser, baseUrl, "/materials");
    await page.locator("#find").fill("hydroxiapatite");
    await page.waitForURL(/query=hydroxiapatite/);
    expect(await page.locator("#found").innerText()).toMatch(/match/);
    // What a kind leads to keeps the words that were typed.
    expect(await page.locator("#kinds a").first().getAttribute("href")).toMatch(/\?query=hydroxiapatite&tag=/);
    expect(await page.locator("#results tbody a").first().innerText()).toBe("Hydroxyapatite");
    await page.locator("#find").fill("");
    await page.waitForURL(`${baseUrl}/materials`);
    expect(faults).toEqual([]);
    await close();
  });

  test("are found without scripts by sending the form", async () => {
    const { page, close } = await visit(browser, baseUrl, "/materials", { scripts: false, width: 390 });
    await page.locator("#find").fill("water");
    await page.getByRole("button", { name: "Find" }).click();
    expect(await page.locator("#results tbody a").first().innerText()).toBe("Water");
    await close();
  });

  test("show their values at a typed energy", async () => {
    const { page, close } = await visit(browser, baseUrl, "/materials/water", { scripts: false });
    await page.locator("#energy").fill("60 keV");
    await page.getByRole("button", { name: "Show" }).click();
    // PHYSICS 9: δ of water at 60 keV is 6.4002e-8, within 0.3 %
    const shown = await page.locator("dl.values dd").first().innerText();
    expect(shown).toMatch(/^6\.(39|40|41)\d\s×\s10−8/);
    await close();
  });
});

test("the phone menu opens without scripts and closes by Escape with them", async () => {
  const plain = await visit(browser, baseUrl, "/method", { width: 390, scripts: false });
  await plain.page.locator(".phone-menu summary").click();
  await plain.page.locator(".phone-menu nav").getByRole("link", { name: "Materials" }).click();
  expect(plain.page.url()).toBe(`${baseUrl}/materials`);
  await plain.close();

  const { page, close } = await visit(browser, baseUrl, "/method", { width: 390 });
  await page.locator(".phone-menu summary").click();
  await page.keyboard.press("Escape");
  expect(await page.locator(".phone-menu").evaluate((menu) => (menu as HTMLDetailsElement).open)).toBe(false);
  await close();
});
