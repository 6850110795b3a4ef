/**
 * What a photon energy (or a band of energies) brings to a plan, whatever the distance: contrast, transmission, efficiency, dose
 * per photon. PHYSICS 3, 5 and, for the band, 8b.
 */
import { ELEMENTARY_CHARGE } from "../constants.ts";
import { DEFAULT_SCREEN, defaultScreenThicknessM, screenEfficiency } from "../detector.ts";
import { FWHM_PER_SIGMA } from "../geometry.ts";
import { constantsOverEnergy, type ConstantsOverEnergy } from "../optical-constants.ts";
import type { Material } from "../material.ts";
import type { ScatteringTables, TabulationKey } from "../scattering.ts";
import type { BeamContrast, BeamTerm } from "../transfer.ts";
import { wavelengthM } from "../units.ts";
import type { PlanTask } from "./task.ts";

export interface Beam extends BeamContrast {
  readonly energyEv: number;
  /** Of the nominal energy: Δμ, Δδ, Δβ of total attenuation, γ = Δδ/Δβ (null where Δβ = 0). */
  readonly deltaMuPerM: number;
  readonly deltaDelta: number;
  readonly deltaBeta: number;
  readonly gamma: number | null;
  /** δ of feature and host. */
  readonly featureDelta: number;
  readonly hostDelta: number;
  /** γ of the retrieval filter: the pair's, or the host's δ/β_eff for an opposed pair; 0 (no filter) where neither is above 0. */
  readonly filterGamma: number;
  /** Mean Δμ of the detected photons: what absorption alone shows. */
  readonly absorptionPerM: number;
  /** Of all layers, and the share of what arrives that is detected. */
  readonly transmission: number;
  readonly efficiency: number;
  /** Entrance dose of host and feature for each photon per m² that enters the first layer, Gy m²; null without matter. */
  readonly hostDosePerFluence: number | null;
  readonly featureDosePerFluence: number | null;
  /** Mean over the host's depth over its entrance dose. */
  readonly meanDoseShare: number;
  /** Photons per second and m² at the first layer; null where it is not known. */
  readonly fluxPerSM2: number | null;
}

/** Narrower beams count as one energy: fringes of any band that pixels resolve are then damped by less than 0.1 %. */
const ONE_ENERGY_BELOW = 5e-4;
/** The band is cut at four standard deviations, where 6e-5 of the photons lie beyond. */
const CUT_SIGMAS = 4;
/** Steps of the band, in standard deviations. Every second one is enough where fringes have hardly faded (transfer.ts). */
const STEP_SIGMAS = 0.5;
/** No part of a band lies below this share of its nominal energy. */
const LOWEST_SHARE = 0.1;

/** Beams of a task at the energies given (eV), null where a material has no values in the tabulation. */
export function beamsOf(
  task: PlanTask,
  energiesEv: readonly number[],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): (Beam | null)[] {
  const parts = energiesEv.map((energyEv) => bandOf(energyEv, task.setup.bandwidth));
  const all = parts.flatMap((band) => band.energiesEv);
  const columns = columnsOf(task, all, tables, tabulation);
  const range = tables.tabulations[tabulation].rangeEv;
  let start = 0;
  return parts.map((band, index) => {
    const from = start;
    start += band.energiesEv.length;
    const energyEv = energiesEv[index]!;
    if (energyEv < range[0] || energyEv > range[1]) return null;
    return beamOf(task, energyEv, band, from, columns);
  });
}

interface EnergyBand {
  readonly energiesEv: readonly number[];
  /** Photons in each part, relative. */
  readonly shares: readonly number[];
  readonly middle: number;
}

/**
 * A Gaussian in photon numbers, on even steps: the trapezium rule is exact for it but for the cut. It is that of the photons
 * counted, which make the contrast; transmission, efficiency and dose are means over the same Gaussian.
 */
function bandOf(energyEv: number, bandwidth: number): EnergyBand {
  if (bandwidth < ONE_ENERGY_BELOW) return { energiesEv: [energyEv], shares: [1], middle: 0 };
  const sigma = bandwidth / FWHM_PER_SIGMA;
  const energiesEv: number[] = [];
  const shares: number[] = [];
  let middle = 0;
  const reach = Math.round(CUT_SIGMAS / STEP_SIGMAS);
  for (let k = -reach; k <= reach; k++) {
    const share = 1 + k * STEP_SIGMAS * sigma;
    if (share < LOWEST_SHARE) continue;
    if (k === 0) middle = energiesEv.length;
    energiesEv.push(energyEv * share);
    shares.push(Math.exp(-0.5 * (k * STEP_SIGMAS) ** 2));
  }
  return { energiesEv, shares, middle };
}
interface Columns {
  readonly feature: ConstantsOverEnergy;
  readonly host: ConstantsOverEnergy;
  readonly layers: readonly ConstantsOverEnergy[];
  readonly screen: ConstantsOverEnergy | null;
  readonly screenThicknessM: number;
}

function columnsOf(
  task: PlanTask,
  energiesEv: readonly number[],
  tables: ScatteringTables,
  tabulation: TabulationKey,
): Columns {
  const { sample, setup } = task;
  const of = (material: Material): ConstantsOverEnergy => constantsOverEnergy(material, energiesEv, tables, tabulation);
  const { efficiency } = setup;
  const screen = efficiency === null ? DEFAULT_SCREEN : efficiency.kind === "screen" ? efficiency.material : null;
  return {
    feature: of(sample.feature.material),
    host: of(sample.host.material),
    layers: sample.layers.map((layer) => of(layer.material)),
    // The detector is not what the tables are compared for: its efficiency comes from the primary one throughout.
    screen: screen && constantsOverEnergy(screen, energiesEv, tables),
    screenThicknessM: efficiency?.kind === "screen" ? efficiency.thicknessM : defaultScreenThicknessM(setup),
  };
}

const muOf = (columns: ConstantsOverEnergy, row: number): number =>
  columns.muPhotoPerM[row]! + columns.muCoherentPerM[row]! + columns.muIncoherentPerM[row]!;

function beamOf(task: PlanTask, energyEv: number, band: EnergyBand, from: number, columns: Columns): Beam | null {
  const { sample, setup } = task;
  const { feature, host, layers, screen, screenThicknessM } = columns;
  const count = band.energiesEv.length;
  let photons = 0;
  let transmitted = 0;
  let counted = 0;
  let hostDose = 0;
  let featureDose = 0;
  let meanDose = 0;
  for (let k = 0; k < count; k++) {
    const row = from + k;
    const share = band.shares[k]!;
    let before = 0;
    let path = muOf(host, row) * sample.hostThicknessM;
    for (const [index, layer] of sample.layers.entries()) {
      const depth = muOf(layers[index]!, row) * layer.thicknessM;
      path += depth;
      if (layer.position === "before") before += depth;
    }
    const passed = Math.exp(-path);
    const efficiency =
      setup.efficiency?.kind === "number"
        ? setup.efficiency.value
        : screenEfficiency(screen as ConstantsOverEnergy, row, screenThicknessM);
    photons += share;
    transmitted += share * passed;
    counted += share * passed * efficiency;
    const arriving = share * Math.exp(-before) * band.energiesEv[k]! * ELEMENTARY_CHARGE.value;
    hostDose += arriving * host.muEnergyAbsorptionPerM[row]!;
    featureDose += arriving * feature.muEnergyAbsorptionPerM[row]!;
    meanDose += arriving * host.muEnergyAbsorptionPerM[row]! * meanShare(muOf(host, row) * sample.hostThicknessM);
  }
  const middle = from + band.middle;
  const wavelength = wavelengthM(energyEv);
  const deltaMuPerM = muOf(feature, middle) - muOf(host, middle);
  const deltaDelta = feature.delta[middle]! - host.delta[middle]!;
  if (!Number.isFinite(deltaMuPerM + deltaDelta + transmitted + counted + hostDose + featureDose)) return null;
  const deltaBeta = (deltaMuPerM * wavelength) / (4 * Math.PI);
  const partsOf = (every: number): BeamTerm[] => {
    const chosen = [...band.shares.keys()].filter((k) => (k - band.middle) % every === 0);
    const weights = chosen.map((k) => band.shares[k]!);
    const total = weights.reduce((sum, weight) => sum + weight, 0);
    return chosen.map((k, place) => {
      const row = from + k;
      const share = weights[place]! / total;
      const partWavelength = wavelengthM(band.energiesEv[k]!);
      return {
        wavelengthM: partWavelength,
        absorption: share * (muOf(feature, row) - muOf(host, row)),
        phase: (share * 4 * Math.PI * (feature.delta[row]! - host.delta[row]!)) / partWavelength,
      };
    });
  };
  const fineTerms = partsOf(1);
  const gamma = deltaBeta === 0 ? null : deltaDelta / deltaBeta;
  const hostDensity = sample.host.material.densityKgPerM3;
  const featureDensity = sample.feature.material.densityKgPerM3;
  return {
    energyEv,
    wavelengthM: wavelength,
    relativeSigma: count === 1 ? 0 : setup.bandwidth / FWHM_PER_SIGMA,
    terms: count === 1 ? fineTerms : partsOf(2),
    fineTerms,
    deltaMuPerM,
    deltaDelta,
    deltaBeta,
    gamma,
    featureDelta: feature.delta[middle]!,
    hostDelta: host.delta[middle]!,
    filterGamma: filterGamma(gamma, host.delta[middle]!, (muOf(host, middle) * wavelength) / (4 * Math.PI)),
    absorptionPerM: fineTerms.reduce((sum, term) => sum + term.absorption, 0),
    transmission: transmitted / photons,
    efficiency: transmitted > 0 ? counted / transmitted : 0,
    hostDosePerFluence: hostDensity > 0 ? hostDose / photons / hostDensity : null,
    featureDosePerFluence: featureDensity > 0 ? featureDose / photons / featureDensity : null,
    meanDoseShare: hostDose > 0 ? meanDose / hostDose : 1,
    fluxPerSM2: fluxAt(setup.fluxPerSM2, energyEv),
  };
}

/** (1 − e^{−x})/x. */
const meanShare = (depth: number): number => (depth > 0 ? -Math.expm1(-depth) / depth : 1);

function filterGamma(gamma: number | null, hostDelta: number, hostBetaEffective: number): number {
  if (gamma !== null && gamma > 0) return gamma;
  return hostDelta > 0 && hostBetaEffective > 0 ? hostDelta / hostBetaEffective : 0;
}

/** Flux at an energy: rows are joined by straight lines; outside them it is not known. */
function fluxAt(flux: PlanTask["setup"]["fluxPerSM2"], energyEv: number): number | null {
  if (flux === null || typeof flux === "number") return flux;
  const above = flux.findIndex(([rowEv]) => rowEv >= energyEv);
  if (above < 0) return null;
  const [upperEv, upper] = flux[above]!;
  if (upperEv === energyEv) return upper > 0 ? upper : null;
  if (above === 0) return null;
  const [lowerEv, lower] = flux[above - 1]!;
  const value = lower + ((upper - lower) * (energyEv - lowerEv)) / (upperEv - lowerEv);
  return value > 0 ? value : null;
}
