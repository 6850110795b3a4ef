import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { OpenEditor } from "#src/components/features/plan/question/OpenEditor.tsx";
import { PlanPlainForm, PlanQuestionSection, PlanSentence } from "#src/components/features/plan/question/index.ts";
import {
  added,
  layersOf,
  mirrored,
  moved,
  rowFault,
  rowsOf,
} from "#src/components/features/plan/question/layer-rows.ts";
import { PLAN_BLANKS } from "#src/components/features/plan/question/props.ts";
import { endsOf, rangeOf } from "#src/components/features/plan/question/range-text.ts";
import {
  asPercent,
  fieldsOfExample,
  readScreen,
  writeScreen,
} from "#src/components/features/plan/question/setup-fields.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { EXAMPLE_SETUPS } from "#src/lib/plans/examples.ts";
import type { PlanFault } from "#src/lib/plans/faults.ts";
import { DEFAULT_PLAN, OWN_SETUP, type PlanField, type PlanQuestion } from "#src/lib/plans/question.ts";
import { readPlan } from "#src/lib/plans/read-question.ts";

const nothing = (): void => undefined;
const props = (fields: Partial<PlanQuestion> = {}, faults: readonly PlanFault[] = []) => ({
  question: { ...DEFAULT_PLAN, ...fields },
  faults,
  known: [],
  change: nothing,
  learn: nothing,
});
const sentence = (fields?: Partial<PlanQuestion>, faults?: readonly PlanFault[]): string =>
  renderToStaticMarkup(createElement(PlanSentence, props(fields, faults)));
const form = (fields?: Partial<PlanQuestion>, faults?: readonly PlanFault[]): string =>
  renderToStaticMarkup(createElement(PlanPlainForm, props(fields, faults)));
const editor = (field: (typeof PLAN_BLANKS)[number], fields: Partial<PlanQuestion> = {}): string =>
  renderToStaticMarkup(
    createElement(
      QueryClientProvider,
      { client: new QueryClient() },
      createElement(OpenEditor, { ...props(fields), field, onTake: nothing, onClose: nothing }),
    ),
  );
const fault = (field: PlanField, message = `${field} is wrong`): PlanFault => ({
  field,
  message,
  position: null,
  suggestions: [{ text: "better", words: "Better" }],
});
const FIELDS = Object.keys(DEFAULT_PLAN) as PlanField[];
/** The opening tag that carries `attribute`. */
const tagWith = (html: string, attribute: string): string =>
  html.match(/<[a-z0-9]+ [^>]*>/g)?.find((tag) => tag.includes(attribute)) ?? "";
const ids = (html: string): string[] => [...html.matchAll(/ id="([^"]*)"/g)].map(([, id]) => id as string);

describe("the plain form", () => {
  test("is one form that asks for the plan page", () => {
    expect(form().match(/<form/g)).toHaveLength(1);
    expect(tagWith(form(), "<form")).toMatch(/^(?=.* method="get")(?=.* action="\/plan")/);
    expect(form()).toContain(">Rank it</button>");
  });
  test.each(FIELDS)("has %s, labelled, once", (field) => {
    const html = form();
    expect([...html.matchAll(/ name="([^"]*)"/g)].filter(([, name]) => name === field)).toHaveLength(1);
    expect(html).toContain(`<label for="plain-${field}">`);
    expect(tagWith(html, ` name="${field}"`)).toContain(` id="plain-${field}"`);
  });
  test.each(FIELDS)("ties a fault of %s to its field", (field) => {
    const html = form({}, [fault(field)]);
    const tag = tagWith(html, ` name="${field}"`);
    expect(tag).toContain('aria-invalid="true"');
    const described = /aria-describedby="([^"]*)"/.exec(tag)?.[1]?.split(" ") ?? [];
    expect(described).toContain(`plain-${field}-fault`);
    for (const id of described) expect(ids(html)).toContain(id);
    expect(html.slice(html.indexOf(`id="plain-${field}-fault"`))).toContain(`${field} is wrong`);
    expect(html.match(/aria-invalid/g)).toHaveLength(1);
  });
  test("keeps what was written, also what no list offers", () => {
    const html = form({ layers: "before; 1 mm; Si & <Ge>", setup: "elsewhere", energies: "0,9" });
    expect(html).toContain("before; 1 mm; Si &amp; &lt;Ge&gt;");
    expect(html).toMatch(/<option value="elsewhere" selected="">/);
    expect(tagWith(html, ' name="energies"')).toContain('value="0,9"');
  });
  test("opens the seldom parts where they are in use or at fault", () => {
    expect(form()).not.toContain("<details open");
    expect(form({ setup: OWN_SETUP }).match(/<details open/g)).toHaveLength(1);
    expect(form({}, [fault("featureParts"), fault("pass")]).match(/<details open/g)).toHaveLength(2);
  });
});

describe("the sentence", () => {
  test("has every blank once, closed", () => {
    const html = sentence();
    expect([...html.matchAll(/data-blank="([^"]*)"/g)].map(([, blank]) => blank)).toEqual([...PLAN_BLANKS]);
    expect(html).not.toContain('aria-expanded="true"');
    expect(html).not.toContain("aria-invalid");
  });
  test.each(FIELDS)("marks the blank of a fault of %s and points to it", (field) => {
    const html = sentence({}, [fault(field)]);
    const tags = html.match(/<button [^>]*aria-invalid="true"[^>]*>/g) ?? [];
    expect(tags).toHaveLength(1);
    const id = /aria-describedby="([^"]*)"/.exec(tags[0] ?? "")?.[1] ?? "";
    expect(ids(html)).toContain(id);
    expect(html.slice(html.indexOf(`id="${id}"`))).toContain(`${field} is wrong`);
    expect(html).toContain(">Better</button>");
  });
  test("names all faults of one blank, under ids of their own", () => {
    const html = sentence({}, [fault("pixel"), fault("blur"), fault("blur", "again")]);
    const described = /aria-describedby="([^"]*)"/.exec(tagWith(html, 'data-blank="setup"'))?.[1]?.split(" ") ?? [];
    expect(new Set(described).size).toBe(3);
    for (const id of described) expect(ids(html).filter((other) => other === id)).toHaveLength(1);
  });
  test("folds its second clause, never a blank at fault", () => {
    expect(sentence()).toContain("plan-folded");
    expect(sentence()).toContain("Show these 6 blanks");
    expect(sentence({}, [fault("feature")])).toContain("plan-folded");
    expect(sentence({}, [fault("pixel")])).not.toContain("plan-folded");
    expect(sentence({}, [fault("nearField")])).not.toContain("plan-folded");
  });
  test("takes the words it is given, and children below", () => {
    const html = renderToStaticMarkup(
      createElement(PlanQuestionSection, props(), createElement("em", null, "the drawing")),
    );
    expect(html).toContain("<em>the drawing</em>");
    expect(html.match(/<h2/g)).toHaveLength(1);
    expect(new Set(ids(html)).size).toBe(ids(html).length);
  });
});

describe("the editors", () => {
  test.each(PLAN_BLANKS)("%s: a named dialog that can be taken as it stands", (blank) => {
    const html = editor(blank);
    expect(html.match(/role="dialog"/g)).toHaveLength(1);
    expect(tagWith(html, 'role="dialog"')).toContain(`id="blank-${blank}"`);
    expect(tagWith(html, 'type="submit"')).not.toContain("disabled");
    expect(new Set(ids(html)).size).toBe(ids(html).length);
    expect(html).not.toContain("aria-invalid");
  });
  test.each([
    ["size", { size: "2,5 um" }, "Write 2.5, with a point."],
    ["size", { shape: "layer" }, "A layer needs its width across the beam"],
    ["thickness", { thickness: "0" }, "is not a size"],
    ["layers", { layers: "before; 1,5 mm; Si; 2.33" }, "Write 1.5, with a point."],
    ["energies", { energies: "40 to 8 keV" }, "runs downwards"],
    ["distances", { distances: "0,9 m" }, "Write 0.9, with a point."],
    ["use", { use: "tomography", projections: "few" }, "is not accepted"],
    ["dose", { dose: "10 Sv" }, "Sv"],
    ["time", { threshold: "1,5" }, "Write 1.5, with a point."],
    ["setup", { setup: OWN_SETUP, flux: "many" }, "does not begin with a number"],
    ["setup", { setup: OWN_SETUP, screen: "140 %" }, "is not accepted here"],
  ] as const)("%s with %o cannot be taken and says why", (blank, fields, words) => {
    const html = editor(blank, fields);
    expect(html).toContain(words);
    expect(tagWith(html, 'type="submit"')).toContain("disabled");
    const described = /aria-describedby="([^"]*)"/.exec(tagWith(html, 'aria-invalid="true"'))?.[1] ?? "nothing";
    expect(ids(html)).toContain(described);
  });
  test("a layer stands open with its width, other shapes without", () => {
    expect(editor("shape", { shape: "layer", width: "5 um" })).toContain("Width across the beam");
    expect(editor("shape", { shape: "fibre" })).toContain("Diameter, not radius.");
    expect(editor("shape", { shape: "sphere" })).not.toContain("Length of");
  });
  test("a formula is read and its density asked for", () => {
    const html = editor("feature", { feature: "Na2SO4·10H2O" });
    expect(html).toContain("322.186 g/mol, O\u00a069.52\u00a0%");
    expect(html).toContain("A formula has no density of its own");
    expect(html).toContain("Take Na2SO4·10H2O");
  });
  test("a recipe opens as a mixture", () => {
    expect(editor("host", { hostParts: "95; H2O; 1\n5; KI; 3.12" })).toContain("Parts of the mixture");
  });
});

describe("layers around the host", () => {
  const TEN = Array.from({ length: 10 }, (_, i) => `${i < 4 ? "before" : "after"}; ${i + 1} mm; SiO2; 2.2`).join("\n");
  test("none: the host stands alone and cannot be taken out", () => {
    const html = editor("layers");
    expect(html.match(/<tr/g)).toHaveLength(2);
    expect(html).not.toContain("Take out");
    expect(html).toContain("always there");
  });
  test("ten: all are shown in beam order, and no more are taken", () => {
    const html = editor("layers", { layers: TEN });
    expect(html.match(/>Take out</g)).toHaveLength(10);
    expect(html).toContain("5, host");
    expect(html).toContain("At most 10 layers are taken.");
    expect(layersOf(rowsOf(TEN))).toBe(TEN);
    expect(
      readPlan(
        { ...DEFAULT_PLAN, feature: "C", featureDensity: "2", host: "H2O", hostDensity: "1", layers: TEN },
        materialFinder([]),
      ).request?.layers,
    ).toHaveLength(10);
  });
  test("are sorted into beam order when they were not", () => {
    expect(layersOf(rowsOf("after; 1 mm; Si\nbefore; 2 mm; Ge"))).toBe("before; 2 mm; Ge\nafter; 1 mm; Si");
  });
  test("move past the host and stop at the ends", () => {
    const rows = rowsOf("before; 1 mm; Si");
    expect(layersOf(moved(rows, 0, 1))).toBe("after; 1 mm; Si");
    expect(layersOf(moved(rows, 0, -1))).toBe("before; 1 mm; Si");
    expect(layersOf(moved(moved(rows, 0, 1), 1, 1))).toBe("after; 1 mm; Si");
  });
  test("are added at the outer ends and mirrored", () => {
    const rows = rowsOf("before; 1 mm; Si\nbefore; 2 mm; Ge");
    expect(added(rows, "before")[0]).toMatchObject({ isHost: false, material: "" });
    expect(new Set(added(added(rows, "after"), "before").map(({ id }) => id)).size).toBe(5);
    expect(layersOf(mirrored(rows))).toBe("before; 1 mm; Si\nbefore; 2 mm; Ge\nafter; 2 mm; Ge\nafter; 1 mm; Si");
    expect(layersOf(mirrored(rowsOf("after; 1 mm; Si")))).toBe("before; 1 mm; Si\nafter; 1 mm; Si");
    expect(new Set(mirrored(rows).map(({ id }) => id)).size).toBe(5);
  });
  test("cannot break out of their line", () => {
    const [row, ...rest] = rowsOf("before; 1 mm; Si");
    if (!row) throw new Error("A row is missing.");
    expect(layersOf([{ ...row, material: "Si; after\n; 9" }, ...rest])).toBe("before; 1 mm; Si after 9");
  });
  test("say which field is wrong", () => {
    const finder = materialFinder([]);
    const row = { id: 1, isHost: false, thickness: "1 mm", material: "Si", density: "2.33" };
    expect(rowFault(row, finder)).toBeNull();
    expect(rowFault({ ...row, thickness: "0" }, finder)?.field).toBe("thickness");
    expect(rowFault({ ...row, material: "" }, finder)?.field).toBe("material");
    expect(rowFault({ ...row, material: "Xx" }, finder)?.field).toBe("material");
    expect(rowFault({ ...row, density: "" }, finder)?.field).toBe("density");
    expect(rowFault({ ...row, density: "2,33" }, finder)?.field).toBe("density");
  });
});

describe("ranges and setups between text and fields", () => {
  test.each([
    ["8 to 40 keV", "keV", { from: "8", to: "40 keV" }],
    ["8-40", "keV", { from: "8", to: "40" }],
    ["up to 3 m", "m", { from: "", to: "3 m" }],
    ["3 mm to 3 m", "m", { from: "3 mm", to: "3 m" }],
    ["8 to 40 keV in 20 steps", "keV", null],
    ["12, 18, 24 keV", "keV", null],
  ])("%s", (text, unit, ends) => {
    expect(endsOf(text)).toEqual(ends);
    if (ends)
      expect(endsOf(rangeOf(ends, unit))).toEqual({
        ...ends,
        to: /\d$/.test(ends.to) ? `${ends.to} ${unit}` : ends.to,
      });
  });
  test("a unit on the beginning alone is kept for both", () => {
    expect(rangeOf({ from: "500 µm", to: "2" }, "m")).toBe("500 um to 2");
  });
  test("shares are percent", () => {
    expect(["0.4", "40", "40 %", "0,4", "1e-4"].map(asPercent)).toEqual(["40 %", "40 %", "40 %", "0,4", "0.01 %"]);
  });
  test.each(["", "40 %", "Gd2O2S; 20 um; 7.3 g/cm3", "CsI; 100 um"])(
    "a screen %j is written as it was read",
    (text) => {
      expect(writeScreen(readScreen(text))).toBe(text);
    },
  );
  test.each(EXAMPLE_SETUPS)("the figures of $name can be typed in", (example) => {
    const question = {
      ...DEFAULT_PLAN,
      ...fieldsOfExample(example),
      setup: OWN_SETUP,
      feature: "C",
      featureDensity: "2",
      host: "H2O",
      hostDensity: "1",
    };
    const { request, faults } = readPlan(question, materialFinder([]));
    expect(faults).toEqual([]);
    const { energiesKeV: _energies, distancesM: _distances, ...figures } = example.setup;
    expect(request?.setup).toMatchObject(figures);
  });
});
