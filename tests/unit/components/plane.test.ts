import { createElement } from "react";
import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { bandAreas } from "#src/components/features/plane/areas.ts";
import { niceBands, shadeOf } from "#src/components/features/plane/bands.ts";
import { ContactStrip } from "#src/components/features/plane/ContactStrip.tsx";
import { contourOf, interpolation, patchesOf, simplified } from "#src/components/features/plane/contours.ts";
import { pointAt, stepBy } from "#src/components/features/plane/keys.ts";
import { mapLayout, stripsLayout } from "#src/components/features/plane/layout.ts";
import { PlaneKey } from "#src/components/features/plane/PlaneKey.tsx";
import { PlaneMap } from "#src/components/features/plane/PlaneMap.tsx";
import { PlaneStrips } from "#src/components/features/plane/PlaneStrips.tsx";
import { chosenRows, PlaneTable } from "#src/components/features/plane/PlaneTable.tsx";
import { cellRuns, layoutRuns } from "#src/components/features/plane/regions.ts";
import type { PlaneData } from "#src/components/features/plane/types.ts";
import { crossText, forbiddenNotes, rimNote } from "#src/components/features/plane/words.ts";

const grid = <T>(width: number, height: number, at: (i: number, j: number) => T): T[][] =>
  Array.from({ length: width }, (_, i) => Array.from({ length: height }, (__, j) => at(i, j)));

/** Ten energies in uneven steps, six distances; dose falls from 10 to 1 Gy with distance. */
function plane(change: Partial<PlaneData> = {}): PlaneData {
  const energiesKeV = change.energiesKeV ?? [10, 11, 13, 16, 20, 20.2, 24, 28, 33, 40];
  const distancesM = change.distancesM ?? [0.01, 0.03, 0.1, 0.2, 0.5, 1];
  const [width, height] = [energiesKeV.length, distancesM.length];
  const values = change.values ?? grid(width, height, (_, j) => 10 ** (1 - j / Math.max(1, height - 1)));
  return {
    energiesKeV,
    distancesM,
    values,
    forbidden: grid(width, height, () => null),
    bands: niceBands(values),
    quantity: { label: "Dose needed", unit: "Gy", format: (value) => `${Number(value.toPrecision(3))} Gy` },
    edges: [],
    equal: null,
    picks: [
      { id: "1", technique: "phase", energyKeV: 20, distanceM: 0.5, words: "20 keV, 0.5 m" },
      { id: "2", technique: "absorption", energyKeV: 13, distanceM: 0.01, words: "13 keV, in contact" },
    ],
    chosen: "1",
    cross: { i: 4, j: 4 },
    ...change,
  };
}

describe("thresholds between bands", () => {
  const of = (...values: (number | null)[]): number[] => niceBands([values]);
  test("go 1, 2, 5 strictly between the smallest and the largest value", () => {
    expect(of(0.31, 4, 41)).toEqual([0.5, 1, 2, 5, 10, 20]);
    expect(of(1, 3, 10)).toEqual([2, 5]);
  });
  test("are seven at most, next to the wanted end", () => {
    expect(of(0.31, 4, 400)).toEqual([0.5, 1, 2, 5, 10, 20, 50]);
    expect(niceBands([[0.31, 30, 400]], "more")).toEqual([2, 5, 10, 20, 50, 100, 200]);
  });
  test("are decades where the finer ones would leave most of the plane in one band", () => {
    expect(of(0.31, 3e5, 4e5, 1e6)).toEqual([1, 10, 100, 1000, 1e4, 1e5]);
  });
  test("are even steps where values differ little or are not all positive", () => {
    expect(of(0.62, 0.7, 0.91)).toEqual([0.65, 0.7, 0.75, 0.8, 0.85, 0.9]);
    expect(of(-1, 1)).toEqual([-0.5, 0, 0.5]);
  });
  test("are none without two different values", () => {
    expect(of()).toEqual([]);
    expect(of(null, null)).toEqual([]);
    expect(of(3, 3, null)).toEqual([]);
  });
  test("shade the wanted end strongest, the other nearest the ground", () => {
    expect([0, 1, 2, 3].map((band) => shadeOf(band, 3))).toEqual([7, 5, 2, 0]);
    expect([0, 1, 2, 3].map((band) => shadeOf(band, 3, "more"))).toEqual([0, 2, 5, 7]);
    expect([0, 1, 2, 3, 4, 5, 6, 7].map((band) => shadeOf(band, 7))).toEqual([7, 6, 5, 4, 3, 2, 1, 0]);
  });
});

describe("contours on uneven axes", () => {
  test("lie where the interpolated value is", () => {
    // Value = x of the column: 0, 10, 40, 50 px. The line of 25 stands at x = 25, that of 4 at x = 4.
    const patch = { xs: [0, 10, 40, 50], ys: [0, 100, 130], values: [0, 1, 2].flatMap(() => [0, 10, 40, 50]) };
    for (const threshold of [4, 25, 48]) {
      const { lines } = contourOf(patch, threshold);
      expect(lines).toHaveLength(1);
      for (const [x] of lines[0]!) expect(x).toBeCloseTo(threshold, 9);
      const ys = lines[0]!.map(([, y]) => y);
      expect([Math.min(...ys), Math.max(...ys)]).toEqual([0, 130]);
    }
  });
  test("take the logarithm of positive values, on the log axis of distance", () => {
    const data = plane({ distancesM: [0.01, 0.02, 1], values: grid(10, 3, (_, j) => [100, 50, 1][j]!) });
    const layout = mapLayout(data, 500);
    const of = interpolation(data.values);
    const [patch] = patchesOf(data.values, layout, of);
    const [line] = contourOf(patch!, of(10)).lines;
    // Value is 1 / distance: 10 stands at 0.1 m.
    for (const [, y] of line!) expect(y).toBeCloseTo(layout.y.place(0.1), 9);
  });
  test("close round a peak, without the plane's border", () => {
    const patch = { xs: [0, 1, 5], ys: [0, 3, 4], values: [0, 0, 0, 0, 8, 0, 0, 0, 0] };
    const { lines, rings } = contourOf(patch, 4);
    expect(rings).toHaveLength(1);
    expect(lines).toHaveLength(1);
    const xs = lines[0]!.map(([x]) => x);
    expect([Math.min(...xs), Math.max(...xs)]).toEqual([0.5, 3]);
    expect(contourOf(patch, -1).lines).toEqual([]);
  });
  test("never cross an edge: each side runs to it on its own values", () => {
    const edges = [{ name: "I K", energyKeV: 20.1 }];
    const data = plane({ edges, values: grid(10, 6, (i) => (i <= 4 ? 1 : 100)) });
    const layout = mapLayout(data, 500);
    const patches = patchesOf(data.values, layout, Math.log10);
    expect(patches).toHaveLength(2);
    const edge = layout.x.place(20.1);
    expect(patches[0]!.xs.at(-1)).toBe(edge);
    expect(patches[1]!.xs[0]).toBe(edge);
    expect(patches.map((patch) => contourOf(patch, 1).lines.length)).toEqual([0, 0]);
  });
  test("reach the border of the last cell with a value", () => {
    const values = grid(10, 6, (_, j) => (j === 0 ? null : 5));
    const [patch] = patchesOf(values, mapLayout(plane({ values }), 500), Math.log10);
    expect(patch!.values.every(Number.isFinite)).toBe(true);
  });
  test("drop points that a straight line does without", () => {
    const line = Array.from({ length: 50 }, (_, k): [number, number] => [k, k < 25 ? 0 : k - 25]);
    expect(simplified(line)).toEqual([
      [0, 0],
      [25, 0],
      [49, 24],
    ]);
  });
  test("give one area a band, the lowest first", () => {
    const data = plane();
    const areas = bandAreas(data.values, data.bands, mapLayout(data, 500));
    expect(areas.map(({ text }) => text)).toEqual(["", "2", "5"]);
    expect(areas.map(({ shade }) => shade)).toEqual([7, 4, 0]);
  });
});

describe("hatched cells", () => {
  test("merge into the fewest runs over distance, and over energy where runs are equal", () => {
    const codes = [
      ["a", "a", null, "b"],
      ["a", "a", null, "b"],
      ["a", "a", "a", null],
    ];
    expect(cellRuns(codes)).toEqual([
      { code: "a", i0: 0, i1: 1, j0: 0, j1: 1 },
      { code: "b", i0: 0, i1: 1, j0: 3, j1: 3 },
      { code: "a", i0: 2, i1: 2, j0: 0, j1: 2 },
    ]);
    expect(cellRuns([[null], [null]])).toEqual([]);
    expect(cellRuns(grid(30, 20, () => "x"))).toHaveLength(1);
  });
  test("never run over the gap between strips", () => {
    const data = plane({ energiesKeV: [10, 20, 30] });
    expect(
      layoutRuns(
        grid(3, 6, () => "overDose"),
        stripsLayout(data, 500),
      ),
    ).toHaveLength(3);
    expect(
      layoutRuns(
        grid(3, 6, () => "overDose"),
        mapLayout(data, 500),
      ),
    ).toHaveLength(1);
  });
  test("give their reasons in words, each once", () => {
    const forbidden = grid(10, 6, (i, j) => (j === 0 ? "insideSample" : i === 9 ? "overTime" : null));
    expect(forbiddenNotes({ forbidden })).toEqual([
      "The detector would stand inside the sample",
      "Over the time limit",
    ]);
    expect(forbiddenNotes({ forbidden: grid(2, 2, () => null) })).toEqual([]);
    expect(forbiddenNotes({ forbidden: [["somethingNew", "constructor"]] })).toEqual(["Not allowed"]);
  });
});

describe("the cross", () => {
  test("moves by one step or ten, stays inside, and goes to the row's ends", () => {
    const at = { i: 4, j: 4 };
    expect(stepBy("ArrowRight", false, at, [60, 40])).toEqual({ i: 5, j: 4 });
    expect(stepBy("ArrowUp", true, at, [60, 40])).toEqual({ i: 4, j: 14 });
    expect(stepBy("ArrowLeft", true, at, [60, 40])).toEqual({ i: 0, j: 4 });
    expect(stepBy("Home", false, at, [60, 40])).toEqual({ i: 0, j: 4 });
    expect(stepBy("End", false, at, [60, 40])).toEqual({ i: 59, j: 4 });
    expect(stepBy("toString", false, at, [60, 40])).toBeNull();
  });
  test("goes to the nearest point under the pointer", () => {
    const data = plane();
    const layout = mapLayout(data, 500);
    expect(pointAt(layout, layout.x.place(32), layout.y.place(0.22))).toEqual({ i: 8, j: 3 });
    expect(pointAt(layout, -50, 5000)).toEqual({ i: 0, j: 0 });
  });
  test("is said with its value and why it is forbidden", () => {
    expect(crossText(plane())).toBe("20 keV, 0.5 m: 1.58 Gy.".replaceAll(/(\d) (?=keV|m)/g, "$1\u00a0"));
    expect(crossText(plane({ forbidden: grid(10, 6, () => "overDose") }))).toContain("Over the dose limit.");
    expect(crossText(plane({ values: grid(10, 6, () => null) }))).toContain("no value");
    expect(crossText(plane({ cross: { i: Number.NaN, j: 99 } }))).toContain("1\u00a0m");
  });
});

describe("the drawings", () => {
  const cases: readonly (readonly [string, PlaneData])[] = [
    ["a whole plane", plane()],
    ["values missing", plane({ values: grid(10, 6, (i, j) => ((i + j) % 3 === 0 ? null : 1 + i + j)) })],
    ["no value at all", plane({ values: grid(10, 6, () => null) })],
    ["one value everywhere", plane({ values: grid(10, 6, () => 2) })],
    ["values of 0 and below", plane({ values: grid(10, 6, (i, j) => i - j) })],
    ["one energy", plane({ energiesKeV: [20], cross: { i: 0, j: 2 } })],
    ["one distance", plane({ distancesM: [0.3], cross: { i: 4, j: 0 } })],
    ["one point", plane({ energiesKeV: [20], distancesM: [0], cross: { i: 0, j: 0 } })],
    ["contact as the first distance", plane({ distancesM: [0, 0.1, 0.2, 0.4, 0.5, 1] })],
    [
      "edges, the outermost too",
      plane({ edges: [10, 20.1, 20.15, 40, 50].map((energyKeV) => ({ name: "I K", energyKeV })) }),
    ],
    ["an equal line", plane({ equal: grid(10, 6, (_, j) => 0.2 + j * 0.4) })],
    ["no point", plane({ energiesKeV: [], distancesM: [] })],
  ];
  for (const width of [330, 496]) {
    test.each(cases)(`hold only numbers at ${width} px: %s`, (_, data) => {
      for (const drawing of [PlaneMap, PlaneStrips]) {
        const drawn = renderToStaticMarkup(createElement(drawing, { data, width }));
        expect(drawn.match(/NaN|Infinity|undefined|null/g)).toBeNull();
        // A tenth of a pixel: what the server writes is what the browser computes.
        expect(drawn.match(/[ "MLHV]-?\d+\.\d{2,}[" LHVZ]/g)).toBeNull();
      }
      const rest = [PlaneTable, PlaneKey].map((part) =>
        renderToStaticMarkup(createElement(part as typeof PlaneTable, { data, ...data } as { data: PlaneData })),
      );
      expect(rest.join("")).not.toMatch(/NaN|undefined/);
    });
  }
  test("hatch what is forbidden with few rectangles", () => {
    const data = plane({ forbidden: grid(10, 6, (_, j) => (j === 0 ? "insideSample" : null)) });
    const drawn = renderToStaticMarkup(createElement(PlaneMap, { data, width: 496 }));
    expect(/class="plane-hatch" d="([^"]*)"/.exec(drawn)?.[1]?.match(/M/g)).toHaveLength(1);
  });
  test("name the plane, its picks and its keys for those who do not see it", () => {
    const drawn = renderToStaticMarkup(createElement(PlaneMap, { data: plane(), width: 496 }));
    expect(drawn).toContain('role="application"');
    expect(drawn).toContain("Dose needed over photon energy, 10\u00a0keV to 40\u00a0keV");
    expect(drawn).toContain("Pick 2: 13 keV, in contact.");
  });
  test("say where the rim line is, and only where there is one", () => {
    expect(rimNote({ equal: grid(2, 2, (_, j) => 0.5 + j) })).toContain("need the same");
    expect(rimNote({ equal: grid(2, 2, () => 3) })).toBeNull();
    expect(rimNote({ equal: null })).toBeNull();
  });
  test("of contact keep to numbers without a value, without a best energy", () => {
    const energiesKeV = [10, 20, 40];
    for (const values of [
      [1, 2, 3],
      [null, 2, null],
      [null, null, null],
    ]) {
      const drawn = renderToStaticMarkup(
        createElement(ContactStrip, { energiesKeV, values, bands: [2], best: null, width: 330 }),
      );
      expect(drawn).not.toMatch(/NaN|Infinity|undefined/);
    }
  });
});

describe("the table", () => {
  test("holds twelve rows at most, those asked for and both ends among them", () => {
    const rows = chosenRows(150, [77, 31, 77]);
    expect(rows).toHaveLength(12);
    expect(rows).toEqual(expect.arrayContaining([0, 31, 77, 149]));
    expect(rows).toEqual([...rows].sort((a, b) => a - b));
    expect(chosenRows(5, [2])).toEqual([0, 1, 2, 3, 4]);
  });
  test("says in words what is forbidden, what has no value and where picks stand", () => {
    const values = grid(10, 6, (i, j) => (j === 0 ? null : i + j));
    const forbidden = grid(10, 6, (i, j) =>
      j === 0 ? (i === 9 ? null : "insideSample") : j === 5 ? "overTime" : null,
    );
    const table = renderToStaticMarkup(createElement(PlaneTable, { data: plane({ values, forbidden }) }));
    expect(table).toContain("<small>inside the sample</small>");
    expect(table).toContain("<small>over the time limit</small>");
    expect(table).toContain("no value");
    expect(table).toContain("8 Gy<small>pick 1</small>");
  });
});
