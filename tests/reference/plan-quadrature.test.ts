/** The signals of plans against dense quadrature of the published formulas, by an independent program (plan-quadrature.py). */
import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { absorptionSums, bandSums, frequencyBand, geometryAt, type Shape } from "#src/lib/physics/index.ts";

interface Row {
  shape: Shape["kind"];
  sizeM: number;
  widthM: number;
  lengthM: number;
  wavelengthM: number;
  deltaDelta: number;
  deltaBeta: number;
  gammaFilter: number;
  sourceDistanceM: number | null;
  distanceM: number;
  sourceFwhmM: number;
  detectorFwhmM: number;
  pixelM: number;
  chiAtNyquist: number;
  SM2: number;
  SAbsorptionM2: number;
  SEffM2: number | null;
  SEffAbsorptionM2: number | null;
  SCtM2: number;
  SCtAbsorptionM2: number;
}

const { rows } = JSON.parse(readFileSync(new URL("./fixtures/plan-quadrature.json", import.meta.url), "utf8")) as {
  rows: Row[];
};

/** Both are within a tenth of it of the truth; what is asked is 0.1 %. */
const TOLERANCE = 1e-3;

describe("signals agree with dense quadrature within 0.1 %", () => {
  it.each(rows.map((row, index) => [index, row.shape, row] as const))("row %d, %s", (_, __, row) => {
    const { wavelengthM, gammaFilter } = row;
    const shape: Shape =
      row.shape === "sphere"
        ? { kind: "sphere", sizeM: row.sizeM }
        : row.shape === "fibre"
          ? { kind: "fibre", sizeM: row.sizeM, lengthM: row.lengthM }
          : { kind: "layer", sizeM: row.sizeM, widthM: row.widthM, lengthM: row.lengthM };
    const geometry = geometryAt(row, row.distanceM);
    const wave = (4 * Math.PI) / wavelengthM;
    const term = { wavelengthM, absorption: wave * row.deltaBeta, phase: wave * row.deltaDelta };
    const beam = { wavelengthM, relativeSigma: 0, terms: [term], fineTerms: [term] };
    const sums = (kind: "signal" | "neighbourhood" | "volume", filter: number) =>
      bandSums(frequencyBand(kind, shape, geometry)!, beam, geometry.effectiveDistanceM, filter, {
        first: 0,
        second: 0,
      });
    const alone = (kind: "signal" | "neighbourhood" | "volume") => {
      const { first, second } = absorptionSums(frequencyBand(kind, shape, geometry)!);
      return { first: first * term.absorption ** 2, second: second * term.absorption ** 2 };
    };
    const observed = ({ first, second }: { first: number; second: number }): number => (first * first) / second;
    const length = shape.kind === "sphere" ? 1 : shape.lengthM;
    expect(sums("signal", 0).first).toAgreeWithin(row.SM2, TOLERANCE);
    expect(alone("signal").first).toAgreeWithin(row.SAbsorptionM2, TOLERANCE);
    expect(observed(sums("neighbourhood", gammaFilter))).toAgreeWithin(row.SEffM2!, TOLERANCE);
    expect(observed(alone("neighbourhood"))).toAgreeWithin(row.SEffAbsorptionM2!, TOLERANCE);
    expect(length * observed(sums("volume", gammaFilter))).toAgreeWithin(row.SCtM2, TOLERANCE);
    expect(length * observed(alone("volume"))).toAgreeWithin(row.SCtAbsorptionM2, TOLERANCE);
  });

  it("covers every shape, cone and parallel beams, opposed pairs, and phases of hundreds of radians", () => {
    expect(rows.length).toBeGreaterThanOrEqual(40);
    expect(new Set(rows.map(({ shape }) => shape)).size).toBe(3);
    expect(rows.some(({ sourceDistanceM }) => sourceDistanceM === null)).toBe(true);
    expect(rows.some(({ sourceDistanceM }) => sourceDistanceM !== null && sourceDistanceM < 0.1)).toBe(true);
    expect(rows.some(({ deltaDelta, deltaBeta }) => deltaDelta * deltaBeta < 0)).toBe(true);
    expect(Math.max(...rows.map(({ chiAtNyquist }) => chiAtNyquist))).toBeGreaterThan(100);
  });
});
