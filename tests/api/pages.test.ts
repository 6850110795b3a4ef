/** The reading pages as served: every anchor that links and problem documents point at, and what an unknown material gets. */
import { describe, expect, inject, test } from "vitest";
import { METHOD_TOPICS, NOTE_EXPLANATIONS } from "#src/lib/format/method-links.ts";
import { QUANTITIES } from "#src/lib/format/quantities.ts";
import { PROBLEM_KINDS } from "#src/lib/http/problems.ts";
import { ELEMENTS } from "#src/lib/physics/index.ts";

const baseUrl = inject("baseUrl");
const page = async (path: string): Promise<{ status: number; html: string }> => {
  const answer = await fetch(baseUrl + path, { headers: { accept: "text/html" } });
  return { status: answer.status, html: await answer.text() };
};
const idsOf = (html: string): string[] => [...html.matchAll(/\sid="([^"]+)"/g)].map(([, id]) => id as string);

describe("the method page", () => {
  test("carries every id that values link to, once", async () => {
    const { status, html } = await page("/method");
    expect(status).toBe(200);
    const ids = idsOf(html);
    const wanted = [
      ...Object.values(QUANTITIES).map(({ anchor }) => anchor),
      ...Object.values(NOTE_EXPLANATIONS).map(({ anchor }) => anchor),
      ...METHOD_TOPICS,
    ];
    expect(wanted.filter((id) => !ids.includes(id))).toEqual([]);
    expect(ids.filter((id, place) => ids.indexOf(id) !== place)).toEqual([]);
  });

  test("every link within the page has its goal", async () => {
    const { html } = await page("/method");
    const ids = idsOf(html);
    const goals = [...html.matchAll(/href="#([^"]+)"/g)].map(([, id]) => id as string);
    expect(goals.length).toBeGreaterThan(15);
    expect(goals.filter((id) => !ids.includes(id))).toEqual([]);
  });

  test("shows equations as MathML, every weight, and the checksums of the tables", async () => {
    const { html } = await page("/method");
    expect(html.match(/<math /g)?.length).toBeGreaterThan(20);
    expect(html).not.toMatch(/<math[^>]*style=/);
    for (const { symbol } of ELEMENTS) expect(html).toContain(`>${symbol}</abbr>`);
    expect(html.match(/\b[0-9a-f]{64}\b/g)?.length).toBeGreaterThanOrEqual(5);
  });
});

test("the list of errors has an id for every kind of problem, and none twice", async () => {
  const { html } = await page("/method/errors");
  const ids = idsOf(html);
  expect(Object.keys(PROBLEM_KINDS).filter((code) => !ids.includes(code))).toEqual([]);
  expect(ids.filter((id, place) => ids.indexOf(id) !== place)).toEqual([]);
});

describe("materials", () => {
  test("an unknown one is 404 and names what comes closest", async () => {
    const { status, html } = await page("/materials/hydroxiapatite");
    expect(status).toBe(404);
    expect(html).toContain('href="/materials/hydroxyapatite"');
  });
  test("a search shows at most 64 characters of what came in, as text", async () => {
    const { status, html } = await page(`/materials?query=${encodeURIComponent(`<b>${"x".repeat(300)}`)}`);
    expect(status).toBe(200);
    // Inside an attribute a bracket is text.
    expect(html.replaceAll(/"[^"]*"/g, "")).not.toContain("<b>x");
    expect(html).not.toContain("x".repeat(65));
  });
  test("an energy that cannot be read is told, and the rest of the page stands", async () => {
    const { status, html } = await page(`/materials/water?energy=${encodeURIComponent("0,9 keV")}`);
    expect(status).toBe(200);
    expect(html).toContain('aria-invalid="true"');
    expect(html).toContain("Elements, by mass");
  });
});

test("an address where nothing stands is 404 with a way on", async () => {
  const { status, html } = await page("/no/such/place");
  expect(status).toBe(404);
  expect(html).toContain("Nothing stands at this address.");
  expect(html).toContain('action="/materials"');
});
