/**
 * Optical constants computed by an independent program after the same recipe (aligned EPDL97, dispersion integral), at four
 * energies outside edges. Tolerances: δ 0.3 %, since f1 is thinned to 0.02 % and weights differ in their last digits; β, μ and
 * μ_en 1 %, the accuracy the recipe claims.
 */
import { describe, expect, it } from "vitest";
import {
  compositionOfFormula,
  kgPerM3FromGCm3,
  opticalConstants,
  parseFormula,
  perCmFromPerM,
  withDensity,
} from "#src/lib/physics/index.ts";
import { committedTables } from "#data/build/committed-tables.ts";

// formula, density g/cm³, energy keV, δ, β, μ_photo, μ_total, μ_en (1/cm)
const CHECKS: readonly (readonly [string, number, number, number, number, number, number, number])[] = [
  ["H2O", 1, 5.0, 9.3189e-6, 8.2602e-8, 41.86, 42.55, 41.836],
  ["H2O", 1, 8.048, 3.5764e-6, 1.1921e-8, 9.7236, 10.182, 9.7221],
  ["H2O", 1, 20.0, 5.7663e-7, 2.6802e-10, 0.5433, 0.80983, 0.54961],
  ["H2O", 1, 60.0, 6.4002e-8, 2.4538e-12, 0.014922, 0.20567, 0.03148],
  ["C5H8O2", 1.19, 5.0, 1.0746e-5, 6.1645e-8, 31.24, 31.889, 31.229],
  ["C5H8O2", 1.19, 8.048, 4.1293e-6, 8.7448e-9, 7.1332, 7.5886, 7.134],
  ["C5H8O2", 1.19, 20.0, 6.6654e-7, 1.9134e-10, 0.38786, 0.6802, 0.3953],
  ["C5H8O2", 1.19, 60.0, 7.4006e-8, 1.7164e-12, 0.010438, 0.22861, 0.029648],
  ["Si", 2.33, 5.0, 1.9812e-5, 1.1206e-6, 567.9, 571.12, 559.2],
  ["Si", 2.33, 8.048, 7.5817e-6, 1.7885e-7, 145.89, 148.09, 144.5],
  ["Si", 2.33, 20.0, 1.2112e-6, 4.6975e-9, 9.5224, 10.408, 9.4976],
  ["Si", 2.33, 60.0, 1.3393e-7, 4.9307e-11, 0.29985, 0.74749, 0.33279],
  ["Ca5P3O13H", 3.16, 5.0, 2.6105e-5, 1.9393e-6, 982.77, 986.73, 898.48],
  ["Ca5P3O13H", 3.16, 8.048, 1.0217e-5, 3.3135e-7, 270.28, 273.08, 255.45],
  ["Ca5P3O13H", 3.16, 20.0, 1.6409e-6, 9.6193e-9, 19.499, 20.732, 19.07],
  ["Ca5P3O13H", 3.16, 60.0, 1.814e-7, 1.1062e-10, 0.67269, 1.2856, 0.71271],
  ["Au", 19.3, 5.0, 0.00012135, 2.5071e-5, 12705.0, 12851.0, 12705.0],
  ["Au", 19.3, 8.048, 4.6854e-5, 4.6884e-6, 3824.4, 3925.0, 3824.4],
  ["Au", 19.3, 20.0, 7.9298e-6, 7.2725e-7, 1474.2, 1518.6, 1268.9],
  ["Au", 19.3, 60.0, 8.759e-7, 1.2561e-8, 76.388, 86.545, 72.998],
  ["CuSO4·5H2O", 2.286, 5.0, 1.9425e-5, 5.383e-7, 272.8, 275.89, 269.32],
  ["CuSO4·5H2O", 2.286, 8.048, 7.3859e-6, 8.6273e-8, 70.373, 72.263, 69.803],
  ["CuSO4·5H2O", 2.286, 20.0, 1.2118e-6, 1.0796e-8, 21.884, 22.816, 18.76],
  ["CuSO4·5H2O", 2.286, 60.0, 1.3414e-7, 1.4292e-10, 0.86912, 1.3278, 0.85974],
];

const tables = committedTables();

describe("optical constants against an independent program", () => {
  it.each(CHECKS)(
    "%s of %d g/cm³ at %d keV",
    (formula, densityGCm3, energyKeV, delta, beta, muPhoto, muTotal, muEnergyAbsorption) => {
      const material = withDensity(compositionOfFormula(parseFormula(formula)), kgPerM3FromGCm3(densityGCm3));
      const constants = opticalConstants(material, energyKeV * 1000, tables)!;
      expect(constants.delta).toAgreeWithin(delta, 0.003);
      expect(constants.beta).toAgreeWithin(beta, 0.01);
      expect(perCmFromPerM(constants.muPhotoPerM)).toAgreeWithin(muPhoto, 0.01);
      expect(perCmFromPerM(constants.muTotalPerM)).toAgreeWithin(muTotal, 0.01);
      expect(perCmFromPerM(constants.muEnergyAbsorptionPerM)).toAgreeWithin(muEnergyAbsorption, 0.01);
    },
  );

  it("holds six materials at four energies", () => {
    expect(CHECKS).toHaveLength(24);
  });
});
