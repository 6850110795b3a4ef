/** What plans must do at their limits, whatever the materials. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  bandSums,
  type Band,
  contrastProfile,
  evaluatePoint,
  firstReversal,
  frequencyBand,
  geometryAt,
  type PlanTask,
  retrievalGains,
  type Shape,
  systemTransfer,
  transformSquared,
} from "#src/lib/physics/index.ts";
import { besselJ0, besselJ1 } from "#src/lib/physics/numerics/bessel.ts";
import { filonFactors } from "#src/lib/physics/numerics/filon.ts";
import { gaussLegendre } from "#src/lib/physics/numerics/gauss.ts";
import {
  fibre,
  hydroxyapatite,
  IDEAL,
  pmma,
  setup,
  sphere,
  tables,
  task,
  um,
  water,
} from "#tests/reference/plan-cases.ts";

const layer = (sizeUm: number, widthUm: number): Shape => ({
  kind: "layer",
  sizeM: um(sizeUm),
  widthM: um(widthUm),
  lengthM: um(5 * sizeUm),
});
const figures = (plan: PlanTask, energyKeV: number, distanceM: number) =>
  evaluatePoint(plan, energyKeV * 1000, distanceM, tables)!.figures;
/** Even in the logarithm. */
const log = (low: number, high: number) =>
  fc.integer({ min: 0, max: 10_000 }).map((step) => low * (high / low) ** (step / 10_000));
const shapes = fc
  .tuple(fc.constantFrom("sphere", "fibre", "layer"), log(1, 300), log(1, 300))
  .map(([kind, size, width]): Shape =>
    kind === "sphere" ? sphere(size) : kind === "fibre" ? fibre(size) : layer(size, width),
  );

describe("sums over the band", () => {
  /** Plain Simpson in u, fine enough for every factor. */
  function plainly(
    band: Band,
    wavelengthM: number,
    distanceM: number,
    absorption: number,
    phase: number,
    gamma: number,
    low: number,
  ) {
    const { geometry, shape } = band;
    const { nyquistPerM: top, sigmaM, pixelM } = geometry;
    const count = 200_000;
    const step = (top - low) / count;
    let [first, second] = [0, 0];
    for (let k = 0; k <= count; k++) {
      const u = low + k * step;
      const rule = ((k === 0 || k === count ? 1 : k % 2 === 1 ? 4 : 2) * step) / 3;
      const chi = Math.PI * wavelengthM * distanceM * u * u;
      const filter = 1 / (1 + gamma * chi);
      const passed = (absorption * Math.cos(chi) + phase * Math.sin(chi)) ** 2 * filter ** 2;
      const power = transformSquared(shape, u) * systemTransfer(u, sigmaM, pixelM) ** 2 * passed * rule;
      const length = shape.kind === "sphere" ? 0 : shape.lengthM;
      const [one, two] =
        band.kind === "volume"
          ? shape.kind === "sphere"
            ? [4 * Math.PI * u * u, Math.PI ** 3 * u ** 3]
            : [2 * Math.PI * u, 2 * Math.PI ** 2 * u * u]
          : shape.kind === "sphere"
            ? [2 * Math.PI * u, 2 * Math.PI * u]
            : [2 * length, 2 * length];
      first += power * one!;
      second += power * two! * filter ** 2;
    }
    return { first, second };
  }

  it.each(["signal", "neighbourhood", "volume"] as const)(
    "%s: within 0.1 % of plain quadrature",
    (kind) => {
      const draw = fc.record({
        shape: shapes.filter((shape) => kind !== "volume" || shape.kind !== "layer"),
        pixelShare: log(0.02, 0.33),
        blurShare: log(0.2, 4),
        wavelengthM: log(1e-11, 3e-10),
        distanceM: log(1e-4, 20),
        gamma: log(1, 1e5),
      });
      for (const { shape, pixelShare, blurShare, wavelengthM, distanceM, gamma } of fc.sample(draw, {
        numRuns: 40,
        seed: 11,
      })) {
        const across = shape.kind === "layer" ? shape.widthM : shape.sizeM;
        const pixelUm = (pixelShare * across) / um(1);
        const geometry = geometryAt(setup(null, 0, blurShare * pixelUm, pixelUm), distanceM);
        const band = frequencyBand(kind, shape, geometry)!;
        const absorption = 1;
        const term = { wavelengthM, absorption, phase: gamma };
        const beam = { wavelengthM, relativeSigma: 0, terms: [term], fineTerms: [term] };
        const filter = kind === "signal" ? 0 : gamma;
        const quick = bandSums(band, beam, distanceM, filter, { first: 0, second: 0 });
        const plain = plainly(
          band,
          wavelengthM,
          distanceM,
          absorption,
          gamma,
          filter,
          kind === "neighbourhood" ? 1 / (4 * across) : 0,
        );
        const words = JSON.stringify({ shape, pixelUm, blurShare, wavelengthM, distanceM, gamma });
        expect(quick.first, words).toAgreeWithin(plain.first, 1e-3);
        if (kind !== "signal") expect(quick.second, words).toAgreeWithin(plain.second, 1e-3);
      }
    },
    120_000,
  );

  it("first transfer maximum of phase at λR'u² = 1/2", () => {
    const at = 1e5 ** 2;
    // A band of one frequency.
    const ones = Float64Array.from([1, 1, 1]);
    const piece = {
      startPerM2: at,
      stepPerM2: at * 1e-9,
      intervals: 2,
      first: ones,
      second: ones,
      firstSum: 1,
      secondSum: 1,
    };
    const band = {
      ...frequencyBand("signal", sphere(20), geometryAt(setup(null, 0, 2, 1), 1))!,
      pieces: 1,
      piece: () => piece,
    };
    const term = { wavelengthM: 1e-10, absorption: 0, phase: 1 };
    const beam = { wavelengthM: 1e-10, relativeSigma: 0, terms: [term], fineTerms: [term] };
    const value = (distanceM: number): number => bandSums(band, beam, distanceM, 0, { first: 0, second: 0 }).first;
    const distances = Array.from({ length: 400 }, (_, index) => ((index + 1) / 400) * (1 / (1e-10 * at)));
    const best = distances.reduce((most, distance) => (value(distance) > value(most) ? distance : most));
    expect(1e-10 * best * at).toAgreeWithin(0.5, 0.005);
  });
});

describe("limits of a point", () => {
  it.each(["direct", "retrieval", "tomography"] as const)("%s at R2 = 0 is absorption", (use) => {
    for (const shape of [sphere(10), fibre(20), layer(10, 20)]) {
      const contact = figures(task(hydroxyapatite, shape, water, 5, setup(30, 50, 2, 1, IDEAL), { use }), 25, 0);
      expect(contact.rankedSignalM2!).toAgreeWithin(contact.absorptionSignalM2!, 1e-9);
      expect(contact.gain2d).toBe(1);
      expect(contact.gainCt).toBe(1);
    }
  });

  it("detectability never rises under blur", () => {
    const draw = fc.record({ shape: shapes, energyKeV: log(8, 60), distanceM: log(0.01, 5), blurUm: log(0.5, 20) });
    for (const { shape, energyKeV, distanceM, blurUm } of fc.sample(draw, { numRuns: 60, seed: 4 })) {
      const at = (blur: number): number =>
        figures(task(pmma, shape, water, 5, setup(40, 20, blur, 0.5, IDEAL)), energyKeV, distanceM).signalM2!;
      const signals = [1, 1.3, 2, 4].map((factor) => at(blurUm * factor));
      for (const [index, signal] of signals.slice(1).entries())
        expect(signal).toBeLessThanOrEqual(signals[index]! * (1 + 1e-6));
    }
  });

  it("near field: an edge's contrast is R'Δδ d/(σ²√(2πe)) within 1 % from a Fresnel number of 1", () => {
    const wavelengthM = 6e-11;
    const [sigmaM, shiftM] = [um(1), 1e-12];
    for (const fresnel of [1, 2, 5, 20]) {
      const distanceM = sigmaM ** 2 / (wavelengthM * fresnel);
      const geometry = geometryAt({ ...setup(null, 0, 0, 0.02), detectorFwhmM: 2.354820045 * sigmaM }, distanceM);
      const shape = { kind: "layer", sizeM: um(1), widthM: um(40), lengthM: 1 } as const;
      const term = { wavelengthM, absorption: 0, phase: (4 * Math.PI * shiftM) / shape.sizeM / wavelengthM };
      const positions = Array.from({ length: 401 }, (_, index) => um(10 + 0.05 * index));
      const profile = contrastProfile(
        shape,
        geometry,
        { wavelengthM, absorptionPerM: 0, fineTerms: [term] },
        positions,
        { phase: true },
      );
      const [most, least] = [Math.max(...profile), Math.min(...profile)];
      expect((most - least) / (2 + most + least)).toAgreeWithin(
        (distanceM * shiftM) / (sigmaM ** 2 * Math.sqrt(2 * Math.PI * Math.E)),
        0.01,
      );
    }
  });

  it("gain of tomography is at most 0.35 γ at Fresnel numbers from 1, for γ from 300", () => {
    for (const gamma of [300, 500, 1000, 3000, 10_000]) {
      for (const fresnel of [1, 2, 10, 100]) {
        expect(retrievalGains((Math.PI * gamma) / (4 * fresnel)).tomography).toBeLessThanOrEqual(0.35 * gamma);
      }
    }
  });

  it("contrast reverses first where cos χ + γ sin χ is zero", () => {
    for (const gamma of [1e-3, 1, 50, 1e4, -5, -19.9]) {
      const chi = firstReversal(gamma);
      expect(Math.abs(Math.cos(chi) + gamma * Math.sin(chi))).toBeLessThan(1e-9 * (1 + Math.abs(gamma)));
      expect(chi).toBeGreaterThan(0);
      expect(chi).toBeLessThan(Math.PI);
    }
    // The early zero of a strongly opposed pair does not count.
    expect(firstReversal(-20)).toAgreeWithin(Math.PI + Math.atan(1 / 20), 1e-12);
    expect(firstReversal(null)).toBe(Math.PI);
  });
});

describe("numerics", () => {
  it("Bessel functions are their integrals (DLMF 10.9.1)", () => {
    for (const x of [0, 1e-6, 0.5, 3, 7.99, 11.99, 12.01, 20, 55, 300]) {
      const count = 4000;
      let [zero, one] = [0, 0];
      for (let k = 0; k < count; k++) {
        const angle = (Math.PI * (k + 0.5)) / count;
        zero += Math.cos(x * Math.sin(angle)) / count;
        one += Math.cos(angle - x * Math.sin(angle)) / count;
      }
      const envelope = Math.min(1, Math.sqrt(2 / (Math.PI * Math.max(x, 1e-9))));
      expect(Math.abs(besselJ0(x) - zero)).toBeLessThan(2e-10 * envelope + 1e-15);
      expect(Math.abs(besselJ1(x) - one)).toBeLessThan(2e-10 * envelope + 1e-15);
    }
  });

  it("Gauss's rule is exact for polynomials up to degree 2n − 1", () => {
    for (const count of [2, 8, 16]) {
      const { nodes, weights } = gaussLegendre(count);
      for (let degree = 0; degree < 2 * count; degree++) {
        const sum = nodes.reduce((total, node, k) => total + weights[k]! * node ** degree, 0);
        expect(sum).toAgreeWithin(1 / (degree + 1), 1e-12);
      }
    }
  });

  it("Filon's factors are Simpson's at 0 and continuous where the series ends", () => {
    const at = (theta: number) => {
      const out = { alpha: 0, beta: 0, gamma: 0 };
      filonFactors(theta, out);
      return out;
    };
    expect(at(0)).toEqual({ alpha: 0, beta: 2 / 3, gamma: 4 / 3 });
    const [below, above] = [at(0.1 - 1e-9), at(0.1 + 1e-9)];
    for (const key of ["alpha", "beta", "gamma"] as const) expect(below[key]).toAgreeWithin(above[key], 1e-6);
  });
});
