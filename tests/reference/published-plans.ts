/** What the product gives for published values of contrast, retrieval, geometry and dose of plans. */
import {
  contrastProfile,
  dosePerFluenceGyM2,
  evaluatePoint,
  firstReversal,
  geometryAt,
  opticalConstants,
  type PlanTask,
  retrievalFilter,
  retrievalGains,
  ROSE_THRESHOLD,
  transmission,
  wavelengthM,
} from "#src/lib/physics/index.ts";
import type { Lane } from "#src/lib/physics/plan/point.ts";
import { needOf } from "#src/lib/physics/plan/point.ts";
import type { Beam } from "#src/lib/physics/plan/beam.ts";
import { publishedMaterial } from "./materials.ts";
import { IDEAL, setup, sphere, tables, task, um } from "./plan-cases.ts";

interface Stated {
  readonly material: string;
  readonly energy_eV: number | null;
}

/** The number after a name, such as "NF=4" or "p=3 um". */
const given = (name: string, { material }: Stated): number => {
  const found = new Map(
    [...material.matchAll(/([A-Za-z|]+\d?|\|phi\|)=([\d.]+)/g)].map(([, key, value]) => [key, Number(value)]),
  );
  const value = found.get(name);
  if (value === undefined) throw new Error(`${material} does not give ${name}`);
  return value;
};

const gains = (entry: Stated) => retrievalGains((Math.PI * given("gamma", entry)) / (4 * given("NF", entry)));

/** The least of a function of one number, by golden section. */
function leastAt(value: (x: number) => number, low: number, high: number): number {
  const golden = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [low, high];
  for (let round = 0; round < 80; round++) {
    const [c, d] = [b - golden * (b - a), a + golden * (b - a)];
    if (value(c) < value(d)) b = d;
    else a = c;
  }
  return 0.5 * (a + b);
}

/** μL at which a slab needs least for a feature of the slab's own matter, one per cent denser: μ is changed by the density. */
function bestDepth(
  cost: (figures: NonNullable<ReturnType<typeof evaluatePoint>>["figures"], density: number) => number,
): number {
  const water = publishedMaterial("water");
  const dense = (factor: number) => ({ ...water, densityKgPerM3: water.densityKgPerM3 * factor });
  const at = (factor: number) => {
    const plan: PlanTask = {
      ...task(dense(1.01 * factor), sphere(50), dense(factor), 10, setup(null, 0, 10, 5, IDEAL)),
      use: "absorption",
    };
    return evaluatePoint(plan, 20_000, 0.01, tables)!.figures;
  };
  const best = leastAt((factor) => cost(at(factor), factor), 0.5, 6);
  return opticalConstants(dense(best), 20_000, tables)!.muTotalPerM * 0.01;
}

/** u_N of a pixel: p in µm, parallel beam. */
const nyquist = (entry: Stated): number => geometryAt(setup(null, 0, 0, given("p", entry)), 1).nyquistPerM;

/** χ = πλR'u² of water's filter at 20 keV, R' 0.5 m, and its γ = δ/β_eff. */
function waterFilter(entry: Stated, periodM: number): { value: number; frequencyPerM: number } {
  const {
    delta,
    betaEffective,
    wavelengthM: wavelength,
  } = opticalConstants(publishedMaterial("water"), entry.energy_eV as number, tables)!;
  const frequencyPerM = 1 / periodM;
  return {
    frequencyPerM,
    value: retrievalFilter(delta / betaEffective, Math.PI * wavelength * given("R", entry) * frequencyPerM ** 2),
  };
}

/** A phase edge blurred by σ: one side of a wide layer, |φ| = 0.1 rad, (I_max − I_min)/(I_max + I_min). */
function edgeContrast(entry: Stated): number {
  const wavelength = wavelengthM(20_000);
  const sigmaM = um(1);
  const distanceM = sigmaM ** 2 / (wavelength * given("NF", entry));
  // The edge lies at half the width; pixels far below σ do not blur.
  const shape = { kind: "layer", sizeM: um(1), widthM: um(40), lengthM: 1 } as const;
  const geometry = geometryAt(
    { ...setup(null, 0, 0, 0.02), detectorFwhmM: 2 * Math.sqrt(2 * Math.LN2) * sigmaM },
    distanceM,
  );
  const term = { wavelengthM: wavelength, absorption: 0, phase: (2 * 0.1) / shape.sizeM };
  const positions = Array.from({ length: 401 }, (_, index) => um(10 + 0.05 * index));
  const profile = contrastProfile(
    shape,
    geometry,
    { wavelengthM: wavelength, absorptionPerM: 0, fineTerms: [term] },
    positions,
    { phase: true },
  );
  const [most, least] = [Math.max(...profile), Math.min(...profile)];
  return (most - least) / (2 + most + least);
}

/** Blur over magnification, source and detector FWHM in µm. */
const blurAt = (sourceUm: number, detectorUm: number, magnification: number): number =>
  geometryAt(setup(1, sourceUm, detectorUm, 1), magnification - 1).sigmaM;

const roseSignal = (): number => {
  const lane = { pixelAreaM2: 1 } as Lane;
  const beam = { efficiency: 1, transmission: 1 } as Beam;
  const plan = { threshold: ROSE_THRESHOLD, minimumCounts: 0 } as PlanTask;
  // Contrast 1 % over a square of 10 µm.
  return needOf(plan, lane, beam, 0.01 ** 2 * um(10) ** 2)!.fluencePerM2;
};

const FWHM_UM = 2 * Math.sqrt(2 * Math.LN2) * 1e6;

export const PLAN_QUANTITIES: Readonly<Record<string, (entry: Stated) => number>> = {
  SNR_gain_2D_TIE: (entry) => gains(entry).image,
  SNR_gain_CT_TIE: (entry) => gains(entry).tomography,
  SNR_gain_CT_limit_over_gamma: (entry) => gains(entry).tomography / given("gamma", entry),
  TIE_filter_value: (entry) => waterFilter(entry, um(20)).value,
  // H = 1/(1 + 4π²L²u²).
  TIE_filter_length: (entry) => {
    const { value, frequencyPerM } = waterFilter(entry, um(20));
    return (Math.sqrt(1 / value - 1) / (2 * Math.PI * frequencyPerM)) * 1e6;
  },
  phase_edge_contrast: edgeContrast,
  optimal_magnification: () => leastAt((magnification) => blurAt(5, 50, magnification), 1.5, 1000),
  min_system_blur: () =>
    blurAt(
      3,
      3,
      leastAt((magnification) => blurAt(3, 3, magnification), 1.01, 100),
    ) * FWHM_UM,
  source_blur_at_detector: () => {
    const { sourceSigmaM, magnification } = geometryAt(setup(145, 50, 0, 1), 3);
    return sourceSigmaM * magnification * FWHM_UM;
  },
  optimum_mu_D_fixed_incident: () => bestDepth(({ fluencePerM2 }) => fluencePerM2!),
  // Energy absorbed in the slab: the mean dose times its mass.
  optimum_mu_D_fixed_mean_dose: () => bestDepth(({ meanDoseGy }, density) => meanDoseGy! * density),
  transmission_at_muD2: () => transmission(200, 0.01),
  rose_k: () => ROSE_THRESHOLD,
  rose_fluence: () => roseSignal() * 1e-4,
  rose_dose: (entry) => {
    const water = publishedMaterial("water");
    return (
      roseSignal() *
      dosePerFluenceGyM2(opticalConstants(water, entry.energy_eV as number, tables)!, water.densityKgPerM3)!
    );
  },
  // χ = π/2 and, without absorption, the first reversal at χ = π.
  z_first_CTF_phase_max_at_Nyquist_2p2_over_lambda: (entry) =>
    firstReversal(null) / 2 / (Math.PI * wavelengthM(entry.energy_eV as number) * nyquist(entry) ** 2),
  z_limit_4p2_over_lambda: (entry) =>
    firstReversal(null) / (Math.PI * wavelengthM(entry.energy_eV as number) * nyquist(entry) ** 2),
};
