/** The look-up in text: question to address and back, recipes, names, answers, files. */
import { describe, expect, it } from "vitest";
import { committedTables } from "#data/build/committed-tables.ts";
import { answerQuestion } from "#src/lib/lookup/answer.ts";
import { curvesCsv, valuesCsv } from "#src/lib/lookup/csv.ts";
import { type KnownMaterial, materialFinder } from "#src/lib/lookup/finder.ts";
import { DEFAULT_QUESTION, type Question, readQuestion, writeQuestion } from "#src/lib/lookup/question.ts";
import { readRecipe, RecipeError, recipeStatement, writeRecipe } from "#src/lib/lookup/recipe.ts";
import { viewOf } from "#src/lib/lookup/view.ts";

const known = (
  id: string,
  name: string,
  formula: string,
  densityGCm3: number,
  alsoKnownAs: string[] = [],
): KnownMaterial => ({
  id,
  name,
  alsoKnownAs,
  formula,
  massFractions: null,
  densityGCm3,
  densityUncertaintyPercent: null,
});
const HANDBOOK = [
  known("water", "Water", "H2O", 1),
  known("pmma", "PMMA", "C5H8O2", 1.19, ["acrylic glass"]),
  known("quartz", "Quartz", "SiO2", 2.65),
  known("silica-fused", "Fused silica", "SiO2", 2.2),
];
const finder = materialFinder(HANDBOOK, () => [HANDBOOK[0]!]);
const tables = committedTables();
const ask = (fields: Partial<Question>) => viewOf(answerQuestion({ ...DEFAULT_QUESTION, ...fields }, tables, finder));

describe("the address", () => {
  it("gives the question back", () => {
    const question: Question = {
      ...DEFAULT_QUESTION,
      material: "quartz",
      energy: "0.62 Å",
      with: "water\nGlass; SiO2; 2.2",
      table: "chantler95",
      curve: "ratio",
    };
    expect(readQuestion(new URLSearchParams(writeQuestion(question).toString()))).toEqual(question);
    const recipe: Question = { ...DEFAULT_QUESTION, parts: "95; water\n5; KI; 3.12", by: "volume" };
    expect(readQuestion(writeQuestion(recipe))).toEqual(recipe);
  });

  it("holds only what differs from the defaults, and reads anything", () => {
    expect(writeQuestion(DEFAULT_QUESTION).toString()).toBe("material=pmma");
    expect(readQuestion(new URLSearchParams("table=best&curve=x&by=y&foo=bar&energy="))).toEqual({
      ...DEFAULT_QUESTION,
      energy: "",
    });
    expect(readQuestion(new URLSearchParams({ with: "x".repeat(9000) })).with.length).toBe(4000);
  });
});

describe("materials", () => {
  it("are found by id, name and other name, whatever their case", () => {
    for (const words of ["pmma", "PMMA", "Acrylic Glass"]) expect(ask({ material: words }).main?.label).toBe("PMMA");
  });

  it("keep their name with another density", () => {
    expect(ask({ material: "pmma", density: "1180 kg/m3" }).main).toMatchObject({
      label: "PMMA",
      densityGCm3: 1.18,
      formula: "C5H8O2",
    });
  });

  it("as a formula ask for the density, and offer the handbook's", () => {
    const [fault] = ask({ material: "SiO2" }).faults;
    expect(fault).toMatchObject({ field: "density" });
    expect(fault?.suggestions.map(({ text }) => text)).toEqual(["2.65 g/cm3", "2.2 g/cm3"]);
    expect(ask({ material: "SiO2", density: "2.65" }).main?.formula).toBe("SiO2");
  });

  it("offers the whole formula mended, not the symbol alone", () => {
    expect(ask({ material: "Hx2O" }).faults[0]!.suggestions.map(({ text }) => text)).toEqual(["He2O", "Hg2O"]);
    expect(ask({ material: "h2o" }).faults[0]!.suggestions.map(({ text }) => text)).toContain("H2O");
  });

  it("that nothing is called so offer what is near; what looks like a formula is judged as one", () => {
    expect(ask({ material: "watr" }).faults[0]).toMatchObject({
      field: "material",
      suggestions: [{ text: "water", words: "Water" }],
    });
    expect(ask({ material: "Hx2O" }).faults[0]?.message).toBe("Unknown element 'Hx' at 1; did you mean He or Hg?");
  });

  it("leave the other answers standing where one field is wrong", () => {
    const view = ask({ energy: "2,7", list: "8, 12 keV" });
    expect(view.faults.map(({ field }) => field)).toEqual(["energy"]);
    expect(view.list).toHaveLength(2);
    expect(view.main?.row).toBeNull();
  });

  it("outside the table name the bounds and offer the nearest energy", () => {
    expect(ask({ energy: "500 keV" }).faults[0]).toMatchObject({ field: "energy", suggestions: [{ text: "450 keV" }] });
  });
});

describe("recipes", () => {
  const read = (words: string, density: string) => ({
    formula: words,
    ...(density === "" ? {} : { densityGCm3: Number(density) }),
  });
  const TEXT = "91.5; H2O\n2; C6H10O5\n5; Buffer; 2.2\n- 82; NaCl\n- 18; K2HPO4";

  it("nest by dashes, and are written back as they were", () => {
    expect(writeRecipe(readRecipe(TEXT))).toBe(TEXT);
    const { statement, scaledFromPercent } = recipeStatement(TEXT, "mass", undefined, read);
    expect(scaledFromPercent).toBeCloseTo(98.5, 10);
    expect(statement).toMatchObject({
      basis: "mass",
      components: [
        { formula: "H2O" },
        {},
        { densityGCm3: 2.2, components: [{ formula: "NaCl", fraction: 0.82 }, { fraction: 0.18 }] },
      ],
    });
  });

  it.each([
    ["60; H2O\n50; NaCl", 0, /110 %/],
    ["x; H2O", 0, /not a number/],
    ["1,5; H2O", 0, /1\.5/],
    ["50; H2O\n--50; NaCl", 1, /dash/],
    ["50;", 0, /names no material/],
    ["0; H2O", 0, /All shares are 0/],
    ["", 0, /no parts/],
  ])("refuse %j in line %d", (text, line, message) => {
    try {
      recipeStatement(text, "mass", undefined, read);
      expect.unreachable();
    } catch (error) {
      expect(error).toBeInstanceOf(RecipeError);
      expect((error as RecipeError).line).toBe(line);
      expect((error as RecipeError).message).toMatch(message);
    }
  });

  it("by concentration have one solvent, without a number", () => {
    expect(recipeStatement("; H2O\n50; KI", "concentration", 1.036, read).statement).toEqual({
      solvent: { formula: "H2O" },
      solutes: [{ formula: "KI", mgPerMl: 50 }],
      densityGCm3: 1.036,
    });
    for (const text of ["50; KI", "; H2O", "; H2O\n; NaCl\n5; KI"])
      expect(() => recipeStatement(text, "concentration", undefined, read)).toThrow(RecipeError);
  });

  it("answer with the composition, and say what was scaled or estimated", () => {
    const view = ask({ parts: "90; water\n5; KI; 3.12", by: "mass" });
    expect(view.main).toMatchObject({ scaledFromPercent: 95, densityEstimated: true });
    expect(view.main?.row?.notes).toContain("densityEstimated");
  });
});

describe("further materials", () => {
  it("stand beside the main one; the first makes a pair with it", () => {
    const view = ask({ with: "water\nGlass bead; SiO2; 2.2" });
    expect(view.others.map(({ label }) => label)).toEqual(["Water", "Glass bead"]);
    expect(view.pair?.gamma).toAgreeWithin(-1406, 0.01);
    expect(view.pairCurve?.energiesKeV.length).toBeGreaterThan(200);
  });

  it("are at most seven, and a bad line says so without hiding the others", () => {
    expect(ask({ with: Array(8).fill("water").join("\n") }).faults[0]).toMatchObject({ field: "with" });
    const view = ask({ with: "water\nxyzzy" });
    expect(view.others).toHaveLength(1);
    expect(view.faults[0]).toMatchObject({ field: "with" });
  });
});

describe("curves", () => {
  it("sample both sides of every edge and never cross one", () => {
    const view = ask({ material: "AgCl", density: "5.56", from: "20 keV", to: "30 keV" });
    const { energiesKeV, beta } = view.main!.curve;
    const k = view.edges.find(({ shell }) => shell === "K")!;
    const above = energiesKeV.indexOf(k.energyKeV);
    expect(above).toBeGreaterThan(0);
    expect(energiesKeV[above]! / energiesKeV[above - 1]! - 1).toBeLessThan(1e-8);
    expect(beta[above]! / beta[above - 1]!).toBeGreaterThan(3);
  });
});

describe("files", () => {
  it("carry material, citation and numbers a spreadsheet keeps as numbers", () => {
    const question = { ...DEFAULT_QUESTION, list: "10, 20 keV" };
    const csv = valuesCsv(ask({ list: "10, 20 keV" }), question).split("\r\n");
    expect(csv[0]).toBe("# PMMA, 1.19 g/cm3");
    expect(csv[1]).toMatch(/^# Rimelight tables \d+\.\d+\.\d+; values from EPDL97 .*; \d{4}-\d{2}-\d{2}$/);
    expect(csv[2]?.split(",")[0]).toBe("energyKeV");
    const row = csv[4]!.split(",");
    expect(Number(row[0])).toBe(20);
    expect(Number(row[csv[2]!.split(",").indexOf("delta")])).toAgreeWithin(6.6654e-7, 0.003);
  });

  it("hold every point of the drawn curves, and no cell that a spreadsheet would run", () => {
    const question = { ...DEFAULT_QUESTION, with: "=HYPERLINK(1); SiO2; 2.2" };
    const csv = curvesCsv(ask({ with: question.with }), question);
    expect(csv.split("\r\n").length).toBeGreaterThan(4 * 240);
    expect(csv).toContain("'=HYPERLINK(1)");
    expect(csv).not.toMatch(/(^|,)=/m);
  });
});
