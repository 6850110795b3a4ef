/** Choices and limits of plans, apart from the schemas so that islands carry no validator. */
export const PLAN_LIMITS = {
  energies: 200,
  distances: 200,
  points: 20_000,
  layers: 10,
  fluxRows: 2000,
  nearField: 1.5708,
} as const;

export const USES = ["absorption", "direct", "retrieval", "tomography"] as const;
export const OBJECTIVES = ["dose", "time", "fluence"] as const;
export const SHAPES = ["sphere", "fibre", "layer"] as const;
