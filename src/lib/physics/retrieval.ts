/** The filter of single-material retrieval (Paganin et al., J. Microsc. 206, 33 (2002); PHYSICS 8). */

/** H = 1/(1 + γχ), χ = πλR'u² ≥ 0, γ ≥ 0: 1 in contact and at u = 0; falls as 1/u² beyond. */
export const retrievalFilter = (gamma: number, chi: number): number => 1 / (1 + gamma * chi);
