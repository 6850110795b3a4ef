/**
 * Energy absorption (PHYSICS 3): σ_photo less the fluorescence that leaves, plus the Klein–Nishina share of incoherent
 * scattering. M and higher fluorescence is not subtracted, nor is any that a thick sample takes up again added.
 */
import { ELECTRON_REST_ENERGY } from "#src/lib/physics/constants.ts";

const INTEGRATION_STEPS = 400;

/**
 * Mean share of the photon energy given to the electron, Klein and Nishina, Z. Phys. 52, 853 (1929):
 * ∫ (1 − E'/E) dσ/dΩ dΩ / ∫ dσ/dΩ dΩ. Goes to E/(m_e c²) at low energy, 0.138 at 100 keV. Simpson's rule over cos θ.
 */
export function kleinNishinaEnergyShare(energyEv: number): number {
  const alpha = energyEv / ELECTRON_REST_ENERGY.value;
  let total = 0;
  let transferred = 0;
  for (let step = 0; step <= INTEGRATION_STEPS; step++) {
    const cosine = -1 + (2 * step) / INTEGRATION_STEPS;
    const weight = step === 0 || step === INTEGRATION_STEPS ? 1 : step % 2 === 1 ? 4 : 2;
    // 1 − E'/E written without a difference of near-equal numbers.
    const shift = alpha * (1 - cosine);
    const ratio = 1 / (1 + shift);
    const section = ratio * ratio * (ratio + 1 / ratio - (1 - cosine * cosine));
    total += weight * section;
    transferred += weight * section * shift * ratio;
  }
  return transferred / total;
}

/** Binding energies (eV, 0: none), yields, Coster–Kronig probabilities and K emission rates of one element. */
export interface RelaxationData {
  readonly bindingEv: Readonly<Record<"K" | "L1" | "L2" | "L3" | "M1" | "M5", number>>;
  readonly yields: Readonly<Record<"K" | "L1" | "L2" | "L3", number>>;
  readonly costerKronig: Readonly<Record<"f12" | "f13" | "f23", number>>;
  /** Shares of all K emission. */
  readonly kShares: Readonly<Record<"KL2" | "KL3" | "KM" | "KN", number>>;
}

/** Mean L vacancies after a K Auger event. */
const L_VACANCIES_PER_K_AUGER = 1.6;

/** Mean fluorescence energy, eV, that leaves after a vacancy in K, L1, L2, L3. */
export function escapingFluorescenceEv(data: RelaxationData): Record<"K" | "L1" | "L2" | "L3", number> {
  const { bindingEv: b, yields: w, costerKronig: f, kShares: r } = data;
  const L3 = w.L3 * (b.L3 - b.M5);
  const L2 = w.L2 * (b.L2 - b.M5) + f.f23 * L3;
  const L1 = w.L1 * (b.L1 - b.M1) + f.f12 * L2 + f.f13 * L3;
  const K =
    w.K * (r.KL2 * (b.K - b.L2 + L2) + r.KL3 * (b.K - b.L3 + L3) + r.KM * (b.K - b.M1) + r.KN * b.K) +
    (1 - w.K) * L_VACANCIES_PER_K_AUGER * L3;
  return { K, L1, L2, L3 };
}
