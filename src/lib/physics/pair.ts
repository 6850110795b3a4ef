/** What sets two materials apart: Δδ, Δμ, Δβ and their ratio γ (PHYSICS 5). */
import type { OpticalConstants } from "./optical-constants.ts";

export interface PairContrast {
  readonly energyEv: number;
  readonly deltaDelta: number;
  /** Of total attenuation, 1/m. */
  readonly deltaMuPerM: number;
  /** Δμ λ/(4π): of the effective β. */
  readonly deltaBetaEffective: number;
  /** Δδ/Δβ; null where Δβ = 0. Negative for an opposed pair. */
  readonly gamma: number | null;
}

/** First minus second, both at the same energy; null where either is missing. */
export function pairContrast(first: OpticalConstants | null, second: OpticalConstants | null): PairContrast | null {
  if (!first || !second) return null;
  const deltaDelta = first.delta - second.delta;
  const deltaBetaEffective = first.betaEffective - second.betaEffective;
  return {
    energyEv: first.energyEv,
    deltaDelta,
    deltaMuPerM: first.muTotalPerM - second.muTotalPerM,
    deltaBetaEffective,
    gamma: deltaBetaEffective === 0 ? null : deltaDelta / deltaBetaEffective,
  };
}
