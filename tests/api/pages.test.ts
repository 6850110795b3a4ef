/** The reading pages as served: every anchor that links and problem documents point at, and what an unknown material gets. */
import { describe, expect, inject, test } from "vitest";
import { FAULT_EXPLANATIONS } from "#src/components/site/method/error-explanations.ts";
import { METHOD_TOPICS, NOTE_EXPLANATIONS } from "#src/lib/format/method-links.ts";
import { QUANTITIES } from "#src/lib/format/quantities.ts";
import { PROBLEM_KINDS } from "#src/lib/http/problems.ts";
import { ELEMENTS } from "#src/lib/physics/index.ts";

const baseUrl = inject("baseUrl");
const page = async (path: string): Promise<{ status: number; html: string }> => {
  const answer = await fetch(baseUrl + path, { headers: { accept: "text/html" } });
  return { status: answer.status, html: await answer.text() };
};
/** Materials listed in full rows. */
const rowsOf = (html: string): number => html.match(/<td[^>]*><a href="\/materials\//g)?.length ?? 0;
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

  test("says what the files leave out, what stands in, and what the rows at an edge carry", async () => {
    const text = (await page("/method")).html.replaceAll(/<[^>]+>/g, "").replaceAll(/(?:\s|&nbsp;)+/g, " ");
    expect(text).toContain("Where EPDL97 puts f2 at 2 × 10−6 or less, its value stands in");
    expect(text).toContain("the two rows carry its value 0.1 eV to either side");
    expect(text).toContain("The shells from N outward stay where EPDL97 has them");
  });

  test("shows equations as MathML, every weight, and the checksums of the tables", async () => {
    const { html } = await page("/method");
    expect(html.match(/<math /g)?.length).toBeGreaterThan(20);
    expect(html).not.toMatch(/<math[^>]*style=/);
    for (const { symbol } of ELEMENTS) expect(html).toContain(`>${symbol}</abbr>`);
    expect(html.match(/\b[0-9a-f]{64}\b/g)?.length).toBeGreaterThanOrEqual(5);
  });
});

test("the list of errors has an id for every kind of problem, every code of a field, and no id twice", async () => {
  const { html } = await page("/method/errors");
  const listed = [...html.matchAll(/<code[^>]*>(\w+)<\/code>/g)].map(([, code]) => code);
  const faults = Object.keys(FAULT_EXPLANATIONS);
  expect(faults.length).toBeGreaterThan(50);
  expect(faults.filter((code) => !listed.includes(code))).toEqual([]);
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
  test("a long list shows its first 60 and a way to all", async () => {
    const first = (await page("/materials?query=C")).html;
    const count = Number(/Show all (\d+)/.exec(first)?.[1]);
    expect(count).toBeGreaterThan(100);
    expect(rowsOf(first)).toBe(60);
    expect(rowsOf((await page("/materials?query=C&all=yes")).html)).toBe(count);
  });
  test("a kind leads to as many as it says, with words and without", async () => {
    for (const path of ["/materials", "/materials?query=oxide"]) {
      const { html } = await page(path);
      const kinds = [...html.matchAll(/class="chip" href="([^"]+)"[^>]*>[^<]*<span[^>]*>,<\/span>\s*(\d+)/g)];
      expect(kinds.length, path).toBeGreaterThan(2);
      for (const [, href, count] of kinds) {
        const kind = await page(`${(href as string).replace(/&#38;|&amp;/, "&")}&all=yes`);
        expect(rowsOf(kind.html), href).toBe(Number(count));
      }
    }
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
