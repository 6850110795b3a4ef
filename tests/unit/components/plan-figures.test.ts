import { createElement, type FunctionComponent } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { BeamDetails } from "#src/components/features/plan-figures/BeamDetails.tsx";
import { BeamDrawing } from "#src/components/features/plan-figures/BeamDrawing.tsx";
import { BeamLine } from "#src/components/features/plan-figures/BeamLine.tsx";
import { type BeamProps, beamSpread, sampleText, slabsAlong } from "#src/components/features/plan-figures/beam.ts";
import { DoseRuler } from "#src/components/features/plan-figures/DoseRuler.tsx";
import { hatchPath } from "#src/components/features/plan-figures/drawing.ts";
import { axisRange, axisTicks } from "#src/components/features/plan-figures/log-axis.ts";
import { firstFree, overlap, place, type Row, type Wish } from "#src/components/features/plan-figures/place.ts";
import { layRuler } from "#src/components/features/plan-figures/ruler-layout.ts";
import type { RulerProps } from "#src/components/features/plan-figures/ruler.ts";
import { picksText } from "#src/components/features/plan-figures/ruler-words.ts";
import { SameScalePair } from "#src/components/features/plan-figures/SameScalePair.tsx";
import { textWidth, wrapWords } from "#src/components/features/plan-figures/text-width.ts";

const WIDTHS = [340, 358, 760, 1168];

function draw<P extends object>(figure: FunctionComponent<P>, props: P): string {
  const markup = renderToStaticMarkup(createElement(figure, props));
  expect(markup).not.toMatch(/NaN|Infinity|undefined|null/);
  // Longer decimals in the markup could differ between engines.
  expect(markup.match(/(?:\b(?:d|x|y|x1|x2|cx|cy|r|width|height|transform)="[^"]*?\d\.\d{2,})/g)).toBeNull();
  expect(markup.match(/<svg[^>]* role="img" aria-label="[^"]{20,}"/g)?.length).toBe(markup.match(/<svg/g)?.length);
  expect([...markup.matchAll(/ (?:width|height)="(-[^"]*)"/g)]).toEqual([]);
  return markup;
}

const label = (markup: string): string => /aria-label="([^"]*)"/.exec(markup)?.[1] ?? "";
const count = (markup: string, pattern: RegExp): number => markup.match(pattern)?.length ?? 0;

describe("place", () => {
  /** Deterministic, so that a failure can be found again. */
  function random(seed: number): () => number {
    let state = seed;
    return () => (state = (state * 16807) % 2147483647) / 2147483647;
  }
  function check(wishes: readonly Wish[], row: Row): (number | null)[] {
    const placed = place(wishes, row);
    const kept = wishes.flatMap(({ at, width }, index) => {
      const middle = placed[index] ?? null;
      return middle === null ? [] : [{ at, from: middle - width / 2, to: middle + width / 2 }];
    });
    kept.sort((a, b) => a.from - b.from);
    for (const [index, { at, from, to }] of kept.entries()) {
      expect(from).toBeGreaterThan(row.left - 1e-6);
      expect(to).toBeLessThan(row.right + 1e-6);
      expect(Math.abs((from + to) / 2 - at)).toBeLessThanOrEqual(row.slack ?? Infinity);
      const next = kept[index + 1];
      if (!next) continue;
      expect(next.from - to).toBeGreaterThan(row.gap - 1e-6);
      expect(next.at).toBeGreaterThanOrEqual(at);
    }
    return placed;
  }

  test("leaves alone what has room, and moves two that clash by half of what they lack each", () => {
    const row = { left: 0, right: 200, gap: 10 };
    expect(place([{ at: 50, width: 20 }, { at: 150, width: 20 }], row)).toEqual([50, 150]); // prettier-ignore
    expect(place([{ at: 100, width: 30 }, { at: 110, width: 30 }], row)).toEqual([85, 125]); // prettier-ignore
  });

  test("keeps inside the row and passes on what an end pushes", () => {
    expect(place([{ at: 0, width: 20 }, { at: 12, width: 20 }], { left: 0, right: 100, gap: 5 })).toEqual([10, 35]); // prettier-ignore
    expect(place([{ at: 100, width: 20 }], { left: 0, right: 100, gap: 5 })).toEqual([90]);
  });

  test("leaves out the lightest, then the last, where not all fit", () => {
    const row = { left: 0, right: 60, gap: 0 };
    const wishes = [10, 20, 30, 40].map((at, index) => ({ at, width: 20, weight: index === 3 ? 1 : 0 }));
    expect(place(wishes, row)).toEqual([10, 30, null, 50]);
    expect(place([{ at: 30, width: 61 }], row)).toEqual([null]);
    expect(place([{ at: NaN, width: 5 }], row)).toEqual([null]);
    expect(place([], row)).toEqual([]);
  });

  test("a text that would stray too far goes, and its neighbours come back", () => {
    const wishes = [
      { at: 50, width: 20, weight: 1 },
      { at: 60, width: 20 },
      { at: 150, width: 20 },
    ];
    expect(place(wishes, { left: 0, right: 200, gap: 4, slack: 2 })).toEqual([50, null, 150]);
  });

  test("never overlaps, whatever is asked of it", () => {
    const next = random(7);
    for (let round = 0; round < 300; round++) {
      const wishes = Array.from({ length: Math.floor(next() * 14) }, () => ({
        at: next() * 420 - 10,
        width: next() * 80,
        weight: Math.floor(next() * 3),
      }));
      check(wishes, { left: 0, right: 400, gap: next() * 12, ...(next() > 0.5 ? { slack: next() * 30 } : {}) });
    }
  });

  test("takes the first free spot", () => {
    const box = (x: number): { x: number; y: number; width: number; height: number } => ({ x, y: 0, width: 10, height: 10 }); // prettier-ignore
    const area = { x: 0, y: 0, width: 100, height: 20 };
    expect(firstFree([box(-1), box(5), box(40)], area, [box(0)])).toEqual(box(40));
    expect(firstFree([box(95)], area, [])).toBeNull();
    expect(overlap(box(0), box(10))).toBe(false);
    expect(overlap(box(0), box(9.9))).toBe(true);
  });
});

describe("the ruler", () => {
  const ruler: RulerProps = {
    label: "Dose, Gy",
    unit: "Gy",
    phase: [0.31, 0.34, 0.4, 0.49, 0.81].map((value, index) => ({ id: String(index + 1), value })),
    absorption: [{ id: "6", value: 41 }],
    limit: { value: 10, words: "your limit 10\u00a0Gy" },
    ratioWords: "132\u00a0× less dose",
    interval: [0.29, 0.33],
    width: 1168,
  };

  test("says everything in words, and draws every mark", () => {
    for (const width of WIDTHS) {
      const markup = draw(DoseRuler, { ...ruler, width });
      expect(label(markup)).toBe(
        "Dose ruler, 0.2 to 50\u00a0Gy, log scale. Phase: pick 1 0.31\u00a0Gy, pick 2 0.34\u00a0Gy, pick 3 0.4\u00a0Gy, " +
          "pick 4 0.49\u00a0Gy, pick 5 0.81\u00a0Gy. Absorption: pick 6 41\u00a0Gy. Uncertainty 0.29 to 0.33\u00a0Gy. " +
          "Limit: your limit 10\u00a0Gy. 132\u00a0× less dose.",
      );
      expect(count(markup, /fig-ring/g)).toBe(10);
      expect(count(markup, /dot-absorption/g)).toBe(1);
      for (const words of ["132\u00a0× less dose", "your limit 10\u00a0Gy", "picks 2 to 5"]) {
        expect(markup).toContain(`>${words}</text>`);
      }
    }
  });

  test("labels 1, 2 and 5 up to three decades, beyond them decades alone", () => {
    const labels = (range: [number, number], px: number): string[] =>
      axisTicks(range, px).flatMap(({ label: text }) => text ?? []);
    expect(labels([0.1, 10], 400)).toEqual(["0.1", "0.2", "0.5", "1", "2", "5", "10"]);
    expect(labels([0.1, 1000], 400)).toEqual(["0.1", "1", "10", "100", "1\u202f000"]);
    expect(labels([1e-6, 1e6], 20)).toEqual(["10⁻⁶", "0.001", "1", "1\u202f000", "10⁶"]);
    expect(axisTicks([1, 10], 400).filter(({ label: text }) => text === null)).toHaveLength(6);
  });

  test("the axis holds every mark, and a limit only where that is near", () => {
    for (const values of [[5], [5, 5, 5], [1e-6, 1e6], [1e-12, 1], [3e-300, 4e300]]) {
      const [low, high] = axisRange(values, null, null);
      expect(low).toBeLessThan(Math.min(...values));
      expect(high).toBeGreaterThan(Math.max(...values));
      expect(high / low).toBeGreaterThanOrEqual(10);
    }
    expect(axisRange([1, 2], 50, null)[1]).toBeGreaterThan(50);
    expect(axisRange([1, 2], 1e5, null)[1]).toBeLessThan(100);
    expect(axisRange([1, 2], null, [0, Infinity])).toEqual(axisRange([1, 2], null, null));
    expect(axisRange([], null, null)).toEqual([0.1, 10]);
  });

  test("a limit off the axis is an arrow; below it the whole axis is hatched", () => {
    const above = draw(DoseRuler, { ...ruler, limit: { value: 1e6, words: "your limit" } });
    expect(above).toContain(">your limit →</text>");
    expect(label(above)).toContain("Limit: your limit, above the axis");
    expect(above).not.toMatch(/rim-dark|fig-hatch/);
    const below = draw(DoseRuler, { ...ruler, limit: { value: 1e-6, words: "your limit" } });
    expect(below).toContain(">← your limit</text>");
    expect(below).toContain("fig-hatch");
    expect(below).not.toContain("rim-dark");
  });

  test("an interval that leaves the axis ends in an arrow", () => {
    const ends = (interval: [number, number]): string =>
      draw(DoseRuler, { ...ruler, interval })
        .split("fig-bar-phase")[1]
        ?.split("</g>")[0] ?? "";
    // Both ends as ticks are two vertical strokes; each arrow is two slanted ones instead.
    expect(count(ends([0.29, 0.33]), /V/g)).toBe(2);
    expect(count(ends([0.001, 0.33]), /V/g)).toBe(1);
    expect(count(ends([0, Infinity]), /V/g)).toBe(0);
  });

  test("words of the bracket stand in it where they fit, else outside, and never on the limit's words", () => {
    for (const width of WIDTHS) {
      for (const ratio of [1, 1.2, 2, 5, 20, 132, 1e4, 1e12]) {
        for (const limit of [null, 0.01, 0.3, 1, 4, 10, 1e9]) {
          const layout = layRuler({
            ...ruler,
            absorption: [{ id: "6", value: 0.31 * ratio }],
            limit: limit === null ? null : { value: limit, words: "your limit 10\u00a0Gy" },
            width,
          });
          const { bracket, limitWords } = layout;
          const box = bracket?.box;
          expect(box).toBeTruthy();
          if (!box || !bracket) continue;
          expect(box.x).toBeGreaterThanOrEqual(0);
          expect(box.x + box.width).toBeLessThanOrEqual(width);
          const [low, high] = [Math.min(bracket.from, bracket.to), Math.max(bracket.from, bracket.to)];
          if (bracket.gap) expect(box.x > low && box.x + box.width < high).toBe(true);
          else if (box.y > 15) expect(box.x >= high || box.x + box.width <= low).toBe(true);
          if (limitWords) {
            const said = { x: limitWords.x, y: limitWords.y - 12, width: textWidth(limitWords.text, 13), height: 15 };
            expect(overlap(box, said)).toBe(false);
          }
        }
      }
    }
  });

  test("one value, equal values, one side, twelve decades, nothing", () => {
    const mark = (id: string, value: number): { id: string; value: number } => ({ id, value });
    for (const width of WIDTHS) {
      const base = { ...ruler, width, interval: undefined };
      draw(DoseRuler, { ...base, phase: [mark("1", 5)], absorption: [], limit: null });
      draw(DoseRuler, { ...base, phase: [mark("1", 5), mark("2", 5)], absorption: [mark("3", 5)] });
      draw(DoseRuler, { ...base, phase: [], absorption: [mark("1", 5)], interval: [4, 6] });
      draw(DoseRuler, { ...base, phase: [mark("1", 1e-6)], absorption: [mark("2", 1e6), mark("3", 1e7)] });
      draw(DoseRuler, {
        ...base,
        phase: [mark("1", 5)],
        absorption: [mark("2", 4)],
        limit: { value: 5, words: "limit" },
      });
      draw(DoseRuler, { ...base, phase: [], absorption: [] });
    }
  });

  test("the interval belongs to absorption where that is said", () => {
    const markup = draw(DoseRuler, { ...ruler, interval: [38, 44], intervalOf: "absorption" });
    expect(markup).toContain("fig-bar-absorption");
    expect(markup).not.toContain("fig-bar-phase");
  });

  test("small rings are named together, or each by its own words", () => {
    expect(picksText(["2"])).toBe("pick 2");
    expect(picksText(["2", "3", "4"])).toBe("picks 2 to 4");
    expect(picksText(["2", "4", "A"])).toBe("picks 2, 4, A");
    const phase = [ruler.phase[0]!, { id: "A", value: 2, words: "your point" }];
    expect(draw(DoseRuler, { ...ruler, phase })).toContain(">your point</text>");
  });
});

describe("the pair", () => {
  const positionsUm = Array.from({ length: 81 }, (_, index) => index - 40);
  const wave = (height: number) => ({ positionsUm, contrast: positionsUm.map((at) => height * Math.cos(at / 7)) });
  const pair = {
    fringe: wave(0.05),
    shadow: wave(-0.004),
    fringeWords: "fringe 5.0\u00a0%",
    shadowWords: "shadow 0.40\u00a0%",
    sizeUm: 20,
    width: 378,
  };
  /** How far up and down the path of a class goes, px. */
  function reach(markup: string, className: string): number {
    const path = markup.split(`class="${className}" d="`)[1]?.split('"')[0] ?? "";
    const ys = [...path.matchAll(/,(-?[\d.]+)/g)].map(([, y]) => Number(y));
    return Math.max(...ys) - Math.min(...ys);
  }

  test("both profiles stand at one scale", () => {
    const markup = draw(SameScalePair, pair);
    expect(reach(markup, "curve-phase")).toBeGreaterThan(60);
    expect(reach(markup, "curve-phase") / reach(markup, "curve-absorption")).toBeCloseTo(12.5, 0);
    expect(markup).toContain("Both at one vertical scale, without noise.");
    expect(label(markup)).toContain("fringe 5.0\u00a0%: from −5\u00a0% to 5\u00a0%");
    expect(count(markup, />20\u00a0µm</g)).toBe(2);
  });

  test("flat, missing, empty, broken profiles and a size wider than the panel", () => {
    const flat = { positionsUm, contrast: positionsUm.map(() => 0) };
    for (const width of [280, 340, 378]) {
      draw(SameScalePair, { ...pair, fringe: flat, shadow: flat, width });
      draw(SameScalePair, { ...pair, fringe: null, shadow: null, width });
      draw(SameScalePair, { ...pair, fringe: { positionsUm: [], contrast: [] }, width });
      draw(SameScalePair, { ...pair, fringe: { positionsUm: [0], contrast: [0.1] }, shadow: null, width });
      draw(SameScalePair, { ...pair, shadow: { positionsUm, contrast: [NaN, Infinity] }, width });
      expect(draw(SameScalePair, { ...pair, sizeUm: 5000, width })).toContain(">10\u00a0µm<");
    }
    expect(draw(SameScalePair, { ...pair, fringe: null })).toContain("not computed");
  });
});

describe("the beam", () => {
  const beam: BeamProps = {
    sourceDistanceM: 41,
    sourceFwhmUm: 36,
    layers: [
      { position: "before", thicknessMm: 1, label: "polypropylene" },
      { position: "after", thicknessMm: 1, label: "polypropylene" },
    ],
    host: { thicknessMm: 5, label: "water" },
    feature: { shape: "fibre", sizeUm: 20, widthUm: null, label: "PMMA fibre" },
    distanceM: 0.9,
    distanceWords: "0.90\u00a0m",
    technique: "phase",
    pixelUm: 1.3,
    blurUm: 2.1,
    width: 1168,
  };
  const both = (props: BeamProps): string => draw(BeamLine, props) + draw(BeamDrawing, props);

  test("is told in the order of the beam", () => {
    expect(label(draw(BeamDrawing, beam))).toBe(
      "The beam, sample to scale along it: source 36\u00a0µm wide at 41\u00a0m; sample of 1\u00a0mm polypropylene, " +
        "5\u00a0mm water, 1\u00a0mm polypropylene; in it PMMA fibre, 20\u00a0µm; detector: 0.90\u00a0m, phase contrast, " +
        "1.3\u00a0µm pixels, 2.1\u00a0µm blur.",
    );
    expect(sampleText(beam)).toBe("2 × 1\u00a0mm polypropylene, 5\u00a0mm water");
    expect(sampleText({ ...beam, layers: [] })).toBe("5\u00a0mm water");
  });

  test("the sample is to scale, before and after in order", () => {
    const slabs = slabsAlong(
      { ...beam, layers: [...beam.layers, { position: "before", thicknessMm: 3, label: "b" }] },
      0,
      100,
    );
    expect(slabs.map(({ label: name, x, width }) => [name, x, width])).toEqual([
      ["polypropylene", 0, 10],
      ["b", 10, 30],
      ["water", 40, 50],
      ["polypropylene", 90, 10],
    ]);
  });

  test("a layer too thin to be seen is drawn and led to", () => {
    const layers = [{ position: "before", thicknessMm: 1e-6, label: "gold" }] as const;
    const markup = draw(BeamDrawing, { ...beam, layers });
    expect(markup).toContain('class="fig-solid" x="361.3" y="10" width="1.5"');
    expect(markup).toContain(">1\u00a0nm</text>");
    expect(count(markup, /fig-open/g)).toBe(2);
  });

  test("from no layer to ten, from a nanometre to ten metres, at every width", () => {
    const thicknesses = [1e-6, 1, 0.01, 300, 1e4, 5, 0.5, 2, 0.025, 1];
    for (const width of [280, ...WIDTHS]) {
      for (const count_ of [0, 1, 5, 10]) {
        const layers = thicknesses.slice(0, count_).map((thicknessMm, index) => ({
          position: index % 2 === 0 ? ("before" as const) : ("after" as const),
          thicknessMm,
          label: `layer ${index}`,
        }));
        for (const shape of ["sphere", "fibre", "layer"] as const) {
          const feature = { shape, sizeUm: 20, widthUm: shape === "layer" ? 300 : null, label: "feature" };
          for (const distanceM of [null, 0, 0.001, 12]) {
            both({ ...beam, layers, feature, distanceM, width });
            both({ ...beam, layers, feature, distanceM, sourceDistanceM: null, technique: "absorption", width });
          }
        }
      }
      for (const sizeUm of [0.001, 5000, 1e6]) {
        for (const shape of ["sphere", "layer"] as const) {
          both({ ...beam, feature: { shape, sizeUm, widthUm: shape === "layer" ? 0.001 : null, label: "f" }, width });
        }
      }
    }
  });

  test("a cone widens as the geometry does; a parallel beam does not, and says so", () => {
    const near = beamSpread({ ...beam, sourceDistanceM: 0.1, distanceM: 0.3 }, 40);
    expect(near.detector / near.sample).toBeCloseTo(4, 9);
    expect(near.detector).toBeLessThanOrEqual(40);
    const parallel = beamSpread({ ...beam, sourceDistanceM: null }, 40);
    expect(parallel.detector).toBe(parallel.sample);
    const markup = both({ ...beam, sourceDistanceM: null });
    expect(count(markup, />parallel</g)).toBe(2);
    expect(label(markup)).toContain("a parallel beam");
  });

  test("phase goes double, absorption solid, nothing chosen dotted; contact has its words beside", () => {
    expect(both(beam)).toContain("fig-way-phase");
    expect(both({ ...beam, technique: "absorption" })).toContain("curve-absorption");
    const open = both({ ...beam, distanceM: null, distanceWords: "up to 3\u00a0m" });
    expect(open).toContain("edge-line");
    expect(open).not.toMatch(/fig-way-phase|curve-absorption/);
    const contact = draw(BeamDrawing, { ...beam, distanceM: 0, distanceWords: "in contact" });
    expect(contact).toContain(">in contact</text>");
  });

  test("opens without scripts: the line is the summary, the drawing stands inside", () => {
    const { width: _, ...rest } = beam;
    const markup = draw(BeamDetails, rest);
    const [summary = "", inside = ""] = markup.split("</summary>");
    expect(summary).toMatch(/^<details class="draw"><summary[ >]/);
    expect(summary).toContain("Draw it larger");
    expect(summary).toContain("Close the drawing");
    expect(summary).toContain('height="34"');
    expect(inside).toContain('height="140"');
    expect(inside).toContain('height="176"');
    expect(draw(BeamDetails, { ...rest, open: true })).toMatch(/^<details class="draw" open="">/);
  });
});

test("words wrap at plain spaces only, and hatch lines stay in their box", () => {
  expect(wrapWords("fringe 5.9\u00a0% at\u00a024.0\u00a0keV", 90, 13, "bold")).toEqual([
    "fringe 5.9\u00a0%",
    "at\u00a024.0\u00a0keV",
  ]);
  expect(wrapWords("word", 1, 13)).toEqual(["word"]);
  const points = [...hatchPath({ x: 100, y: 40, width: 33, height: 20 }).matchAll(/[ML]([\d.]+) ([\d.]+)/g)];
  expect(points.length).toBeGreaterThan(8);
  for (const [, x, y] of points) {
    expect(Number(x) >= 100 && Number(x) <= 133 && Number(y) >= 40 && Number(y) <= 60).toBe(true);
  }
  expect(hatchPath({ x: 0, y: 0, width: 0, height: 10 })).toBe("");
});
