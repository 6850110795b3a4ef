import { describe, expect, test } from "vitest";
import type { KnownMaterial } from "#src/lib/lookup/finder.ts";
import { materialFinder } from "#src/lib/lookup/finder.ts";
import { EXAMPLE_SETUPS } from "#src/lib/plans/examples.ts";
import {
  DEFAULT_PLAN,
  OWN_SETUP,
  type PlanField,
  type PlanQuestion,
  readPlanQuestion,
} from "#src/lib/plans/question.ts";
import { liveReading } from "#src/lib/plans/read-live.ts";
import { planWords } from "#src/lib/plans/words.ts";

const kept = (id: string, name: string, formula: string, alsoKnownAs: string[] = []): KnownMaterial => ({
  id,
  name,
  alsoKnownAs,
  formula,
  massFractions: null,
  densityGCm3: 1,
  densityUncertaintyPercent: null,
});
const finder = materialFinder([
  kept("pmma", "PMMA", "C5H8O2"),
  kept("water", "Water", "H2O"),
  kept("polypropylene", "Polypropylene", "C3H6"),
  kept("air-dry", "Air, dry", "N2", ["air"]),
  kept("mortar", "Lime mortar, solid", "CaCO3"),
  kept("wood", "Wood, cell wall", "C6H10O5"),
]);
const wordsOf = (fields: Partial<PlanQuestion> = {}) =>
  planWords({ ...DEFAULT_PLAN, ...fields }, (words) => finder.find(words));
/** As a reader sees it: no-break spaces are spaces. */
const plain = (text: string): string => text.replace(/[\u00a0\u202f]/g, " ");

describe("the words of a plan's question", () => {
  test("read the default as a sentence", () => {
    const words = wordsOf();
    expect({
      ...words,
      ...Object.fromEntries(Object.entries(words).map(([k, v]) => [k, typeof v === "string" ? plain(v) : v])),
    }).toEqual({
      size: "20 µm",
      shape: "fibres",
      feature: "PMMA",
      thickness: "5 mm",
      host: "water",
      layersLead: "between",
      layers: "no walls",
      setup: "Fine parallel beam",
      energies: "8 to 40 keV",
      distances: "up to 3 m",
      use: "looking directly",
      dose: "no dose limit",
      time: "no time limit",
      also: [],
    });
  });

  test.each([
    [{ size: "0.02mm" }, "size", "20 µm"],
    [{ size: "40 nm" }, "size", "40 nm"],
    [{ size: "7" }, "size", "7 µm"],
    [{ shape: "sphere" }, "shape", "spheres"],
    [{ feature: "SiO2" }, "feature", "SiO₂"],
    [{ feature: "SiO2", featureDensity: "2.20 g/cm3" }, "feature", "SiO₂ (2.2 g/cm³)"],
    [{ feature: "SiO2", featureDensity: "dense" }, "feature", "SiO₂ (dense)"],
    [{ host: "air" }, "host", "dry air"],
    [{ host: "mortar" }, "host", "solid lime mortar"],
    [{ host: "wood" }, "host", "wood, cell wall"],
    [{ host: "H2O" }, "host", "H₂O"],
    [{ hostParts: "95; water\n5; KI; 3.12" }, "host", "a mixture of water and KI"],
    [{ hostParts: "90; water\n4; KI\n3; NaCl\n3; CsI\n- 1; C" }, "host", "a mixture of 4 parts"],
    [{ thickness: "0.5 cm" }, "thickness", "5 mm"],
    [{ setup: "long-beamline" }, "energies", "18 to 90 keV"],
    [{ setup: "long-beamline" }, "distances", "up to 12 m"],
    [{ setup: "microfocus-cabinet" }, "distances", "50 mm to 1 m"],
    [{ setup: OWN_SETUP }, "setup", "a parallel beam, 1 µm pixels"],
    [{ setup: OWN_SETUP, source: "0.4 m", pixel: "50 um" }, "setup", "a source at 0.4 m, 50 µm pixels"],
    [{ setup: OWN_SETUP }, "energies", "10 to 60 keV"],
    [{ energies: "20 keV" }, "energies", "20 keV"],
    [{ energies: "12, 18, 24 keV" }, "energies", "12, 18 and 24 keV"],
    [{ energies: "40, 12, 18, 24 keV" }, "energies", "4 energies from 12 to 40 keV"],
    [{ energies: "10 to 30 keV in 20 steps" }, "energies", "10 to 30 keV"],
    [{ distances: "up to 50 cm" }, "distances", "up to 0.5 m"],
    [{ distances: "0.3 m, 0.9 m" }, "distances", "0.3 m and 0.9 m"],
    [{ distances: "0.5 m" }, "distances", "0.5 m"],
    [{ use: "retrieval" }, "use", "retrieving from one distance"],
    [{ use: "absorption" }, "use", "absorption alone"],
    [{ use: "tomography" }, "use", "tomography"],
    [{ use: "tomography", projections: "1500" }, "use", "tomography with 1 500 projections"],
    [{ use: "direct", projections: "1500" }, "use", "looking directly"],
    [{ dose: "10" }, "dose", "10 Gy"],
    [{ dose: "500 mGy" }, "dose", "0.5 Gy"],
    [{ time: "5 min" }, "time", "5 min"],
  ] as const)("%o: %s reads %s", (fields, blank, words) => {
    expect(plain(wordsOf(fields)[blank])).toBe(words);
  });

  test.each([
    ["", "between", "no walls"],
    ["before; 1 mm; polypropylene\nafter; 1 mm; polypropylene", "between", "two 1 mm polypropylene walls"],
    ["before; 1000 um; polypropylene\nafter; 1 mm; Polypropylene", "between", "two 1 mm polypropylene walls"],
    ["before; 1 mm; polypropylene", "behind", "a 1 mm polypropylene wall"],
    ["after; 8 mm; polypropylene", "in front of", "an 8 mm polypropylene wall"],
    ["before; 20 mm; air\nafter; 1 mm; polypropylene", "between", "20 mm dry air and 1 mm polypropylene"],
    [Array.from({ length: 10 }, (_, i) => `before; ${i + 1} mm; SiO2; 2.2`).join("\n"), "behind", "ten layers"],
    [Array.from({ length: 12 }, () => "after; 1 mm; SiO2").join("\n"), "in front of", "12 1 mm SiO₂ walls"],
    ["before; 1,5 mm; glass ware", "behind", "a 1,5 mm glass ware wall"],
    ["sideways", "behind", "unnamed wall"],
  ])("layers %j: %s %s", (layers, lead, text) => {
    const words = wordsOf({ layers });
    expect([words.layersLead, plain(words.layers)]).toEqual([lead, text]);
  });

  test("say what has no blank", () => {
    expect(wordsOf({ threshold: "3", counts: "0", pass: "10 to 90 %", objective: "time" }).also.map(plain)).toEqual([
      "best is the shortest time",
      "detected means 3 times the noise",
      "at least 0 counts in a pixel",
      "10 to 90 % of the photons pass",
    ]);
    expect(wordsOf({ nearField: "0.5" }).also).toEqual([]);
    expect(wordsOf({ nearField: "0.5", use: "retrieval" }).also).toEqual(["near field up to 0.5"]);
  });

  test.each(["size", "thickness", "energies", "distances", "dose", "time"] as const)(
    "show an unreadable %s as it was typed",
    (field) => {
      for (const text of ["2,5 mm", "twenty", "-", "1e999", "5 parsec", "∞", "<b>"]) {
        expect(wordsOf({ [field]: text })[field]).toBe(text);
        expect(liveReading({ ...DEFAULT_PLAN, [field]: text }, field)?.ok).toBe(false);
      }
    },
  );

  test("never throw, whatever stands in the address", () => {
    const texts = [
      "",
      " ",
      ";",
      "\t;\n;",
      "0",
      "-1",
      "NaN",
      "1,2",
      "💥",
      "H2O;",
      "((((",
      "up to",
      "to",
      "1 to",
      "9".repeat(400),
    ];
    for (const field of Object.keys(DEFAULT_PLAN) as PlanField[]) {
      for (const text of texts) {
        const question = readPlanQuestion(new URLSearchParams({ [field]: text, setup: OWN_SETUP, use: "tomography" }));
        const { also, ...blanks } = planWords(question, (words) => finder.find(words));
        for (const [blank, words] of Object.entries(blanks)) expect(words, `${field} ${text}: ${blank}`).not.toBe("");
        expect(also.every((words) => words.length > 0)).toBe(true);
      }
    }
  });

  test("name every example setup with what it offers", () => {
    for (const { id, name } of EXAMPLE_SETUPS) {
      const words = wordsOf({ setup: id });
      expect(words.setup).toBe(name);
      expect(words.energies).toMatch(/^\d+ to \d+\u00a0keV$/);
      expect(words.distances).toMatch(/m$/);
    }
    expect(wordsOf({ setup: "nowhere" }).setup).toBe("nowhere");
  });
});
