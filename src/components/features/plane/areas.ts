/** The bands of a plane and its line of equal need, as SVG paths. */
import { bandText, shadeOf } from "./bands.ts";
import { areaPath, contourOf, interpolation, linePath, patchesOf, type Point } from "./contours.ts";
import { type PlaneLayout, px } from "./layout.ts";
import type { Better, PlaneData } from "./types.ts";

export interface BandArea {
  readonly shade: number;
  readonly area: string;
  /** The line at the band's lower threshold. */
  readonly path: string;
  readonly lines: readonly (readonly Point[])[];
  /** "" for the lowest band, which has no threshold. */
  readonly text: string;
}

/** From the lowest band up, each drawn over the one before it. */
export function bandAreas(
  values: PlaneData["values"],
  bands: readonly number[],
  layout: PlaneLayout,
  better: Better = "less",
): BandArea[] {
  const of = interpolation(values);
  const patches = patchesOf(values, layout, of);
  const whole = patches
    .map(({ xs, ys }) => `M${px(xs[0]!)} ${px(ys[0]!)}H${px(xs.at(-1)!)}V${px(ys.at(-1)!)}H${px(xs[0]!)}Z`)
    .join("");
  const lowest = { shade: shadeOf(0, bands.length, better), area: whole, path: "", lines: [], text: "" };
  const above = bands.map((threshold, index) => {
    const found = patches.map((patch) => contourOf(patch, of(threshold)));
    const lines = found.flatMap((contour) => contour.lines);
    return {
      shade: shadeOf(index + 1, bands.length, better),
      area: areaPath(found.flatMap(({ rings }) => rings)),
      path: linePath(lines),
      lines,
      text: bandText(threshold),
    };
  });
  return [lowest, ...above];
}

export interface RimPaths {
  readonly line: string;
  readonly dark: string;
}

/** The line of equal need, and the side of it where phase needs less. */
export function rimPaths(
  equal: NonNullable<PlaneData["equal"]>,
  layout: PlaneLayout,
): { line: string; dark: string } | null {
  const of = interpolation(equal);
  const found = patchesOf(equal, layout, of).map((patch) => contourOf(patch, of(1)));
  const line = linePath(found.flatMap(({ lines }) => lines));
  return line === "" ? null : { line, dark: areaPath(found.flatMap(({ rings }) => rings)) };
}
